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

/** Makes the lots of a job. Refuses a tray that is not like what goes into it. */
export function makeAll(
  work: WorkInput,
  found: Found,
  shares: Shares,
  making: Making,
  field: string,
  counter: Counter,
): Outcome<AllMade> {
  const { safe, place } = counter;
  const nothing = { pieces: null, into_lot_id: null };
  const unused = work.unused.map((line, i) => ({
    records: [],
    entry: {
      account_id: safe.id,
      lot_id: line.lot_id,
      mass: shares.unused[i] ?? massVector({}),
      pieces: line.pieces,
    },
  }));
  const made = allOf(
    work.made.map((line, i) =>
      makeLot(
        {
          ...nothing,
          form: line.form,
          description: line.description,
          pieces: line.pieces,
          mass: shares.made[i] ?? massVector({}),
          place: found.destinations[i] ?? place,
          field: `${field}.made.${i}`,
        },
        making,
      ),
    ),
  );
  const scrap = allOf(
    work.scrap.map((line, i) => {
      const cut = found.lots.find((out) => out.lot.id === line.from_lot_id);
      const from =
        cut === undefined
          ? making
          : { ...making, lots: [cut], owner_id: cut.lot.owner_id, alloy: cut.lot.alloy };
      const description = `${from.alloy ?? 'Mixed'} scrap`;
      return makeLot(
        {
          ...nothing,
          form: 'clean_scrap',
          description,
          mass: shares.scrap[i] ?? massVector({}),
          place: safe,
          into_lot_id: line.into_lot_id,
          field: `${field}.scrap.${i}.into_lot_id`,
        },
        from,
      );
    }),
  );
  const filings = allOf(
    work.filings.map((line, i) => {
      const share = shares.filings[i];
      const mass =
        share === undefined ? massVector({}) : addMass(share.metal, massVector({ gross: share.dirt_ug }));
      const description = `${making.alloy ?? 'Mixed'} filings, ${place.name}`;
      return makeLot(
        {
          ...nothing,
          form: 'filings',
          description,
          mass,
          place: safe,
          into_lot_id: line.into_lot_id,
          field: `${field}.filings.${i}.into_lot_id`,
        },
        making,
      );
    }),
  );
  const all = allOf([made, scrap, filings]);
  if (!all.ok) return all;
  const [m = [], s = [], f = []] = all.value;
  return accept({ unused, work: m, scrap: s, filings: f });
}
