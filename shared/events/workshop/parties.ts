/** Parties outside the house: suppliers, customers, refiners, outworkers, couriers. Each gets its account at once. */
import type { AccountKind } from '../../book/account.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { Party } from '../../book/facts.ts';
import { id, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { act } from './act.ts';

export const PARTY_KINDS = [
  'supplier',
  'customer',
  'refiner',
  'outworker',
  'courier',
] as const satisfies readonly Party['kind'][] & readonly AccountKind[];

const schema = z.strictObject({
  /** Null for a new party. */
  party_id: id.nullable().default(null),
  kind: z.enum(PARTY_KINDS),
  name: shortText,
});

/** Enters a party, or renames one. A new party's account is opened with it. Refuses a change of kind. */
export const setParty: EventDefinition<z.output<typeof schema>> = {
  name: 'set-party',
  schema,
  action: 'party.set',
  summary: 'Enters or renames a supplier, customer, refiner, outworker or courier.',
  needs: (input) => ({ party_ids: input.party_id === null ? [] : [input.party_id] }),
  draft(input, facts) {
    const { party_id, kind, name } = input;
    if (party_id === null) {
      const detail = { party_id: facts.ids.id(), kind, name };
      const account = {
        account_id: facts.ids.id(),
        kind,
        name,
        custodian_id: null,
        party_id: detail.party_id,
        operation: null,
      };
      return accept(recordsOnly([act('party_set', detail, facts), act('account_opened', account, facts)]));
    }
    const known = facts.parties.get(party_id);
    if (known === undefined) {
      return refuse({
        code: 'not_found',
        field: 'party_id',
        sentence: 'There is no such party. Choose it from the list.',
      });
    }
    if (known.kind !== kind) {
      const sentence = `${known.name} stands in the book as ${known.kind}. Enter the ${kind} as a party of its own.`;
      return refuse({ code: 'invalid', field: 'kind', sentence });
    }
    const renamed = [...facts.accounts.values()]
      .filter((account) => account.party_id === party_id && account.name === known.name)
      .map((account) => act('account_renamed', { account_id: account.id, name }, facts));
    return accept(recordsOnly([act('party_set', { party_id, kind, name }, facts), ...renamed]));
  },
};
