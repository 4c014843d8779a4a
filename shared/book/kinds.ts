/** The kinds of record, as stored and exported: vouchers move metal, acts have no entries. */

export const VOUCHER_KINDS = [
  'opening',
  'weigh_in',
  'transfer',
  'issue',
  'weigh_back',
  'melt',
  'rework',
  'delivery',
  'sweep_up',
  'consign',
  'arrive',
  'outturn',
  'settle',
  'use_up',
  'count',
  'reassay',
  'ownership',
  'return_to_owner',
  'write_off',
  'correction',
  'reversal',
] as const;
export type VoucherKind = (typeof VOUCHER_KINDS)[number];

export const ACT_KINDS = [
  'account_opened',
  'account_renamed',
  'account_closed',
  'custodian_changed',
  'lot_described',
  'lot_held',
  'lot_released',
  'handover_acknowledged',
  'handover_disputed',
  'test_recorded',
  'count_taken',
  'role_given',
  'role_ended',
  'party_set',
  'alloy_set',
  'price_set',
  'allowance_set',
  'limit_set',
  'balance_set',
  'balance_checked',
  'estimate_set',
  'job_opened',
  'night_checked',
  'dispute_opened',
  'dispute_closed',
  'attribution_corrected',
  'period_closed',
  'period_reopened',
  'dossier_made',
  'key_changed',
] as const;
export type ActKind = (typeof ACT_KINDS)[number];

export type RecordKind = VoucherKind | ActKind;

/** Whether a kind of record moves metal. */
export function isVoucherKind(kind: string): kind is VoucherKind {
  return VOUCHER_KINDS.some((known) => known === kind);
}
