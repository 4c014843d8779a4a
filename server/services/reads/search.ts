/** What the scan field finds: a lot by code or words, a voucher by number, a job, a party. */
import { searchHit } from '../../../shared/schemas/search.ts';
import type { SearchHit } from '../../../shared/schemas/search.ts';
import type { Tx } from '../../db/rows.ts';

/** At most twenty hits, lots first. */
export function search(tx: Tx, q: string): Promise<SearchHit[]> {
  const like = `%${q.replaceAll(/[\\%_]/g, (mark) => `\\${mark}`)}%`;
  return tx.rows(searchHit, SEARCH, [like, /^\d{1,18}$/.test(q) ? q : null]);
}

const SEARCH = `SELECT * FROM (
    (SELECT 'lot' AS what, id::text, code AS label, description AS words FROM lot
      WHERE workshop_id = current_workshop() AND (code ILIKE $1 OR replace(code, '-', '') ILIKE $1 OR description ILIKE $1) ORDER BY code DESC LIMIT 10)
    UNION ALL
    (SELECT 'voucher', id::text, sequence::text, replace(kind, '_', '-') FROM record WHERE workshop_id = current_workshop() AND sequence = $2::bigint)
    UNION ALL
    (SELECT 'job', id::text, code, title FROM job WHERE workshop_id = current_workshop() AND (code ILIKE $1 OR title ILIKE $1) LIMIT 5)
    UNION ALL
    (SELECT 'party', id::text, name, kind FROM party WHERE workshop_id = current_workshop() AND name ILIKE $1 LIMIT 5)
  ) hits LIMIT 20`;
