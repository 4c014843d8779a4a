/**
 * Sweep-up: a bin's dust becomes a lot with an estimated content. The estimate is each feeding operation's loss since
 * the bin was last swept up, times the bin's rate, never the loss account's balance (which would feed on its own
 * error). The metal comes from the loss accounts in the sweeps' name, the dust's gross from foreign matter.
 */
import { finenessOf, fineness } from '../../alloy/fineness.ts';
import type { EntryDraft, Outcome } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { BinFeed, Facts, UnsweptLoss } from '../../book/facts.ts';
import { Decimal } from '../../decimal.ts';
import { apportion } from '../../mass/apportion.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import type { MassVector, Metal } from '../../mass/vector.ts';
import { METALS, fineTotal, massToJson, massVector, negateMass, sumMass } from '../../mass/vector.ts';
import { id, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import { netOf, weighingSchema } from '../../weighing/weighing.ts';
import { commonFields, readCommon } from '../common-fields.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { findPlace, lossAccount, theAccount } from '../lookup.ts';
import { makeVoucher, weighingRows } from '../make-voucher.ts';
import { openLot } from '../new-lot.ts';

const schema = z.strictObject({
  ...commonFields,
  bin_id: id,
  /** Where the container stands from now on; none leaves it at the bin. */
  to_id: id.nullable().default(null),
  form: z.enum(['sweeps', 'polishings', 'sludge']).default('sweeps'),
  /** Words on the container: "Floor, drum 3". */
  container: shortText,
  weighing: weighingSchema,
});
export type SweepUpInput = z.output<typeof schema>;

/** What one operation gives to a bin's estimate. */
export interface SweepShare {
  readonly operation: string;
  readonly bench_id: string | null;
  readonly metal: MassVector;
}

/** The expected content by operation, cut down in proportion where it would be heavier than the container. */
export function sweepEstimate(
  feeds: readonly BinFeed[],
  unswept: readonly UnsweptLoss[],
  net: Micrograms,
): readonly SweepShare[] {
  const shares = feeds.flatMap((feed) => {
    const loss = unswept.find(
      (row) =>
        row.bin_id === feed.bin_id && row.operation === feed.operation && row.bench_id === feed.bench_id,
    );
    if (loss === undefined) return [];
    const of = (metal: Metal) => expected(loss.loss[metal], feed.rate_percent[metal]);
    const metals = {
      gold: of('gold'),
      silver: of('silver'),
      platinum: of('platinum'),
      palladium: of('palladium'),
    };
    const metal = massVector({ ...metals, gross: METALS.reduce((sum, key) => sum + metals[key], 0n) });
    return metal.gross === 0n ? [] : [{ operation: feed.operation, bench_id: feed.bench_id, metal }];
  });
  const total = sumMass(shares.map(({ metal }) => metal)).gross;
  return total <= net ? shares : cutDown(shares, net);
}

function expected(loss: Micrograms, percent: Decimal): Micrograms {
  return loss <= 0n ? 0n : BigInt(new Decimal(loss.toString()).times(percent).div(100).toFixed(0));
}

function cutDown(shares: readonly SweepShare[], net: Micrograms): readonly SweepShare[] {
  const cells = apportion(
    net,
    shares.flatMap(({ metal }) => METALS.map((key) => metal[key])),
  );
  return shares.map((share, index) => {
    const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = cells.slice(
      index * METALS.length,
      (index + 1) * METALS.length,
    );
    return {
      ...share,
      metal: massVector({ gross: gold + silver + platinum + palladium, gold, silver, platinum, palladium }),
    };
  });
}

export const sweepUp: EventDefinition<SweepUpInput> = {
  name: 'sweep-up',
  schema,
  action: 'book.sweep_up',
  summary: 'Sweeps up a bin: its dust becomes a lot with an estimated content.',
  needs: (input) => ({
    account_ids: input.to_id === null ? [input.bin_id] : [input.bin_id, input.to_id],
    bin_ids: [input.bin_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const bin = findPlace(facts, input.bin_id, 'bin_id', {
      of: ['bin'],
      sentence: 'only a bin is swept up.',
    });
    if (!bin.ok) return bin;
    const to =
      input.to_id === null
        ? bin
        : findPlace(facts, input.to_id, 'to_id', {
            of: ['safe', 'bin'],
            sentence: 'a container of sweeps stands in a safe or at a bin.',
          });
    if (!to.ok) return to;
    const net = netOf(input.weighing, 'weighing');
    if (!net.ok) return net;
    const feeds = facts.bin_feeds.filter((feed) => feed.bin_id === input.bin_id);
    if (feeds.length === 0) {
      const sentence = `${bin.value.name} names no operation that feeds it, so its content can’t be estimated. Set its rates under Workshop, allowances.`;
      return refuse({ code: 'invalid', field: 'bin_id', sentence });
    }
    const shares = sweepEstimate(feeds, facts.unswept, net.value);
    const metal = sumMass(shares.map((share) => share.metal));
    const mass = { ...metal, gross: net.value };
    const opened = openLot(facts, common.value.business_date, {
      form: input.form,
      alloy: null,
      owner_id: null,
      origin: 'recycled',
      fineness: finenessOf(mass) ?? fineness({}),
      basis: 'estimated',
      description: input.container,
      hold_reason: null,
      hold_until: null,
      parents: [],
    });
    const fromLoss = lossEntries(shares, opened.lot_id, facts);
    if (!fromLoss.ok) return fromLoss;
    const dirt = massVector({ gross: fineTotal(metal) - net.value });
    const voucher = makeVoucher(facts, common.value, {
      kind: 'sweep_up',
      detail: {
        bin_id: input.bin_id,
        lot_id: opened.lot_id,
        container: input.container,
        shares: shares.map((share) => ({
          operation: share.operation,
          bench_id: share.bench_id,
          ...massToJson(share.metal),
        })),
        weighings: weighingRows([{ weighing: input.weighing, line: 1 }], facts, actor),
      },
      entries: [
        { account_id: to.value.id, lot_id: opened.lot_id, mass, pieces: null },
        ...fromLoss.value,
        {
          account_id: theAccount(facts, 'foreign_matter').id,
          lot_id: opened.lot_id,
          mass: dirt,
          pieces: null,
        },
      ],
    });
    return accept(recordsOnly([opened.act, voucher]));
  },
};

function lossEntries(
  shares: readonly SweepShare[],
  lot_id: string,
  facts: Facts,
): Outcome<readonly EntryDraft[]> {
  const entries: EntryDraft[] = [];
  for (const share of shares) {
    const account = lossAccount(facts, share.operation, 'bin_id');
    if (!account.ok) return account;
    entries.push({ account_id: account.value.id, lot_id, mass: negateMass(share.metal), pieces: null });
  }
  return accept(entries);
}
