/** A good dossier out of a real book: asked for over HTTP, made by the queue, taken out as a file. */
import { pino } from 'pino';
import { unzipDossier } from '../../shared/dossier/unzip.ts';
import { workOf } from '../../server/jobs/kinds.ts';
import { workOnce } from '../../server/jobs/worker.ts';
import type { Files } from './dossier-files.ts';
import type { Person, TestServer } from './server.ts';

/** Asks for a dossier, lets the queue make it, and takes it out. */
export async function takeDossier(server: TestServer, by: Person): Promise<{ zip: Buffer; files: Files }> {
  const asked = await by.post('/dossiers', { as_of: null });
  await workOnce(server.context.db, workOf(server.context), pino({ level: 'silent' }));
  const zip: unknown = (await by.get(`/dossiers/${String(asked.body.id)}/file`).responseType('blob')).body;
  if (!Buffer.isBuffer(zip)) throw new Error('the dossier is no file');
  const files = unzipDossier(zip);
  if (typeof files === 'string') throw new Error(files);
  return { zip, files: new Map(files) };
}
