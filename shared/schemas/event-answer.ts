/** What the server answers to an event: the records that were posted, or the request that waits for a signature. */
import { z } from './zod.ts';

export const eventAnswer = z.object({
  records: z.array(
    z.object({
      id: z.string(),
      kind: z.string(),
      sequence: z.string(),
      recorded_at: z.string(),
      hash: z.string(),
    }),
  ),
  /** Lots that were opened. */
  lots: z.array(z.object({ id: z.string(), code: z.string() })),
  /** Set where a second person has to sign first; then nothing is posted yet. */
  signature_request_id: z.string().nullable(),
});
export type EventAnswer = z.output<typeof eventAnswer>;
