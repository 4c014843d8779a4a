/** The check of a whole book: the chain from its first record to its head, the sums, the balances, the registers. */
import type { BookCheck, BookFault } from '../../../shared/schemas/book-check.ts';
import { MOST_FAULTS } from '../../../shared/schemas/book-check.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { walkChain } from './check-chain.ts';
import { balanceFaults, registerFaults } from './check-sums.ts';

/** Checks the book of the workshop that the transaction is in; trusts nothing but the lines of the chain. */
export async function checkBook(tx: Tx): Promise<BookCheck> {
  const head = await tx.one(
    z.object({ sequence: z.string(), hash: z.string() }),
    'SELECT sequence::text, hash FROM workshop_head WHERE workshop_id = current_workshop()',
  );
  const walk = await walkChain(tx, BigInt(head.sequence));
  const cut: BookFault[] =
    walk.faults.length < MOST_FAULTS &&
    (String(walk.last.sequence) !== head.sequence || walk.last.hash !== head.hash)
      ? [
          {
            check: 'chain',
            sequence: head.sequence,
            kind: null,
            sentence: `The book’s head is no. ${head.sequence}, but the chain ends with no. ${walk.last.sequence}.`,
          },
        ]
      : [];
  const { balances, faults: unbalanced } = await balanceFaults(tx);
  const faults = [...walk.faults, ...cut, ...unbalanced, ...(await registerFaults(tx))];
  return {
    ...head,
    records: walk.records,
    entries: walk.entries,
    balances,
    sound: faults.length === 0,
    faults: faults.slice(0, MOST_FAULTS),
  };
}
