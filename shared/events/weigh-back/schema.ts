/** What is entered at a weigh-back: a place, for each job and operation what came back or was made, and what stays. */
import { id, longText, permille, pieces, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import { weighingSchema } from '../../weighing/weighing.ts';
import { commonFields } from '../common-fields.ts';

const FEW = 'At most 30 lines belong to one job. Weigh some together.';

const unusedSchema = z.strictObject({
  lot_id: id,
  weighing: weighingSchema,
  /** For lots that are counted too: how many came back. */
  pieces: pieces.nullable().default(null),
});

const scrapSchema = z.strictObject({
  weighing: weighingSchema,
  /** The lot that it was cut from; none where that can't be said (then it takes the content of the blend). */
  from_lot_id: id.nullable().default(null),
  /** An open tray that it joins. */
  into_lot_id: id.nullable().default(null),
});

const filingsSchema = z.strictObject({
  weighing: weighingSchema,
  /** Share of their gross that is metal; none takes the workshop's estimate. */
  metal_permille: permille.nullable().default(null),
  into_lot_id: id.nullable().default(null),
});

const madeSchema = z.strictObject({
  form: z.enum(['work', 'finished_work', 'casting', 'tree_scrap']),
  description: shortText,
  weighing: weighingSchema,
  pieces: pieces.nullable().default(null),
  /** Where it goes: none keeps it at the place; else a safe or the next work place. */
  to_id: id.nullable().default(null),
});

/** Stock that the place keeps for several jobs (solder, wire, findings), weighed: what it is lighter by went in here. */
const keptSchema = z.strictObject({ lot_id: id, weighing: weighingSchema });

const workSchema = z.strictObject({
  job_id: id.nullable().default(null),
  operation: shortText,
  /** The lots that are reckoned together; none takes all that the place holds for the job. */
  lot_ids: z.array(id).min(1).max(50).nullable().default(null),
  unused: z.array(unusedSchema).max(30, FEW).default([]),
  scrap: z.array(scrapSchema).max(30, FEW).default([]),
  filings: z.array(filingsSchema).max(5, FEW).default([]),
  made: z.array(madeSchema).max(30, FEW).default([]),
  kept: z.array(keptSchema).max(30, FEW).default([]),
  /** Why more came back than went out, where it did. */
  reason: longText.nullable().default(null),
});

/** What stays at the place for the night: weighed, or in a sealed box or locked drawer that is named. */
const overnightSchema = z.discriminatedUnion('how', [
  z.strictObject({
    how: z.literal('weighed'),
    description: shortText,
    weighing: weighingSchema,
    pieces: pieces.nullable().default(null),
  }),
  z.strictObject({
    how: z.enum(['sealed_box', 'locked_drawer']),
    description: shortText,
    pieces: pieces.nullable().default(null),
  }),
]);

const fields = z.strictObject({
  ...commonFields,
  place_id: id,
  safe_id: id,
  overnight: z
    .array(overnightSchema)
    .max(30, 'At most 30 lines stay for a night. Weigh some together.')
    .default([]),
  works: z
    .array(workSchema)
    .max(20, 'At most 20 jobs go into one weigh-back. Post the rest in another.')
    .default([]),
  /** The goldsmith's PIN, given at the counter beside the same figures; checked by the server, kept nowhere. */
  pin: z
    .string()
    .regex(/^\d{4,8}$/, 'A PIN has 4 to 8 figures.')
    .nullable()
    .default(null),
});

export const weighBackSchema = fields.refine((input) => input.works.length + input.overnight.length > 0, {
  path: ['works'],
  error: 'Nothing is weighed yet. Choose the job that comes back, or name what stays for the night.',
});

export type WeighBackInput = z.output<typeof weighBackSchema>;
export type WorkInput = WeighBackInput['works'][number];
