/**
 * The metal statement of a customer or supplier whose own metal is here: each movement, the loss charged, what is lost
 * and still owed. Nothing of it is booked: it is told from the entries of the owner's lots.
 */
import { ACCOUNT_KINDS } from '../../../shared/book/account.ts';
import { VOUCHER_KINDS } from '../../../shared/book/kinds.ts';
import { RECONCILIATION_WORDS, lineOf } from '../../../shared/loss/reconciliation.ts';
import type { MassVector } from '../../../shared/mass/vector.ts';
import {
  MASS_KEYS,
  massFromJson,
  massToJson,
  massVector,
  subtractMass,
} from '../../../shared/mass/vector.ts';
import { massFieldsOut } from '../../../shared/schemas/primitives.ts';
import type { OwnerStatementJson, OwnerStatementQuery } from '../../../shared/schemas/statements.ts';
import { ownerMovement } from '../../../shared/schemas/statements.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { readReconciliation } from './reconciliation.ts';

const MOST_MOVEMENTS = 2000;

/** The lines of a reconciliation as the owner reads them. */
const OWNERS_WORDS = {
  ...RECONCILIATION_WORDS,
  from_suppliers: 'Brought, less taken back',
  from_customers: 'Brought',
  to_customers: 'Given back',
  working_loss: 'Loss charged',
} as const;

const movementRow = ownerMovement.omit({ line: true, name: true }).extend({
  account_kind: z.enum(ACCOUNT_KINDS),
  voucher_kind: z.enum(VOUCHER_KINDS),
  side: z.enum(['onto', 'from']),
  because: z.enum(['ordinary', 'change_of_owner']),
});
const masses = z.object(massFieldsOut);

/** The statement of one party for a period. Throws `not_found` where there is no such party. */
export async function readOwnerStatement(
  tx: Tx,
  party_id: string,
  query: Pick<OwnerStatementQuery, 'from' | 'to'>,
): Promise<OwnerStatementJson> {
  const owner = await tx.maybe(
    z.object({ id: z.string(), name: z.string(), kind: z.string() }),
    'SELECT id::text, name, kind FROM party WHERE workshop_id = current_workshop() AND id = $1::uuid',
    [party_id],
  );
  if (owner === null) throw new ProblemError('not_found', 'There is no such party. Look at the list again.');
  const { from, to } = query;
  const { opening, lines, closing } = await readReconciliation(tx, {
    from,
    to,
    owner: party_id,
    format: 'json',
  });
  const rows = await tx.rows(movementRow, MOVEMENTS, [from, to, party_id]);
  const movements = rows
    .slice(0, MOST_MOVEMENTS)
    .flatMap(({ account_kind, voucher_kind, side, because, ...row }) => {
      const line = lineOf({ account_kind, voucher_kind, side, because });
      return line === null ? [] : [{ ...row, line, name: OWNERS_WORDS[line] }];
    });
  const lost = massFromJson(await tx.one(masses, LOST, [to, party_id]));
  const made_good = massFromJson(await tx.one(masses, MADE_GOOD, [to, party_id]));
  return {
    owner,
    from,
    to,
    opening,
    lines: lines.map((line) => ({ ...line, name: OWNERS_WORDS[line.line] })),
    closing,
    movements,
    more: rows.length > MOST_MOVEMENTS,
    lost: massToJson(lost),
    made_good: massToJson(made_good),
    owed: massToJson(nothingBelow(subtractMass(lost, made_good))),
  };
}

/** More may be made good than was lost; then nothing is owed. */
function nothingBelow(mass: MassVector): MassVector {
  return massVector(Object.fromEntries(MASS_KEYS.map((key) => [key, mass[key] < 0n ? 0n : mass[key]])));
}

const sums = (sign: '' | '-') =>
  MASS_KEYS.map((m) => `grams(coalesce(${sign}sum(e.${m}_ug), 0)::bigint) AS ${m}_g`).join(', ');

/**
 * What left the places stands on other accounts; of a change of owner the places' own entries count. Both are told as
 * what they did to the owner's metal in the house.
 */
const MOVEMENTS = `SELECT r.sequence::text, r.id::text, r.kind, r.business_date::text, l.code AS lot_code, l.description AS lot_description,
    j.code AS job_code, r.note, x.account_kind, x.voucher_kind, x.because, CASE WHEN x.gross_ug < 0 THEN 'from' ELSE 'onto' END AS side,
    ${MASS_KEYS.map((m) => `grams(CASE x.because WHEN 'ordinary' THEN -x.${m}_ug ELSE x.${m}_ug END) AS ${m}_g`).join(', ')}
  FROM (
    SELECT e.voucher_sequence, e.lot_id, CASE WHEN w.because = 'ordinary' THEN a.kind ELSE 'safe' END AS account_kind, w.voucher_kind,
      w.because, ${MASS_KEYS.map((m) => `sum(e.${m}_ug)::bigint AS ${m}_ug`).join(', ')}
    FROM lot o JOIN entry e ON e.workshop_id = o.workshop_id AND e.lot_id = o.id
    JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
    JOIN record r ON r.workshop_id = e.workshop_id AND r.sequence = e.voucher_sequence
    LEFT JOIN record first ON first.workshop_id = r.workshop_id AND first.id = coalesce(r.reverses, nullif(r.detail->>'corrects', '')::uuid)
    CROSS JOIN LATERAL (SELECT coalesce(first.kind, r.kind) AS voucher_kind,
      CASE WHEN coalesce(first.kind, r.kind) = 'ownership' THEN 'change_of_owner' ELSE 'ordinary' END AS because) w
    WHERE o.workshop_id = current_workshop() AND o.owner_id = $3::uuid AND e.business_date BETWEEN $1::date AND $2::date
      AND (w.because = 'ordinary') <> is_place(a.kind)
    GROUP BY 1, 2, 3, 4, 5
  ) x
  JOIN record r ON r.workshop_id = current_workshop() AND r.sequence = x.voucher_sequence
  JOIN lot l ON l.workshop_id = current_workshop() AND l.id = x.lot_id
  LEFT JOIN job j ON j.workshop_id = current_workshop() AND j.id = r.job_id
  WHERE ${MASS_KEYS.map((m) => `x.${m}_ug <> 0`).join(' OR ')}
  ORDER BY r.business_date, r.sequence, l.code LIMIT ${MOST_MOVEMENTS + 1}`;

const OWNED = `FROM lot o JOIN entry e ON e.workshop_id = o.workshop_id AND e.lot_id = o.id
    JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
    WHERE o.workshop_id = current_workshop() AND o.owner_id = $2::uuid AND e.business_date <= $1::date`;

const LOST = `SELECT ${sums('')} ${OWNED} AND a.kind = 'written_off'`;

/** Into a job house metal goes as a part of the piece (solder, a repair); outside any job it makes good what was lost. */
const MADE_GOOD = `SELECT ${sums('')} ${OWNED.replace(
  'WHERE',
  `JOIN record r ON r.workshop_id = e.workshop_id AND r.sequence = e.voucher_sequence
    LEFT JOIN record first ON first.workshop_id = r.workshop_id AND first.id = coalesce(r.reverses, nullif(r.detail->>'corrects', '')::uuid)
    JOIN record root ON root.workshop_id = r.workshop_id AND root.sequence = coalesce(first.sequence, r.sequence)
    WHERE`,
)} AND is_place(a.kind) AND root.kind = 'ownership' AND root.detail->>'from_owner_id' IS NULL AND root.job_id IS NULL`;
