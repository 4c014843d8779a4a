/** The facts that a form's preview is reckoned on: read as the server reads them, parsed by the same schema. */
import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import type { Facts, FactsNeeded } from '../../shared/book/facts.ts';
import { factsJson, factsOf } from '../../shared/schemas/facts.ts';
import { send } from '../lib/api-client.ts';
import { provisionalIds } from '../lib/uuid.ts';
import { keys } from './keys.ts';

async function readFacts(needed: FactsNeeded): Promise<Facts> {
  const json = factsJson.parse(await send('POST', '/facts', { body: needed }));
  return factsOf(json, provisionalIds(json.today, json.lot_serial));
}

/** Facts of places and lots that a form shows; suspends until they are there. */
export function useFacts(needed: FactsNeeded): Facts {
  return useSuspenseQuery({ queryKey: keys.facts(needed), queryFn: () => readFacts(needed) }).data;
}

/** Facts for a preview; none while there is nothing to preview, the ones before while new ones come. */
export function usePreviewFacts(needed: FactsNeeded | null): Facts | null {
  const { data } = useQuery({
    queryKey: keys.facts(needed),
    queryFn: () => readFacts(needed ?? {}),
    enabled: needed !== null,
    placeholderData: (before: Facts | undefined) => before,
  });
  return needed === null ? null : (data ?? null);
}
