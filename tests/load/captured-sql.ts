/**
 * The statements that the program itself sends for one issue, taken down on their way to PostgreSQL, so that what
 * pgbench runs can't drift from it. Ids that are new in each issue become chance, the rest stays as it was sent.
 */
import pg from 'pg';
import { z } from '../../shared/schemas/zod.ts';
import { issueOnce } from './shops.ts';
import type { Shop } from './shops.ts';

const UUID = /[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}/g;
const OPENS_CONNECTION = /^SET (standard_conforming_strings|client_min_messages)|^SHOW /i;
const statement = z.union([z.string(), z.object({ text: z.string() }).transform(({ text }) => text)]);
const value = z.union([z.string(), z.number(), z.boolean(), z.null(), z.date()]);

/** For each workshop the lines of a pgbench script that does what one issue does. */
export async function capturedTransactions(shops: readonly Shop[]): Promise<readonly (readonly string[])[]> {
  const scripts: (readonly string[])[] = [];
  for (const shop of shops) {
    const seen = new Set((await captured(shop)).join('\n').match(UUID) ?? []);
    const lines = await typical(shop);
    const fresh = [...new Set(lines.join('\n').match(UUID) ?? [])].filter((id) => !seen.has(id));
    scripts.push(withChance(lines, fresh));
  }
  return scripts;
}

/** Each new id takes 16 of its figures from chance. */
function withChance(lines: readonly string[], fresh: readonly string[]): readonly string[] {
  const draws = fresh.flatMap((_, index) => [
    `\\set a${index} random(100000000000, 999999999999)`,
    `\\set b${index} random(1000, 9999)`,
  ]);
  const drawn = (id: string) => {
    const index = fresh.indexOf(id);
    return index === -1 ? id : `${id.slice(0, 9)}:b${index}-4000-8000-:a${index}`;
  };
  return [...draws, ...lines.map((line) => line.replaceAll(UUID, drawn))];
}

/** An issue that happened to open a connection says more than others: then the next one is taken. */
async function typical(shop: Shop): Promise<readonly string[]> {
  for (;;) {
    const lines = await captured(shop);
    if (!lines.some((line) => OPENS_CONNECTION.test(line))) return lines;
  }
}

async function captured(shop: Shop): Promise<readonly string[]> {
  const lines: string[] = [];
  const query = Object.getOwnPropertyDescriptor(pg.Client.prototype, 'query');
  if (query === undefined) throw new Error('the driver has no query to listen to');
  const send: unknown = query.value;
  if (typeof send !== 'function') throw new Error('the driver has no query to listen to');
  Object.defineProperty(pg.Client.prototype, 'query', {
    ...query,
    value(this: pg.Client, ...sent: unknown[]): unknown {
      const text = statement.safeParse(sent[0]);
      const values = z.array(value).safeParse(sent[1]);
      if (text.success) lines.push(inOneLine(text.data, values.success ? values.data : []));
      return Reflect.apply(send, this, sent);
    },
  });
  try {
    await issueOnce(shop);
  } finally {
    Object.defineProperty(pg.Client.prototype, 'query', query);
  }
  return lines;
}

function inOneLine(sql: string, values: readonly z.output<typeof value>[]): string {
  const literal = (index: number) => {
    const given = values[index - 1];
    if (given === undefined || given === null) return 'NULL';
    if (given instanceof Date) return pg.escapeLiteral(given.toISOString());
    return typeof given === 'string' ? pg.escapeLiteral(given) : String(given);
  };
  const filled = sql
    .replaceAll(/--.*$/gm, '')
    .replaceAll(/\s+/g, ' ')
    .replace(/;?\s*$/, ';');
  return filled.replaceAll(/\$(\d+)/g, (_, index: string) => literal(Number.parseInt(index, 10)));
}
