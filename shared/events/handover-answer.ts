/** Who may answer a handover, and the act that does: what acknowledging, disputing and settling have alike. */
import type { ActDraft, Detail, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Handover } from '../book/facts.ts';
import { may } from '../permissions.ts';
import { z } from '../schemas/zod.ts';
import type { Actor } from './definition.ts';
import { findVoucher } from './lookup.ts';

export const answerFields = {
  /** In the receiver's own session, or at the counter by the receiver's PIN. */
  how: z.enum(['session', 'pin']),
  /** The receiver's PIN where it is given at the counter; checked by the server, kept nowhere. */
  pin: z
    .string()
    .regex(/^\d{4,8}$/, 'A PIN has 4 to 8 figures.')
    .nullable()
    .default(null),
};

export interface Answer {
  readonly voucher_id: string;
  readonly how: 'session' | 'pin';
  readonly pin: string | null;
}

/**
 * The handover of a voucher in one of the wanted states. Refuses one that is answered already, one of a reversed
 * voucher, and whoever is not its receiver: only at the counter, with the receiver's PIN, may a keeper enter it.
 */
export function findHandover(
  answer: Answer,
  facts: Facts,
  actor: Actor,
  wanted: readonly Handover['state'][],
): Outcome<Handover> {
  const voucher = findVoucher(facts, answer.voucher_id, 'voucher_id');
  if (!voucher.ok) return voucher;
  const handover = facts.handovers.find((known) => known.voucher_id === answer.voucher_id);
  if (handover === undefined) {
    const sentence = `Voucher ${voucher.value.sequence} handed nothing over to anybody. Look at the voucher again.`;
    return refuse({ code: 'not_found', field: 'voucher_id', sentence });
  }
  if (voucher.value.reversed_by !== null) {
    const sentence = `Voucher ${voucher.value.sequence} was reversed, so there is nothing to answer any more.`;
    return refuse({ code: 'already_done', field: 'voucher_id', sentence });
  }
  const name = facts.people.get(handover.to_person_id)?.name ?? 'The receiver';
  if (!wanted.includes(handover.state)) {
    return refuse({
      code: 'already_done',
      field: 'voucher_id',
      sentence: answered(name, handover.state, voucher.value.sequence),
    });
  }
  const own = actor.person_id === handover.to_person_id;
  const atCounter = answer.how === 'pin' && answer.pin !== null && may(actor.role, 'book.issue');
  if (answer.how === 'session' ? own : atCounter) return accept(handover);
  const sentence = `${name} receives this metal, so only ${name} can answer for it. Use the own session, or enter the PIN at the counter.`;
  return refuse({ code: 'not_receiver', field: answer.how === 'pin' ? 'pin' : 'voucher_id', sentence });
}

function answered(name: string, state: Handover['state'], sequence: string): string {
  if (state === 'waiting') return `${name} has not answered voucher ${sequence} yet. Nothing is in dispute.`;
  if (state === 'disputed')
    return `${name} disputes voucher ${sequence}. Settle it by a second weighing before both.`;
  return `${name} has acknowledged voucher ${sequence} already. A mistake found later is mended by a correction.`;
}

/** The act that answers a handover: who, how, and what more belongs to it. */
export function answerAct(
  kind: 'handover_acknowledged' | 'handover_disputed',
  handover: Handover,
  how: Answer['how'],
  facts: Facts,
  more: Detail,
): ActDraft {
  const { id: handover_id, voucher_id, place_id, to_person_id } = handover;
  return {
    type: 'act',
    id: facts.ids.id(),
    kind,
    business_date: facts.today,
    note: null,
    documents: [],
    detail: { handover_id, voucher_id, place_id, person_id: to_person_id, how, ...more },
  };
}
