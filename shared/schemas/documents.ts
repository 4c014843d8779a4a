/** Files kept with vouchers: invoices, certificates, photos, statements. */
import { z } from './zod.ts';

/** What may be handed in, told by its content and not by its name. */
export const MEDIA_TYPES = ['application/pdf', 'image/png', 'image/jpeg', 'image/webp', 'text/csv'] as const;
export type MediaType = (typeof MEDIA_TYPES)[number];

/** One file has at most 10 MB; a workshop keeps at most 2 GB. */
export const MOST_BYTES = 10_000_000;
export const MOST_BYTES_OF_WORKSHOP = 2_000_000_000;

export const documentJson = z.object({
  id: z.string(),
  name: z.string(),
  media_type: z.string(),
  bytes: z.string(),
  sha256: z.string(),
});
export type DocumentJson = z.output<typeof documentJson>;
