/** What a dossier is made of, read in one snapshot of the database: every line of the chain, and the files' names. */
import type { Database } from '../../db/database.ts';
import { z } from '../../../shared/schemas/zod.ts';

const line = z.object({ line: z.string(), hash: z.string() });
const workshop = z.object({ id: z.string(), name: z.string(), currency: z.string(), today: z.string() });
const file = z.object({ id: z.string(), name: z.string(), sha256: z.string() });

export interface Snapshot {
  readonly lines: readonly { readonly line: string; readonly hash: string }[];
  readonly workshop: z.output<typeof workshop>;
  readonly documents: readonly z.output<typeof file>[];
}

const PAGE = 2_000;

/** Reads the whole book. The head is read first and nothing behind it is taken: the book only grows, so that is one snapshot. */
export function readSnapshot(db: Database, workshop_id: string): Promise<Snapshot> {
  return db.inScope({ workshop_id, user_id: null }, async (tx) => {
    const lines: z.output<typeof line>[] = [];
    const { top } = await tx.one(
      z.object({ top: z.string() }),
      'SELECT sequence::text AS top FROM workshop_head WHERE workshop_id = current_workshop()',
    );
    for (;;) {
      const page = await tx.rows(
        line,
        `SELECT line, hash FROM record WHERE workshop_id = current_workshop() AND sequence > $1::bigint AND sequence <= $2::bigint
          ORDER BY sequence LIMIT ${PAGE}`,
        [String(lines.length), top],
      );
      lines.push(...page);
      if (page.length < PAGE) break;
    }
    return {
      lines,
      workshop: await tx.one(
        workshop,
        `SELECT workshop_id::text AS id, name, currency, (clock_timestamp() AT TIME ZONE time_zone)::date::text AS today FROM workshop
          WHERE workshop_id = current_workshop()`,
      ),
      documents: await tx.rows(
        file,
        'SELECT id::text, name, sha256 FROM document WHERE workshop_id = current_workshop() ORDER BY id LIMIT 100000',
      ),
    };
  });
}
