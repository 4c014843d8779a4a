/**
 * What an event is: the schema of what is entered, the facts it needs, and the pure function that turns both
 * into drafts or reasons why not. The server, the forms' previews and the tests all run the same definition.
 */
import type { z } from 'zod';
import type { Outcome, RecordDraft } from '../book/draft.ts';
import type { Facts, FactsNeeded } from '../book/facts.ts';
import type { Action } from '../permissions.ts';

export const EVENT_NAMES = [
  'opening',
  'weigh-in',
  'hold',
  'release',
  'transfer',
  'issue',
  'acknowledge',
  'dispute-handover',
  'settle-dispute',
  'weigh-back',
  'delivery',
  'sweep-up',
  'consign',
  'arrive',
  'outturn',
  'settle',
  'use-up',
  'ownership',
  'return-to-owner',
  'write-off',
  'correction',
  'reversal',
  'open-place',
  'open-operation',
  'rename-account',
  'close-account',
  'change-custodian',
  'set-party',
  'set-alloy',
  'set-price',
  'set-allowance',
  'set-setting',
  'open-job',
  'close-period',
  'reopen-period',
  'explain-loss',
] as const;
export type EventName = (typeof EVENT_NAMES)[number];

/** Who acts. The server takes it from the session, never from a body. */
export interface Actor {
  readonly person_id: string;
  readonly role: 'proprietor' | 'keeper' | 'goldsmith' | 'auditor';
}

/** That metal changed hands between persons: waits until it is acknowledged or disputed. */
export interface HandoverDraft {
  readonly id: string;
  readonly voucher_id: string;
  readonly place_id: string;
  readonly from_person_id: string;
  readonly to_person_id: string;
}

export interface EventDraft {
  /** Posted in this order, in one transaction. */
  readonly records: readonly RecordDraft[];
  readonly handovers: readonly HandoverDraft[];
  /** Why a second person has to sign before anything is posted, or null where one signature does. */
  readonly second_signature: string | null;
}

export interface EventDefinition<Input> {
  readonly name: EventName;
  /** From the JSON body (strings) to the checked input (bigint masses, Decimal finenesses). */
  readonly schema: z.ZodType<Input>;
  readonly action: Action;
  /** One sentence for the API page. */
  readonly summary: string;
  needs(input: Input): FactsNeeded;
  draft(input: Input, facts: Facts, actor: Actor): Outcome<EventDraft>;
}

/** An event draft of records alone: no handover, one signature. */
export function recordsOnly(records: readonly RecordDraft[]): EventDraft {
  return { records, handovers: [], second_signature: null };
}

/** Whether a word names an event. */
export function isEventName(name: string): name is EventName {
  return EVENT_NAMES.some((known) => known === name);
}
