/** Dossiers: asked for here, made in the queue, taken out as a ZIP. */
import { createPublicKey } from 'node:crypto';
import { dossierMade } from '../../shared/schemas/dossiers.ts';
import { z } from '../../shared/schemas/zod.ts';
import { keyIdOf } from '../cli/node-crypto.ts';
import { backgroundJobById, backgroundJobsOf, enqueue } from '../jobs/queue.ts';
import { ProblemError } from '../problem.ts';
import { readDocument } from '../services/documents/documents.ts';
import { securityEvent } from '../security-log.ts';
import { checkBody } from '../services/events/check-body.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Route } from './route.ts';

const SHOWN = 50;
const makeBody = z.strictObject({ as_of: z.null().default(null) });
const headRow = z.object({ sequence: z.string(), hash: z.string() });

export const dossierRoutes: readonly Route[] = [
  {
    method: 'get',
    path: '/dossiers',
    allow: 'dossier.read',
    summary: 'Dossiers made and in hand, the head of the chain, the fingerprint of the signing key.',
    async handle({ context, who }) {
      const [jobs, head] = await context.db.inScope(who, async (tx) => [
        await backgroundJobsOf(tx, 'dossier', SHOWN),
        await tx.one(
          headRow,
          'SELECT sequence::text, hash FROM workshop_head WHERE workshop_id = current_workshop()',
        ),
      ]);
      const dossiers = jobs.map(({ id, state, step, done_parts, all_parts, made_at, result }) => {
        const made = dossierMade.safeParse(result);
        return { id, state, step, done_parts, all_parts, made_at, file: made.success ? made.data : null };
      });
      const key = createPublicKey(context.config.signing_key_pem)
        .export({ type: 'spki', format: 'pem' })
        .toString();
      return { body: { dossiers, head, key_id: keyIdOf(key) } };
    },
  },
  {
    method: 'post',
    path: '/dossiers',
    allow: 'dossier.make',
    summary: 'Asks for a dossier of the whole book.',
    async handle(call) {
      const { context, who } = call;
      const input = checkBody(makeBody, call.body);
      const id = await context.db.inScope(who, (tx) => enqueue(tx, 'dossier', input, who.person_id));
      securityEvent(call, 'export_asked', { job: id });
      return { status: 202, body: { id } };
    },
  },
  {
    method: 'get',
    path: '/dossiers/:id/file',
    allow: 'dossier.read',
    summary: 'The ZIP of a dossier.',
    async handle({ context, who, params, response }) {
      const job = await context.db.inScope(who, (tx) => backgroundJobById(tx, pathId(params['id'])));
      const made = dossierMade.safeParse(job.result);
      if (!made.success)
        throw new ProblemError(
          'not_found',
          'That dossier is not ready. Wait until it is, or ask for another.',
        );
      const file = await readDocument(context, made.data.document_id, who);
      context.log.info(
        { event: 'dossier_taken', person_id: who.person_id, workshop_id: who.workshop_id },
        'a dossier was taken out',
      );
      response.attachment(file.name).type('application/zip').send(Buffer.from(file.bytes_of));
      return null;
    },
  },
];
