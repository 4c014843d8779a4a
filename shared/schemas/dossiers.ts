/** What is known of a dossier that was made: where its file is kept, its size and digest, the head that it ends at. */
import { z } from './zod.ts';

export const dossierMade = z.object({
  document_id: z.string(),
  bytes: z.string(),
  sha256: z.string(),
  sequence: z.string(),
  hash: z.string(),
});
export type DossierMadeJson = z.output<typeof dossierMade>;
