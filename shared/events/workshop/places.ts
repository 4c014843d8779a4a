/**
 * Places, metal accounts and operations of a workshop: opened, renamed, given to somebody, closed. Each is an act of
 * the chain, so that nobody relabels where metal lies unseen.
 */
import { CLAIM_KINDS, PLACE_KINDS, isPlace } from '../../book/account.ts';
import type { Account } from '../../book/account.ts';
import type { Outcome } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { Facts } from '../../book/facts.ts';
import { id, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { act } from './act.ts';

const openPlaceSchema = z.strictObject({
  kind: z.enum([...PLACE_KINDS, ...CLAIM_KINDS]),
  name: shortText,
  custodian_id: id.nullable().default(null),
  party_id: id.nullable().default(null),
});

/** Opens a place or a metal account. Refuses a custodian who has no role here. */
export const openPlace: EventDefinition<z.output<typeof openPlaceSchema>> = {
  name: 'open-place',
  schema: openPlaceSchema,
  action: 'place.set',
  summary: 'Opens a place where metal can be, or a metal account with a party.',
  needs: (input) => ({ party_ids: input.party_id === null ? [] : [input.party_id] }),
  draft(input, facts) {
    const refusal = custodianRefusal(input.custodian_id, facts);
    if (refusal !== null) return refusal;
    if (input.party_id !== null && !facts.parties.has(input.party_id)) {
      return refuse({
        code: 'invalid',
        field: 'party_id',
        sentence: 'That party is not in the book. Enter it first.',
      });
    }
    if (input.kind === 'metal_account' && input.party_id === null) {
      const sentence = 'A metal account is with somebody. Choose the refiner, supplier or casting house.';
      return refuse({ code: 'invalid', field: 'party_id', sentence });
    }
    return accept(
      recordsOnly([act('account_opened', { account_id: facts.ids.id(), ...input, operation: null }, facts)]),
    );
  },
};

const openOperationSchema = z.strictObject({ name: shortText });

/** Opens an operation: the working-loss account that holds what it loses. Its slug is made of its name. */
export const openOperation: EventDefinition<z.output<typeof openOperationSchema>> = {
  name: 'open-operation',
  schema: openOperationSchema,
  action: 'allowance.set',
  summary: 'Opens an operation, with an account for its working loss.',
  needs: () => ({}),
  draft(input, facts) {
    const operation = operationSlug(input.name);
    if (operation === '') {
      return refuse({ code: 'invalid', field: 'name', sentence: 'An operation needs a name in letters.' });
    }
    if ([...facts.accounts.values()].some((account) => account.operation === operation)) {
      return refuse({
        code: 'conflict',
        field: 'name',
        sentence: `There is an operation ${input.name} already.`,
      });
    }
    const detail = {
      account_id: facts.ids.id(),
      kind: 'working_loss',
      name: input.name,
      custodian_id: null,
      party_id: null,
      operation,
    };
    return accept(recordsOnly([act('account_opened', detail, facts)]));
  },
};

/** The word by which an operation stands in details and exports: lower case, underscores. */
export function operationSlug(name: string): string {
  return name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '_')
    .replace(/^_+|_+$/g, '');
}

const renameSchema = z.strictObject({ account_id: id, name: shortText });

/** Gives an account another name; the old one stays in the chain. */
export const renameAccount: EventDefinition<z.output<typeof renameSchema>> = {
  name: 'rename-account',
  schema: renameSchema,
  action: 'place.set',
  summary: 'Gives a place or account another name.',
  needs: (input) => ({ account_ids: [input.account_id] }),
  draft: (input, facts) =>
    withAccount(input.account_id, facts, () =>
      accept(
        recordsOnly([act('account_renamed', { account_id: input.account_id, name: input.name }, facts)]),
      ),
    ),
};

const closeSchema = z.strictObject({ account_id: id });

/** Closes a place for good. Refuses one that still holds metal. */
export const closeAccount: EventDefinition<z.output<typeof closeSchema>> = {
  name: 'close-account',
  schema: closeSchema,
  action: 'place.set',
  summary: 'Closes a place or account that holds nothing.',
  needs: (input) => ({ place_ids: [input.account_id] }),
  draft: (input, facts) =>
    withAccount(input.account_id, facts, (account) => {
      if (facts.holdings.some((held) => held.account_id === account.id && held.mass.gross !== 0n)) {
        const sentence = `${account.name} still holds metal. Move it first, then close the place.`;
        return refuse({ code: 'conflict', field: null, sentence });
      }
      return accept(recordsOnly([act('account_closed', { account_id: account.id }, facts)]));
    }),
};

const custodianSchema = z.strictObject({
  account_id: id,
  custodian_id: id,
  count_id: id.nullable().default(null),
});

/** Hands a place over to another person; what lies there is then in his or her charge. */
export const changeCustodian: EventDefinition<z.output<typeof custodianSchema>> = {
  name: 'change-custodian',
  schema: custodianSchema,
  action: 'place.set',
  summary: 'Gives a place into another person’s charge.',
  needs: (input) => ({ account_ids: [input.account_id] }),
  draft: (input, facts) =>
    withAccount(input.account_id, facts, (account) => {
      if (!isPlace(account.kind)) {
        return refuse({ code: 'invalid', field: 'account_id', sentence: `${account.name} is not a place.` });
      }
      return (
        custodianRefusal(input.custodian_id, facts) ??
        accept(recordsOnly([act('custodian_changed', input, facts)]))
      );
    }),
};

function withAccount<T>(
  account_id: string,
  facts: Facts,
  then: (account: Account) => Outcome<T>,
): Outcome<T> {
  const account = facts.accounts.get(account_id);
  if (account === undefined || account.closed) {
    return refuse({
      code: 'not_found',
      field: 'account_id',
      sentence: 'There is no such place. Choose it from the list.',
    });
  }
  return then(account);
}

function custodianRefusal(custodian_id: string | null, facts: Facts): Outcome<never> | null {
  if (custodian_id === null || facts.people.get(custodian_id)?.active === true) return null;
  const sentence = 'That person has no role in this workshop. Invite him or her first.';
  return refuse({ code: 'invalid', field: 'custodian_id', sentence });
}
