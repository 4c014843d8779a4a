/**
 * How what was out is shared over what came back (DESIGN section 3, weigh-back): unused keeps its lot; scrap takes the
 * content of the lot that it was cut from; the blend is the rest; of filings an estimated share is metal of the blend;
 * what then remains is shared by gross between work and working loss. What weighs more than was left for it is loss
 * below nothing, with the content of where it came from.
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

/** How much more than was out may come back: any with a reason, else what the weighings may be off. */
export interface Slack {
  readonly limit_ug: Micrograms;
  readonly reasoned: boolean;
}

export interface Shares {
  readonly unused: readonly MassVector[];
  readonly scrap: readonly MassVector[];
  /** Metal of the blend in the filings; the dirt beside it is gross only. */
  readonly filings: readonly { readonly metal: MassVector; readonly dirt_ug: Micrograms }[];
  readonly made: readonly MassVector[];
  /** Loss of the blend: below nothing where more came back than went out. */
  readonly loss: MassVector;
  /** What unused and scrap weigh more than the lot that they are of. */
  readonly more: readonly { readonly lot_id: string; readonly mass: MassVector }[];
  readonly blend: MassVector;
  /** What is left in each out-lot for the blend, in the order of the out-lots. */
  readonly consumed: readonly MassVector[];
}

/** Shares a job out. Refuses parts that are heavier than the lot or the blend that they come from, beyond the slack. */
export function shareOut(lots: readonly OutLot[], weighed: Weighed, slack: Slack): Outcome<Shares> {
  const ofLots = new LotsLeft(lots, slack);
  const unused = ofLots.takeEach(weighed.unused.map((line) => ({ ...line, from_lot_id: line.lot_id })));
  if (!unused.ok) return unused;
  const cut = ofLots.takeEach(weighed.scrap.filter((line) => line.from_lot_id !== null));
  if (!cut.ok) return cut;
  const consumed = ofLots.rest();
  const blend = sumMass(consumed);
  const fromBlend = takeFromBlend(blend, weighed, slack);
  if (!fromBlend.ok) return fromBlend;
  const { scrapOfBlend, filings, rest } = fromBlend.value;
  const nets = weighed.made.map(({ net }) => net);
  const last = shareRest(rest, blend, nets);
  if (!last.ok) return last;
  const cutParts = cut.value.values();
  const blendParts = scrapOfBlend.values();
  const scrap = weighed.scrap.map(
    (line) => (line.from_lot_id === null ? blendParts : cutParts).next().value ?? ZERO_MASS,
  );
  const loss = subtractMass(last.value.loss, fromBlend.value.more);
  const { made } = last.value;
  return accept({ unused: unused.value, scrap, filings, made, loss, more: ofLots.more, blend, consumed });
}

type FromLot = { readonly from_lot_id: string | null; readonly net: Micrograms; readonly field: string };

/** What is left of each lot while unused and scrap are taken off it. */
class LotsLeft {
  readonly more: { lot_id: string; mass: MassVector }[] = [];
  readonly #lots: readonly OutLot[];
  readonly #slack: Slack;
  readonly #left: Map<string, MassVector>;

  constructor(lots: readonly OutLot[], slack: Slack) {
    this.#lots = lots;
    this.#slack = slack;
    this.#left = new Map(lots.map(({ lot, mass }) => [lot.id, mass]));
  }

  rest(): readonly MassVector[] {
    return this.#lots.map(({ lot }) => this.#left.get(lot.id) ?? ZERO_MASS);
  }

  takeEach(lines: readonly FromLot[]): Outcome<readonly MassVector[]> {
    const taken: MassVector[] = [];
    for (const line of lines) {
      const part = this.#take(line);
      if (!part.ok) return part;
      taken.push(part.value);
    }
    return accept(taken);
  }

  #take({ from_lot_id, net, field }: FromLot): Outcome<MassVector> {
    const out = this.#lots.find(({ lot }) => lot.id === from_lot_id);
    if (out === undefined) {
      const sentence = 'That lot was not out for this job. Choose one of the lots at the left.';
      return refuse({ code: 'invalid', field, sentence });
    }
    const rest = this.#left.get(out.lot.id) ?? ZERO_MASS;
    const surplus = net - rest.gross;
    if (surplus <= 0n) {
      const part = takeGross(rest, net);
      this.#left.set(out.lot.id, subtractMass(rest, part));
      return accept(part);
    }
    if (isTooMuch(surplus, this.#slack)) {
      const sentence = `Of ${out.lot.code} ${printGrams(rest.gross, 3)} g is left to come back, and ${printGrams(net, 3)} g is entered. Weigh again, say that it is of another lot, or give a reason and a second signature.`;
      return refuse({ code: 'more_back', field, sentence });
    }
    const mass = moreOf(out.mass, surplus);
    this.more.push({ lot_id: out.lot.id, mass });
    this.#left.set(out.lot.id, ZERO_MASS);
    return accept(addMass(rest, mass));
  }
}

function isTooMuch(surplus: Micrograms, slack: Slack): boolean {
  return surplus > slack.limit_ug && !slack.reasoned;
}

interface FromBlend {
  readonly scrapOfBlend: readonly MassVector[];
  readonly filings: readonly { readonly metal: MassVector; readonly dirt_ug: Micrograms }[];
  readonly rest: MassVector;
  readonly more: MassVector;
}

function takeFromBlend(blend: MassVector, weighed: Weighed, slack: Slack): Outcome<FromBlend> {
  let rest = blend;
  let more = ZERO_MASS;
  const take = (gross: Micrograms, field: string): Outcome<MassVector> => {
    const surplus = gross - rest.gross;
    if (surplus > 0n && (blend.gross === 0n || isTooMuch(surplus, slack))) {
      const sentence = `Only ${printGrams(rest.gross, 3)} g is left after what is unused. Weigh scrap and filings again, or give a reason and a second signature.`;
      return refuse({ code: 'more_back', field, sentence });
    }
    if (surplus > 0n) {
      const beyond = moreOf(blend, surplus);
      const all = addMass(rest, beyond);
      more = addMass(more, beyond);
      rest = ZERO_MASS;
      return accept(all);
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
  return accept({ scrapOfBlend, filings, rest, more });
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
    return refuse({ code: 'more_back', field: 'made', sentence });
  }
  const more = moreOf(like, surplus);
  return accept({ made: splitVector(addMass(rest, more), nets), loss: negateMass(more) });
}

function moreOf(like: MassVector, gross: Micrograms): MassVector {
  const weights = [...METALS.map((metal) => like[metal]), like.gross - fineTotal(like)];
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(gross, weights);
  return massVector({ gross, gold, silver, platinum, palladium });
}
