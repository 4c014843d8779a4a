/** Long work in the queue: what it is, how far it is, what came of it. */
import { z } from './zod.ts';

export const backgroundJobKind = z.enum(['dossier']);
export type BackgroundJobKind = z.output<typeof backgroundJobKind>;

export const backgroundJob = z.object({
  id: z.string(),
  kind: backgroundJobKind,
  input: z.unknown(),
  state: z.enum(['queued', 'running', 'done', 'failed']),
  step: z.string(),
  done_parts: z.number(),
  all_parts: z.number(),
  result: z.unknown(),
  made_by: z.string(),
  made_at: z.string(),
});
export type BackgroundJob = z.output<typeof backgroundJob>;
