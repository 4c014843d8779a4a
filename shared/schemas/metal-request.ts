/** A goldsmith's request for metal: what is asked for, and how it stands at the counter. */
import { LOT_FORMS } from '../book/lot.ts';
import { gramsAboveZero, id, optionalNote, shortText } from './primitives.ts';
import { z } from './zod.ts';

export const metalRequestBody = z.strictObject({
  place_id: id,
  alloy: shortText.nullable().default(null),
  form: z.enum(LOT_FORMS).nullable().default(null),
  mass_g: gramsAboveZero,
  job_id: id.nullable().default(null),
  note: optionalNote,
});
export type MetalRequestBody = z.output<typeof metalRequestBody>;

export const metalRequest = z.object({
  id: z.string(),
  person_id: z.string(),
  person_name: z.string(),
  place_id: z.string(),
  place_name: z.string(),
  alloy: z.string().nullable(),
  form: z.enum(LOT_FORMS).nullable(),
  mass_g: z.string(),
  job_id: z.string().nullable(),
  job_code: z.string().nullable(),
  note: z.string().nullable(),
  state: z.enum(['waiting', 'answered', 'declined', 'withdrawn']),
  made_at: z.string(),
});
export type MetalRequest = z.output<typeof metalRequest>;
