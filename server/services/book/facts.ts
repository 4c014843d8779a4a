/** Reads the facts that an event is decided on, and makes the ids and lot codes of what it opens. */
import { randomUUID } from 'node:crypto';
import type { Facts, FactsNeeded, IdSource } from '../../../shared/book/facts.ts';
import { makeLotCode } from '../../../shared/book/lot-code.ts';
import { factsJson, factsOf } from '../../../shared/schemas/facts.ts';
import type { FactsJson } from '../../../shared/schemas/facts.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';

/** Ids from the system's randomness; lot codes run on from the workshop's last, which the lock keeps still. */
export function idSource(json: Pick<FactsJson, 'today' | 'lot_serial'>): IdSource {
  let serial = BigInt(json.lot_serial);
  return {
    id: () => randomUUID(),
    lotCode: (letter) => {
      serial += 1n;
      return makeLotCode(letter, json.today.slice(2, 4), serial);
    },
  };
}

/** Facts as plain JSON, for a form's preview. `at` is a seed's own time. */
export async function readFactsJson(tx: Tx, needed: FactsNeeded, at: Date | null = null): Promise<unknown> {
  const row = await tx.one(z.object({ facts: z.unknown() }), 'SELECT read_facts($1::jsonb, $2) AS facts', [
    JSON.stringify(needed),
    at,
  ]);
  return row.facts;
}

/** Facts as the events take them. */
export function parseFacts(json: unknown): Facts {
  const parsed = factsJson.parse(json);
  return factsOf(parsed, idSource(parsed));
}
