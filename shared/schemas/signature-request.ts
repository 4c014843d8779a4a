/** An act that waits for a second signature: what would be posted, why it needs two people, who asked. */
import { longText, massFieldsOut } from './primitives.ts';
import { z } from './zod.ts';

const previewEntry = z.object({
  account_id: z.string(),
  lot_id: z.string(),
  ...massFieldsOut,
  pieces: z.string().nullable(),
});

/** The records that would be posted, as they were drafted when the signature was asked for. */
export const draftPreview = z.array(
  z.object({
    kind: z.string(),
    business_date: z.string(),
    note: z.string().nullable(),
    detail: z.record(z.string(), z.unknown()),
    entries: z.array(previewEntry),
  }),
);
export type DraftPreview = z.output<typeof draftPreview>;

export const signatureRequest = z.object({
  id: z.string(),
  event: z.string(),
  input: z.unknown(),
  preview: draftPreview,
  reason: z.string(),
  requested_by: z.string(),
  requested_by_name: z.string(),
  requested_at: z.string(),
  state: z.enum(['waiting', 'approved', 'refused', 'withdrawn']),
  decided_by: z.string().nullable(),
  decision_note: z.string().nullable(),
});
export type SignatureRequest = z.output<typeof signatureRequest>;

export const refuseSignatureBody = z.strictObject({ note: longText });
