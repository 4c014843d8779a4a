/** A consignment as far as it has come: what was sent, what arrived, what its outturns credited, what is where now. */
import type { Account } from '../../../shared/book/account.ts';
import type { Facts, RecordedVoucher } from '../../../shared/book/facts.ts';
import type { Holding } from '../../../shared/book/holding.ts';
import type { Lot } from '../../../shared/book/lot.ts';
import type { MassVector } from '../../../shared/mass/vector.ts';
import { sumMass } from '../../../shared/mass/vector.ts';
import { z } from '../../../shared/schemas/zod.ts';
import { useFacts } from '../../queries/facts.ts';
import { useVoucher } from '../../queries/vouchers.ts';

const consignDetail = z.object({
  code: z.string(),
  courier_id: z.string(),
  destination_id: z.string(),
  declared_value: z.string().nullable().default(null),
  packages: z.array(z.object({ seal: z.string(), content: z.string() })).default([]),
});

const outturnRow = z.object({
  lot_id: z.string(),
  metal: z.enum(['gold', 'silver', 'platinum', 'palladium']),
  sent_g: z.string(),
  weighing_difference_g: z.string(),
  assayed_g: z.string(),
  assay_difference_g: z.string(),
  deduction_g: z.string(),
  charge_g: z.string(),
  credited_g: z.string(),
  after_melt_g: z.string().nullable(),
});
export type OutturnRow = z.output<typeof outturnRow>;

const outturnDetail = z.object({ statement: z.string(), stage: z.string(), lines: z.array(outturnRow) });
export type OutturnDetail = z.output<typeof outturnDetail>;

/** The rows of an outturn, recorded or drafted; none where it is not whole. */
export function readOutturn(detail: unknown): OutturnDetail | null {
  const read = outturnDetail.safeParse(detail);
  return read.success ? read.data : null;
}

export interface HeldLot extends Holding {
  readonly lot: Lot;
}

export interface Consignment extends z.output<typeof consignDetail> {
  readonly id: string;
  readonly sequence: string;
  readonly sent_on: string;
  readonly reversed: boolean;
  readonly sent: MassVector;
  readonly lots: readonly Lot[];
  readonly courier: Account | undefined;
  readonly destination: Account | undefined;
  readonly on_the_way: readonly HeldLot[];
  readonly at_destination: readonly HeldLot[];
  /** Null until anything has arrived. */
  readonly arrived_on: string | null;
  readonly arrived: MassVector;
  readonly outturns: readonly RecordedVoucher[];
  readonly facts: Facts;
}

export function useConsignment(id: string): Consignment | null {
  const voucher = useVoucher(id);
  const read = consignDetail.safeParse(voucher.detail);
  const way = read.success && voucher.kind === 'consign' ? read.data : null;
  const lot_ids = [...new Set(voucher.entries.map((entry) => entry.lot_id))];
  const facts = useFacts(
    way === null
      ? {}
      : {
          place_ids: [way.courier_id, way.destination_id],
          lot_ids,
          history_lot_ids: lot_ids,
          voucher_ids: [voucher.id],
        },
  );
  const outturn_ids = facts.lot_entries
    .filter((entry) => entry.voucher_kind === 'outturn' && entry.reversed_by === null)
    .map((entry) => entry.voucher_id);
  const settled = useFacts({ voucher_ids: [...new Set(outturn_ids)] });
  if (way === null) return null;
  const sent = voucher.entries.length === 0 ? [] : (facts.vouchers.get(voucher.id)?.entries ?? []);
  const arrivals = facts.lot_entries.filter(
    (entry) =>
      entry.voucher_kind === 'arrive' &&
      entry.reversed_by === null &&
      entry.account_id === way.destination_id,
  );
  const held = (account_id: string): readonly HeldLot[] =>
    facts.holdings.flatMap((row) => {
      const lot = facts.lots.get(row.lot_id);
      const here = row.account_id === account_id && lot_ids.includes(row.lot_id) && row.mass.gross > 0n;
      return here && lot !== undefined ? [{ ...row, lot }] : [];
    });
  return {
    ...way,
    id: voucher.id,
    sequence: voucher.sequence,
    sent_on: voucher.business_date,
    reversed: voucher.reversed_by !== null,
    sent: sumMass(sent.filter((entry) => entry.account_id === way.courier_id).map((entry) => entry.mass)),
    lots: lot_ids.flatMap((lot_id) => facts.lots.get(lot_id) ?? []),
    courier: facts.accounts.get(way.courier_id),
    destination: facts.accounts.get(way.destination_id),
    on_the_way: held(way.courier_id),
    at_destination: held(way.destination_id),
    arrived_on: arrivals.at(-1)?.business_date ?? null,
    arrived: sumMass(arrivals.map((entry) => entry.mass)),
    outturns: [...settled.vouchers.values()].filter((row) => row.kind === 'outturn'),
    facts,
  };
}
