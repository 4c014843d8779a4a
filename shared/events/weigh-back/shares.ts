/**
 * How what was out is shared over what came back (DESIGN section 3, weigh-back): unused keeps its lot; scrap takes the
 * content of the lot that it was cut from; the blend is the rest; of filings an estimated share is metal of the blend;
 * what then remains is shared by gross between work and working loss.
 */
import type { Outcome } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { Decimal } from '../../decimal.ts';
import { apportion, splitVector, takeGross } from '../../mass/apportion.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import { printGrams } from '../../mass/micrograms.ts';
import type { MassVector } from '../../mass/vector.ts';
import {
  METALS,
  ZERO_MASS,
  addMass,
  fineTotal,
  isZeroMass,
  massVector,
  negateMass,
  subtractMass,
  sumMass,
} from '../../mass/vector.ts';
import type { OutLot } from './out.ts';

/** Net weights of one job, in micrograms. */
export interface Weighed {
  readonly unused: readonly { readonly lot_id: string; readonly net: Micrograms; readonly field: string }[];
  readonly scrap: readonly {
    readonly from_lot_id: string | null;
    readonly net: Micrograms;
    readonly field: string;
  }[];
  readonly filings: readonly {
    readonly net: Micrograms;
    readonly metal_permille: Decimal;
    readonly field: string;
  }[];
  readonly made: readonly { readonly net: Micrograms }[];
}

export interface Shares {
  readonly unused: readonly MassVector[];
  readonly scrap: readonly MassVector[];
  /** Metal of the blend in the filings; the dirt beside it is gross only. */
  readonly filings: readonly { readonly metal: MassVector; readonly dirt_ug: Micrograms }[];
  readonly made: readonly MassVector[];
  /** Below nothing where more came back than went out. */
  readonly loss: MassVector;
  readonly blend: MassVector;
  /** What is left in each out-lot for the blend, in the order of the out-lots. */
  readonly consumed: readonly MassVector[];
}

/** Shares a job out. Refuses parts that are heavier than the lot or the blend that they come from. */
export function shareOut(lots: readonly OutLot[], weighed: Weighed): Outcome<Shares> {
  const left = new Map(lots.map(({ lot, mass }) => [lot.id, mass]));
  const unused = takeFromLots(
    left,
    lots,
    weighed.unused.map((line) => ({ ...line, from_lot_id: line.lot_id })),
  );
  if (!unused.ok) return unused;
  const cut = weighed.scrap.filter((line) => line.from_lot_id !== null);
  const scrapOfLots = takeFromLots(left, lots, cut);
  if (!scrapOfLots.ok) return scrapOfLots;
  const consumed = lots.map(({ lot }) => left.get(lot.id) ?? ZERO_MASS);
  const blend = sumMass(consumed);
  const fromBlend = takeFromBlend(blend, weighed);
  if (!fromBlend.ok) return fromBlend;
  const { scrapOfBlend, filings, rest } = fromBlend.value;
  const last = shareRest(
    rest,
    blend,
    weighed.made.map(({ net }) => net),
  );
  if (!last.ok) return last;
  const ofLots = scrapOfLots.value.values();
  const ofBlend = scrapOfBlend.values();
  const scrap = weighed.scrap.map(
    (line) => (line.from_lot_id === null ? ofBlend : ofLots).next().value ?? ZERO_MASS,
  );
  return accept({ unused: unused.value, scrap, filings, ...last.value, blend, consumed });
}

type FromLot = { readonly from_lot_id: string | null; readonly net: Micrograms; readonly field: string };

function takeFromLots(
  left: Map<string, MassVector>,
  lots: readonly OutLot[],
  lines: readonly FromLot[],
): Outcome<readonly MassVector[]> {
  const taken: MassVector[] = [];
  for (const { from_lot_id, net, field } of lines) {
    const rest = left.get(from_lot_id ?? '');
    const lot = lots.find((out) => out.lot.id === from_lot_id)?.lot;
    if (rest === undefined || lot === undefined) {
      const sentence = 'That lot was not out for this job. Choose one of the lots at the left.';
      return refuse({ code: 'invalid', field, sentence });
    }
    if (net > rest.gross) {
      const sentence = `Of ${lot.code} ${printGrams(rest.gross, 3)} g is left to come back, and ${printGrams(net, 3)} g is entered. Weigh again, or say that it is of another lot.`;
      return refuse({ code: 'not_enough', field, sentence });
    }
    const part = takeGross(rest, net);
    left.set(lot.id, subtractMass(rest, part));
    taken.push(part);
  }
  return accept(taken);
}

interface FromBlend {
  readonly scrapOfBlend: readonly MassVector[];
  readonly filings: readonly { readonly metal: MassVector; readonly dirt_ug: Micrograms }[];
  readonly rest: MassVector;
}

function takeFromBlend(blend: MassVector, weighed: Weighed): Outcome<FromBlend> {
  let rest = blend;
  const take = (gross: Micrograms, field: string): Outcome<MassVector> => {
    if (gross > rest.gross) {
      const sentence = `Only ${printGrams(rest.gross, 3)} g is left after what is unused. Weigh scrap and filings again.`;
      return refuse({ code: 'not_enough', field, sentence });
    }
    const part = takeGross(rest, gross);
    rest = subtractMass(rest, part);
    return accept(part);
  };
  const scrapOfBlend: MassVector[] = [];
  for (const { net, field } of weighed.scrap.filter((line) => line.from_lot_id === null)) {
    const part = take(net, field);
    if (!part.ok) return part;
    scrapOfBlend.push(part.value);
  }
  const filings: { metal: MassVector; dirt_ug: Micrograms }[] = [];
  for (const { net, metal_permille, field } of weighed.filings) {
    const metalGross = BigInt(new Decimal(net.toString()).times(metal_permille).div(1000).toFixed(0));
    const metal = take(metalGross, field);
    if (!metal.ok) return metal;
    filings.push({ metal: metal.value, dirt_ug: net - metalGross });
  }
  return accept({ scrapOfBlend, filings, rest });
}

/** Shares what remains between work and loss; where more came back, the surplus has the content of the rest. */
function shareRest(
  rest: MassVector,
  blend: MassVector,
  nets: readonly Micrograms[],
): Outcome<Pick<Shares, 'made' | 'loss'>> {
  const back = nets.reduce((sum, net) => sum + net, 0n);
  const surplus = back - rest.gross;
  if (surplus <= 0n) {
    const parts = splitVector(rest, [...nets, -surplus]);
    return accept({ made: parts.slice(0, -1), loss: parts.at(-1) ?? ZERO_MASS });
  }
  const like = isZeroMass(rest) ? blend : rest;
  if (like.gross === 0n) {
    const sentence =
      'Everything that was out came back unused or as scrap, so nothing can have been made of it. Weigh again.';
    return refuse({ code: 'not_enough', field: 'made', sentence });
  }
  const more = moreOf(like, surplus);
  return accept({ made: splitVector(addMass(rest, more), nets), loss: negateMass(more) });
}

function moreOf(like: MassVector, gross: Micrograms): MassVector {
  const weights = [...METALS.map((metal) => like[metal]), like.gross - fineTotal(like)];
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(gross, weights);
  return massVector({ gross, gold, silver, platinum, palladium });
}
