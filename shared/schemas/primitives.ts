/**
 * The values that every schema is made of. Each reads the strict form that stands in JSON; what a person types is
 * read by `shared/mass/typed-mass.ts` first. Refusals are sentences that can stand beside a field.
 */
import { Decimal } from '../decimal.ts';
import { parseGrams } from '../mass/micrograms.ts';
import { z } from './zod.ts';

/** An id of the program's own making. */
export const id = z.uuid('This does not name anything in the book. Choose it from the list.');

const grams = (signed: boolean) =>
  z
    .string('Enter the weight in grams.')
    .max(32, 'A weight has at most 20 figures.')
    .transform((text, context) => {
      const read = parseGrams(text, { signed });
      if (read.ok) return read.ug;
      context.addIssue({ code: 'custom', message: read.reason });
      return z.NEVER;
    });

/** Grams from nothing upwards, as a decimal string; micrograms inside. */
export const gramsOrNone = grams(false);

/** Grams, more than nothing. */
export const gramsAboveZero = grams(false).refine((ug) => ug > 0n, 'The weight is nothing. Weigh again.');

/** Grams with a sign, for corrections. */
export const gramsSigned = grams(true);

const decimal = (pattern: RegExp, sentence: string) =>
  z
    .string(sentence)
    .max(32, sentence)
    .regex(pattern, sentence)
    .transform((text) => new Decimal(text));

/** A fineness in per mille, at most four decimals. */
export const permille = decimal(/^\d{1,4}(\.\d{1,4})?$/, 'Fineness is a number from 0 to 1000.').refine(
  (value) => value.lte(1000),
  'Fineness is at most 1000. Look at the certificate again.',
);

/** A percentage from 0 to 100, at most four decimals. */
export const percent = decimal(/^\d{1,3}(\.\d{1,4})?$/, 'A percentage is a number from 0 to 100.').refine(
  (value) => value.lte(100),
  'A percentage is at most 100.',
);

/** An amount of money in the workshop's currency, at most six decimals (a price per ounce may need them). */
export const money = decimal(/^\d{1,12}(\.\d{1,6})?$/, 'An amount is a number such as 12.50.');

/** A count of pieces, at least one. */
export const pieces = z
  .string('Enter how many pieces.')
  .regex(/^[1-9]\d{0,6}$/, 'Pieces are counted in whole numbers from 1.')
  .transform((text) => BigInt(text));

/** A business date in the workshop's zone. */
export const businessDate = z.iso.date('Enter the date as year, month and day.');

/** A name or reference in one line, trimmed, in composed form, without control or invisible characters. */
export const shortText = z
  .string('Enter a few words.')
  .transform((text) => text.normalize('NFC').trim())
  .pipe(
    z
      .string()
      .min(1, 'Enter a few words.')
      .max(120, 'That is longer than 120 characters. Shorten it.')
      .regex(
        /^[^\p{Cc}\p{Cs}\u200B-\u200F\u202A-\u202E\u2060-\u2069\uFEFF]*$/u,
        'There is a character in it that can’t be seen. Type it again.',
      ),
  );

/** A reason or remark of several lines. */
export const longText = z
  .string('Enter a sentence.')
  .transform((text) => text.normalize('NFC').trim())
  .pipe(
    z
      .string()
      .min(1, 'Enter a sentence.')
      .max(2000, 'That is longer than 2000 characters. Shorten it.')
      .regex(
        /^[^\u0000-\u0008\u000B-\u001F\u007F\p{Cs}\u200B-\u200F\u202A-\u202E\u2060-\u2069\uFEFF]*$/u,
        'There is a character in it that can’t be seen. Type it again.',
      ),
  );

/** A remark that may be left out; an empty one counts as left out. */
export const optionalNote = z.union([z.literal('').transform(() => null), longText, z.null()]).default(null);

/** Files kept with a record, by id. */
export const documentIds = z.array(id).max(20, 'At most 20 files belong to one voucher.').default([]);

/** The five masses of an answer, as grams in text: for what is shown and not reckoned with. */
export const massFieldsOut = {
  gross_g: z.string(),
  gold_g: z.string(),
  silver_g: z.string(),
  platinum_g: z.string(),
  palladium_g: z.string(),
};
