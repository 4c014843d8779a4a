/** All that a job gave, each as a lot: unused, work and castings, scrap, filings. */
import type { Outcome } from '../../book/draft.ts';
import { accept } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import { addMass, massVector } from '../../mass/vector.ts';
import type { Found } from './out.ts';
import type { MadeLot, Making } from './lots-made.ts';
import { makeLot } from './lots-made.ts';
import type { WorkInput } from './schema.ts';
import type { Shares } from './shares.ts';
import type { Counter } from './weigh-back.ts';

export interface AllMade {
  readonly unused: readonly MadeLot[];
  readonly work: readonly MadeLot[];
  readonly scrap: readonly MadeLot[];
  readonly filings: readonly MadeLot[];
}

/** What the parts of a job are made from. */
interface Parts {
  readonly work: WorkInput;
  readonly found: Found;
  readonly shares: Shares;
  readonly making: Making;
  readonly field: string;
  readonly counter: Counter;
}

const NOTHING = massVector({});

/** Makes the lots of a job. Refuses a tray that is not like what goes into it. */
export function makeAll(parts: Parts): Outcome<AllMade> {
  const { work, shares, counter } = parts;
  const unused = work.unused.map(({ lot_id, pieces }, i) => ({
    records: [],
    entry: { account_id: counter.safe.id, lot_id, mass: shares.unused[i] ?? NOTHING, pieces },
  }));
  const all = allOf([madeLots(parts), scrapLots(parts), filingsLots(parts)]);
  if (!all.ok) return all;
  const [made = [], scrap = [], filings = []] = all.value;
  return accept({ unused, work: made, scrap, filings });
}

function madeLots({ work, found, shares, making, field, counter }: Parts): Outcome<readonly MadeLot[]> {
  return allOf(
    work.made.map(({ form, description, pieces }, i) => {
      const mass = shares.made[i] ?? NOTHING;
      const place = found.destinations[i] ?? counter.place;
      const part = { form, description, pieces, mass, place, into_lot_id: null, field: `${field}.made.${i}` };
      return makeLot(part, making);
    }),
  );
}

/** Scrap is of the lot that it was cut from, in alloy and owner too. */
function scrapLots({ work, found, shares, making, field, counter }: Parts): Outcome<readonly MadeLot[]> {
  return allOf(
    work.scrap.map(({ from_lot_id, into_lot_id }, i) => {
      const cut = found.lots.find(({ lot }) => lot.id === from_lot_id);
      const { alloy, owner_id } = cut?.lot ?? making;
      const part = {
        form: 'clean_scrap' as const,
        description: `${alloy ?? 'Mixed'} scrap`,
        mass: shares.scrap[i] ?? NOTHING,
        pieces: null,
        place: counter.safe,
        into_lot_id,
        field: `${field}.scrap.${i}.into_lot_id`,
      };
      return makeLot(part, { ...making, lots: cut === undefined ? making.lots : [cut], alloy, owner_id });
    }),
  );
}

function filingsLots({ work, shares, making, field, counter }: Parts): Outcome<readonly MadeLot[]> {
  return allOf(
    work.filings.map(({ into_lot_id }, i) => {
      const share = shares.filings[i] ?? { metal: NOTHING, dirt_ug: 0n };
      const part = {
        form: 'filings' as const,
        description: `${making.alloy ?? 'Mixed'} filings, ${counter.place.name}`,
        mass: addMass(share.metal, massVector({ gross: share.dirt_ug })),
        pieces: null,
        place: counter.safe,
        into_lot_id,
        field: `${field}.filings.${i}.into_lot_id`,
      };
      return makeLot(part, making);
    }),
  );
}
