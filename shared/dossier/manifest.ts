/** The manifest of a dossier: what it is, which files belong to it, where the chain stands, who signed. */
import { z } from '../schemas/zod.ts';

export const DOSSIER_FORMAT = 'grainward-dossier';
export const DOSSIER_VERSION = '1';

const hash = z.string().regex(/^[0-9a-f]{64}$/);
const sequence = z.string().regex(/^\d+$/);

export const manifestSchema = z.strictObject({
  format: z.literal(DOSSIER_FORMAT),
  version: z.literal(DOSSIER_VERSION),
  workshop: z.strictObject({ id: z.string(), name: z.string() }),
  as_of: z.string(),
  generated_at: z.string(),
  generated_by: z.string(),
  software: z.string(),
  chain: z.strictObject({ sequence, hash }),
  /** The heads of dossiers made before, and for whom. They prove nothing by themselves. */
  earlier_heads: z.array(z.strictObject({ sequence, hash, at: z.string(), to: z.string() })),
  /** SHA-256 of the public key's DER. */
  key_id: hash,
  files: z.array(
    z.strictObject({ path: z.string(), bytes: sequence, rows: sequence.nullable(), sha256: hash }),
  ),
});
export type Manifest = z.output<typeof manifestSchema>;
