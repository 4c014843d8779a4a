/** One route per event, all alike: the body and an Idempotency-Key go to the event, its answer comes back. */
import { EVENTS } from '../../shared/events/index.ts';
import type { EventDefinition } from '../../shared/events/definition.ts';
import { factsNeededSchema } from '../../shared/schemas/facts.ts';
import { ProblemError } from '../problem.ts';
import { readFactsJson } from '../services/book/facts.ts';
import { checkBody } from '../services/events/check-body.ts';
import { checkHandoverPin } from '../services/events/check-handover-pin.ts';
import { recordEvent } from '../services/events/record-event.ts';
import type { Call, GuardedRoute, Route, SignedIn } from './route.ts';

/** The key that makes a repeated request the same request. Throws `malformed` where there is none. */
export function idempotencyKey(call: Call<SignedIn>): string {
  const key = call.request.get('idempotency-key') ?? '';
  if (/^[\w-]{8,100}$/.test(key)) return key;
  throw new ProblemError(
    'malformed',
    'The request carries no Idempotency-Key of 8 to 100 letters and figures.',
  );
}

function eventRoute(event: EventDefinition<unknown>): GuardedRoute {
  return {
    method: 'post',
    path: `/events/${event.name}`,
    allow: event.action,
    summary: event.summary,
    async handle(call) {
      const { context, who, body } = call;
      const key = idempotencyKey(call);
      await checkHandoverPin(context, body, who);
      const { status, answer } = await context.db.inScope(who, (tx) =>
        recordEvent(tx, event, { body, key, by: who }),
      );
      const last = answer.records.at(-1);
      if (last !== undefined) context.stream.changed(who.workshop_id, last.sequence);
      return { status, body: answer };
    },
  };
}

export const eventRoutes: readonly Route[] = [
  ...Object.values(EVENTS).map(eventRoute),
  {
    method: 'post',
    path: '/facts',
    allow: 'book.read',
    summary: 'The part of the book that an event is decided on, for a form’s preview.',
    async handle({ context, who, body }) {
      const needed = checkBody(factsNeededSchema, body);
      return { body: await context.db.inScope(who, (tx) => readFactsJson(tx, needed)) };
    },
  },
];
