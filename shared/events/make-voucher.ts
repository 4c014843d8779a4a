/** Putting a voucher together: what all kinds have alike is written here once. */
import type { Detail, DetailLeaf, EntryDraft, VoucherDraft } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { VoucherKind } from '../book/kinds.ts';
import type { MassVector } from '../mass/vector.ts';
import { isZeroMass, negateMass } from '../mass/vector.ts';
import type { Weighing } from '../weighing/weighing.ts';
import { weighingDetail } from '../weighing/weighing.ts';
import type { Common } from './common-fields.ts';
import type { Actor } from './definition.ts';

export interface VoucherParts {
  readonly kind: VoucherKind;
  readonly detail: Detail;
  readonly entries: readonly EntryDraft[];
  readonly reverses?: string;
}

/** A voucher draft with an id of its own. Entries that move nothing, neither mass nor pieces, are left out. */
export function makeVoucher(facts: Facts, common: Common, parts: VoucherParts): VoucherDraft {
  return {
    type: 'voucher',
    id: facts.ids.id(),
    kind: parts.kind,
    business_date: common.business_date,
    note: common.note,
    detail: parts.detail,
    documents: common.documents,
    reverses: parts.reverses ?? null,
    entries: parts.entries.filter((entry) => !isZeroMass(entry.mass) || (entry.pieces ?? 0n) !== 0n),
  };
}

/** Both sides of a move: out of one account, into another. */
export function moveEntries(
  move: { readonly lot_id: string; readonly mass: MassVector; readonly pieces: bigint | null },
  from_id: string,
  to_id: string,
): readonly EntryDraft[] {
  const { lot_id, mass, pieces } = move;
  return [
    { account_id: from_id, lot_id, mass: negateMass(mass), pieces: pieces === null ? null : -pieces },
    { account_id: to_id, lot_id, mass, pieces },
  ];
}

/** Weighings as `detail.weighings`; each names the line of the input (1, 2, 3 …) that it gave. */
export function weighingRows(
  weighings: readonly { readonly weighing: Weighing | null; readonly line: number }[],
  facts: Facts,
  actor: Actor,
): readonly Readonly<Record<string, DetailLeaf>>[] {
  return weighings.flatMap(({ weighing, line }) =>
    weighing === null
      ? []
      : [weighingDetail(weighing, { id: facts.ids.id(), line: String(line), taken_by: actor.person_id })],
  );
}
