/** Unpacks a dossier with limits: no path that climbs, no archive inside, nothing that swells beyond reason. */
import { unzipSync } from 'fflate';

const MOST_FILES = 200;
const MOST_BYTES = 2_000_000_000;
const MOST_RATIO = 400;
const PATH = /^[a-z0-9][a-z0-9._-]*(\/[a-z0-9][a-z0-9._-]*)?$/i;

/** The files of an archive by path, or a sentence why it is not unpacked. */
export function unzipDossier(zip: Uint8Array): ReadonlyMap<string, Uint8Array> | string {
  let files = 0;
  let total = 0;
  let refused: string | null = null;
  try {
    const unpacked = unzipSync(zip, {
      filter({ name, originalSize, size }) {
        files += 1;
        total += originalSize;
        if (!PATH.test(name) || /\.(zip|gz|tar|7z)$/i.test(name))
          refused ??= `${name.slice(0, 80)} is no file of a dossier.`;
        if (files > MOST_FILES || total > MOST_BYTES)
          refused ??= 'The archive holds more than a dossier can.';
        if (originalSize > 10_000_000 && originalSize > size * MOST_RATIO)
          refused ??= `${name} swells far beyond its size.`;
        return refused === null;
      },
    });
    return refused ?? new Map(Object.entries(unpacked));
  } catch {
    return 'The archive can’t be read. It is no ZIP file, or it was damaged.';
  }
}
