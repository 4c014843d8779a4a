/** What the check of the whole book found: nothing, or each fault with the voucher that it is in. */
import { z } from './zod.ts';

export const BOOK_CHECKS = ['chain', 'line', 'entries', 'sum', 'balance', 'register'] as const;

export const bookFault = z.object({
  check: z.enum(BOOK_CHECKS),
  /** The record at fault; null where no record is. */
  sequence: z.string().nullable(),
  kind: z.string().nullable(),
  sentence: z.string(),
});
export type BookFault = z.output<typeof bookFault>;

export const bookCheck = z.object({
  sequence: z.string(),
  hash: z.string(),
  /** How many records, entries and balances were recomputed. */
  records: z.number(),
  entries: z.number(),
  balances: z.number(),
  sound: z.boolean(),
  /** The first of them, at most as many as `MOST_FAULTS`. */
  faults: z.array(bookFault),
});
export type BookCheck = z.output<typeof bookCheck>;

export const MOST_FAULTS = 100;
