/** What is entered about a lot that comes into the book, and the act that describes it. */
import type { Fineness } from '../alloy/fineness.ts';
import { fineness, isPossibleFineness } from '../alloy/fineness.ts';
import { codeLetter, describeLot } from '../book/describe-lot.ts';
import type { LotDescription } from '../book/describe-lot.ts';
import type { ActDraft, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { Lot, LotForm } from '../book/lot.ts';
import { BASES, LOT_FORMS, ORIGINS, PIECE_FORMS } from '../book/lot.ts';
import { Decimal } from '../decimal.ts';
import { id, permille, pieces, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';

const finenessField = permille.default(new Decimal(0));

/** Fields of a new lot, the same in every form that makes one by hand. */
export const newLotFields = {
  form: z.enum(LOT_FORMS, 'Choose the form of the metal.'),
  alloy: shortText.nullable().default(null),
  description: shortText,
  owner_id: id.nullable().default(null),
  origin: z.enum(ORIGINS, 'Choose where the metal comes from.').default('undeclared'),
  basis: z.enum(BASES, 'Say how the fineness is known.'),
  gold_permille: finenessField,
  silver_permille: finenessField,
  platinum_permille: finenessField,
  palladium_permille: finenessField,
  pieces: pieces.nullable().default(null),
};
export const newLotSchema = z.strictObject(newLotFields);
export type NewLotInput = z.output<typeof newLotSchema>;

/**
 * The fineness of a new lot. Refuses one whose metals add up to more than the whole, one that is given though the
 * basis says that nobody knows it, and a form that is only kept on metal accounts.
 */
export function newLotFineness(line: NewLotInput, field: string): Outcome<Fineness> {
  const given = {
    gold: line.gold_permille,
    silver: line.silver_permille,
    platinum: line.platinum_permille,
    palladium: line.palladium_permille,
  };
  const read = fineness(given);
  const at = `${field}.gold_permille`;
  if (!isPossibleFineness(read)) {
    const sentence = 'The metals add up to more than 1000 parts of 1000. Look at the certificate again.';
    return refuse({ code: 'impossible_fineness', field: at, sentence });
  }
  const isKnown = Object.values(given).some((value) => value.gt(0));
  if (line.basis === 'unknown' && isKnown) {
    const sentence =
      'A fineness is given, though its basis says unknown. Choose how it is known, or leave the fineness empty.';
    return refuse({ code: 'impossible_fineness', field: at, sentence });
  }
  if (line.form === 'account') {
    const sentence = 'Metal owed to the house is kept on a metal account. Choose another form.';
    return refuse({ code: 'invalid', field: `${field}.form`, sentence });
  }
  if (line.form === 'other_precious' && isKnown) {
    const sentence = 'Other precious metals are kept by gross. Leave the fineness empty.';
    return refuse({ code: 'impossible_fineness', field: at, sentence });
  }
  return accept(read);
}

/** Whether lots of a form are counted as well as weighed. */
export function isCounted(form: LotForm): boolean {
  return PIECE_FORMS.some((counted) => counted === form);
}

/** The pieces of a new lot. Refuses a count that is missing, and one for metal that is not kept by pieces. */
export function newLotPieces(line: NewLotInput, field: string): Outcome<bigint | null> {
  if (isCounted(line.form) === (line.pieces !== null)) return accept(line.pieces);
  const sentence =
    line.pieces === null
      ? 'Metal of this form is kept by pieces too. Count them.'
      : 'Metal of this form is not kept by pieces. Leave the count empty.';
  return refuse({ code: 'pieces_needed', field: `${field}.pieces`, sentence });
}

/** A lot ready to be described: its act, id and code. */
export interface OpenedLot {
  readonly act: ActDraft;
  readonly lot_id: string;
  readonly code: string;
}

/** Finenesses are described to a ten-thousandth of a per mille, rounded down so that they stay possible. */
const DESCRIBED_DECIMALS = 4;

/** Gives a lot an id and the next free code, and drafts the act that describes it. */
export function openLot(
  facts: Facts,
  business_date: string,
  lot: Omit<LotDescription, 'lot_id' | 'code'>,
): OpenedLot {
  const lot_id = facts.ids.id();
  const down = (value: Decimal) => value.toDecimalPlaces(DESCRIBED_DECIMALS, Decimal.ROUND_DOWN);
  const fineness = {
    gold: down(lot.fineness.gold),
    silver: down(lot.fineness.silver),
    platinum: down(lot.fineness.platinum),
    palladium: down(lot.fineness.palladium),
  };
  const code = facts.ids.lotCode(codeLetter(lot.form, lot.fineness));
  return {
    act: describeLot({ ...lot, fineness, lot_id, code }, facts.ids.id(), business_date),
    lot_id,
    code,
  };
}

/** The fineness described at a lot's opening, in per mille. */
export function describedFineness(lot: Lot): Fineness {
  return fineness({
    gold: lot.gold_permille,
    silver: lot.silver_permille,
    platinum: lot.platinum_permille,
    palladium: lot.palladium_permille,
  });
}
