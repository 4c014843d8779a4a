/** Unpacks a dossier with limits: no path that climbs, no archive inside, nothing that swells beyond reason. */
import { unzipSync } from 'fflate';

const MOST_FILES = 200;
const MOST_BYTES = 2_000_000_000;
const MOST_RATIO = 400;
const PATH = /^[a-z0-9][a-z0-9._-]*(\/[a-z0-9][a-z0-9._-]*)?$/i;

/** The files of an archive by path, or a sentence why it is not unpacked. */
export function unzipDossier(zip: Uint8Array): ReadonlyMap<string, Uint8Array> | string {
  const names = new Set<string>();
  let files = 0;
  let total = 0;
  const refusals: string[] = [];
  try {
    const unpacked = unzipSync(zip, {
      filter({ name, originalSize }) {
        files += 1;
        total += originalSize;
        if (!PATH.test(name) || /\.(zip|gz|tar|7z)$/i.test(name))
          refusals.push(`${name.slice(0, 80)} is no file of a dossier.`);
        if (names.has(name)) refusals.push(`${name.slice(0, 80)} stands in the archive twice.`);
        names.add(name);
        if (files > MOST_FILES || total > MOST_BYTES)
          refusals.push('The archive holds more than a dossier can.');
        if (total > 10_000_000 && total > zip.length * MOST_RATIO)
          refusals.push('The archive swells far beyond its size.');
        return refusals.length === 0;
      },
    });
    return refusals[0] ?? new Map(Object.entries(unpacked));
  } catch {
    return 'The archive can’t be read. It is no ZIP file, or it was damaged.';
  }
}
