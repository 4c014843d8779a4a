/** A row in every table that belongs to a workshop, so that a wall round an empty table proves nothing. */
import { randomUUID } from 'node:crypto';
import type { TestDatabase } from './database.ts';
import { RawBook } from './raw-book.ts';

const G = 1_000_000n;

/** A workshop with at least one row in each walled table. */
export async function workshopWithOneRowEach(db: TestDatabase): Promise<RawBook> {
  const book = await RawBook.open(db);
  const party_id = randomUUID();
  const child = randomUUID();
  const received = book.move(book.supplier, book.safe, { gross: 10n * G, gold: 7n * G });
  await book.post([
    book.lotDescribed(child, 'G26-0002-X', [book.lot]),
    book.act('party_set', { party_id, kind: 'customer', name: 'Edda Lorn' }),
    book.act('alloy_set', {
      alloy_id: randomUUID(),
      name: '750 yellow',
      gold_permille: '750',
      silver_permille: '125',
      platinum_permille: '0',
      palladium_permille: '0',
    }),
    book.act('price_set', {
      price_id: randomUUID(),
      metal: 'gold',
      currency: 'EUR',
      price_per_ozt: '2000',
      priced_on: '2026-04-01',
      source: 'typed',
    }),
    book.act('allowance_set', {
      allowance_id: randomUUID(),
      operation: 'filing',
      alloy: null,
      percent: '2',
      fixed_g: '0.05',
      from: '2026-04-01',
    }),
    book.act('limit_set', { name: 'filings', permille: '985' }),
    book.act('job_opened', { job_id: randomUUID(), code: 'J-1', title: 'Ring', customer_id: party_id }),
    book.act('period_closed', { period_id: randomUUID(), from: '2026-03-01', to: '2026-03-31' }),
    received,
    book.move(book.safe, book.bench, { gross: G }),
  ]);
  const person = [book.workshop_id, randomUUID(), book.keeper];
  await book.as('owner', async (sql) => {
    await sql("SELECT * FROM balances_at('2026-05-01')");
    await sql('INSERT INTO handover VALUES ($1, $2, $4, $5, $3, $3)', [...person, received.id, book.safe]);
    await sql("INSERT INTO request_key VALUES ($1, 'key-' || $2::text, $3, repeat('a', 64))", person);
    await sql("INSERT INTO signature_request VALUES ($1, $2, 'reversal', '{}', '[]', 'why', $3)", person);
    await sql('INSERT INTO metal_request VALUES ($1, $2, $3, $4, NULL, NULL, 1)', [...person, book.bench]);
    await sql(
      "INSERT INTO background_job (workshop_id, id, kind, input, made_by) VALUES ($1, $2, 'dossier', '{}', $3)",
      person,
    );
    await sql(
      `INSERT INTO invitation VALUES ($1, $2, 'x@example.test', 'X', 'keeper', NULL, encode(sha256(gen_random_uuid()::text::bytea), 'hex'), $3, now())`,
      person,
    );
    await sql(
      "INSERT INTO document VALUES ($1, $2, 'note.pdf', 'application/pdf', 1, repeat('0', 64), $3)",
      person,
    );
  });
  return book;
}
