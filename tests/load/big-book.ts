/** A book of many entries, posted by the program's own writer: metal goes to and fro between safe and bench. */
import { randomUUID } from 'node:crypto';
import type { EntryDraft, VoucherDraft } from '../../shared/book/draft.ts';
import { ZERO_MASS, negateMass } from '../../shared/mass/vector.ts';
import { z } from '../../shared/schemas/zod.ts';
import type { Database } from '../../server/db/database.ts';
import { postRecords } from '../../server/services/book/post.ts';
import type { Shop } from './shops.ts';

const ENTRIES_A_VOUCHER = 500;
const READS = 40;
const TEN_MILLIGRAMS = { ...ZERO_MASS, gross: 10_000n, gold: 7_500n };

const session = z.object({ workshop: z.object({ id: z.string() }), person: z.object({ id: z.string() }) });

/** Posts transfers until the workshop's book has so many entries. */
export async function growBook(db: Database, shop: Shop, size: number): Promise<void> {
  const { workshop, person } = session.parse((await shop.owner.get('/session')).body);
  const scope = { workshop_id: workshop.id, user_id: null };
  const { entries } = await db.inScope(scope, (tx) =>
    tx.one(
      z.object({ entries: z.coerce.number() }),
      'SELECT count(*)::text AS entries FROM entry WHERE workshop_id = current_workshop()',
    ),
  );
  for (let there = entries, out = true; there < size; there += ENTRIES_A_VOUCHER, out = !out) {
    const voucher = toAndFro(shop, out);
    await db.inScope(scope, (tx) => postRecords(tx, [voucher], { person_id: person.id, approved_by: null }));
  }
}

function toAndFro(shop: Shop, out: boolean): VoucherDraft {
  const [from, to] = out ? [shop.safe, shop.bench] : [shop.bench, shop.safe];
  const pair: readonly EntryDraft[] = [
    { account_id: from, lot_id: shop.sheet, mass: negateMass(TEN_MILLIGRAMS), pieces: null },
    { account_id: to, lot_id: shop.sheet, mass: TEN_MILLIGRAMS, pieces: null },
  ];
  return {
    type: 'voucher',
    id: randomUUID(),
    kind: 'transfer',
    business_date: new Date().toISOString().slice(0, 10),
    note: null,
    detail: {},
    documents: [],
    reverses: null,
    entries: Array.from({ length: ENTRIES_A_VOUCHER / 2 }, () => pair).flat(),
  };
}

/** The median time of reading the balances of all places now, over HTTP, in milliseconds. */
export async function balancesTime(port: string, shop: Shop): Promise<number> {
  const times: number[] = [];
  for (let read = 0; read < READS; read += 1) {
    const from = performance.now();
    const response = await fetch(`http://127.0.0.1:${port}/api/v1/reports/balances?by=place`, {
      headers: { Cookie: shop.owner.cookies.join('; ') },
    });
    await response.text();
    if (!response.ok) throw new Error(`balances: ${response.status}`);
    times.push(performance.now() - from);
  }
  return times.sort((a, b) => a - b)[READS / 2] ?? 0;
}
