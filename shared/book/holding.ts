/** Holdings: what an account has of a lot, now. The book's balances are sums of these. */
import type { MassVector } from '../mass/vector.ts';
import { ZERO_MASS } from '../mass/vector.ts';

export interface Holding {
  readonly account_id: string;
  readonly lot_id: string;
  readonly mass: MassVector;
  readonly pieces: bigint | null;
}

/** A work place's holding of a lot, told by the job that it is there for (null: stock work, repairs). */
export interface JobHolding extends Holding {
  readonly job_id: string | null;
  /** The voucher kind and operation that last put some of it there; so that work kept on is counted once. */
  readonly came_by: { readonly kind: string; readonly operation: string | null } | null;
}

/** What an account has of a lot; nothing where there is no such holding. */
export function heldOf(holdings: readonly Holding[], account_id: string, lot_id: string): Holding {
  const found = holdings.find((h) => h.account_id === account_id && h.lot_id === lot_id);
  return found ?? { account_id, lot_id, mass: ZERO_MASS, pieces: null };
}
