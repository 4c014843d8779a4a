/** What a line of a voucher should have said: its right gross, and the metals where they were wrong too. */
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { RecordedEntry } from '../book/facts.ts';
import { apportion } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import type { MassVector } from '../mass/vector.ts';
import { METALS, ZERO_MASS, fineTotal, isPossibleMass, negateMass } from '../mass/vector.ts';
import { gramsSigned } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';

export const rightLineFields = {
  /** Line of the voucher: 1, 2, 3 … */
  line: z.string().regex(/^[1-9]\d{0,5}$/, 'Choose one of the voucher’s lines.'),
  /** Right gross with its sign: below zero where metal left. */
  gross_g: gramsSigned,
  /** Right metals. All left out, they keep their proportion to gross; where one is given, those left out are none. */
  gold_g: gramsSigned.nullable().default(null),
  silver_g: gramsSigned.nullable().default(null),
  platinum_g: gramsSigned.nullable().default(null),
  palladium_g: gramsSigned.nullable().default(null),
  /** Right count with its sign, for lots that are counted. */
  pieces: z
    .string()
    .regex(/^-?\d{1,7}$/, 'Pieces are counted in whole numbers.')
    .transform((text) => BigInt(text))
    .nullable()
    .default(null),
};
export const rightLineSchema = z.strictObject(rightLineFields);
export type RightLine = z.output<typeof rightLineSchema>;

/**
 * The right masses of a line. Without metals they keep the proportion that the line has. Refuses masses that no
 * metal can have, and a line without gross whose metals are not named.
 */
export function rightMass(line: RightLine, booked: RecordedEntry, field: string): Outcome<MassVector> {
  const given = METALS.some((metal) => line[`${metal}_g`] !== null);
  if (!given) return inProportion(line.gross_g, booked, field);
  const mass: MassVector = {
    gross: line.gross_g,
    gold: line.gold_g ?? 0n,
    silver: line.silver_g ?? 0n,
    platinum: line.platinum_g ?? 0n,
    palladium: line.palladium_g ?? 0n,
  };
  if (isPossibleMass(mass) || isPossibleMass(negateMass(mass))) return accept(mass);
  const sentence =
    'No metal can have these masses: more fine than gross, or signs that differ. Look at them again.';
  return refuse({ code: 'impossible_fineness', field: `${field}.gold_g`, sentence });
}

function inProportion(gross: Micrograms, booked: RecordedEntry, field: string): Outcome<MassVector> {
  if (gross === 0n) return accept(ZERO_MASS);
  const before = booked.mass.gross < 0n ? negateMass(booked.mass) : booked.mass;
  if (before.gross === 0n || !isPossibleMass(before)) {
    const sentence = 'This line has no proportion of fine metal to gross. Enter its metals too.';
    return refuse({ code: 'invalid', field: `${field}.gold_g`, sentence });
  }
  const size = gross < 0n ? -gross : gross;
  const metals = METALS.map((metal) => before[metal]);
  const rest = before.gross - fineTotal(before);
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(size, [...metals, rest]);
  const mass = { gross: size, gold, silver, platinum, palladium };
  return accept(gross < 0n ? negateMass(mass) : mass);
}

/** The right count of a line, or none for metal that is not counted. Refuses a count where none is kept. */
export function rightPieces(line: RightLine, booked: RecordedEntry, field: string): Outcome<bigint | null> {
  if (line.pieces === null || booked.pieces !== null) return accept(line.pieces ?? booked.pieces);
  const sentence = 'This line is not kept by pieces. Leave the count empty.';
  return refuse({ code: 'pieces_needed', field: `${field}.pieces`, sentence });
}
