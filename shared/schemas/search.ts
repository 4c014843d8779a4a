/** A hit of the scan field. */
import { z } from './zod.ts';

export const searchHit = z.object({
  what: z.enum(['lot', 'voucher', 'job', 'party']),
  id: z.string(),
  label: z.string(),
  words: z.string(),
});
export type SearchHit = z.output<typeof searchHit>;
