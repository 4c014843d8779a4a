/**
 * The heart of every form that records an event: values as they are typed, kept over a reload; a live preview by the
 * event's own pure function; posted once, under a key that stays the same until the server has answered.
 *
 *   const form = useEventForm({ event: 'hold', name: `hold-${lot.id}`, initial: { reason: '' },
 *     toBody: (values) => ({ lot_id: lot.id, reason: values.reason }) });
 *   <TextField label="Reason" value={form.values.reason} onChange={(reason) => form.set({ reason })}
 *     error={form.errorOf('reason')} />
 */
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { RecordDraft } from '../../shared/book/draft.ts';
import type { EventName } from '../../shared/events/definition.ts';
import { EVENTS } from '../../shared/events/index.ts';
import { eventAnswer } from '../../shared/schemas/event-answer.ts';
import type { EventAnswer } from '../../shared/schemas/event-answer.ts';
import { ApiProblem, OfflineError, send } from '../lib/api-client.ts';
import { dropDraft, keepDraft, newKey, readDraft } from '../lib/kept-draft.ts';
import { keys } from '../queries/keys.ts';
import { usePreviewFacts } from '../queries/facts.ts';
import { useSession } from '../queries/session.ts';

export interface FieldError {
  readonly field: string | null;
  readonly sentence: string;
}

export interface EventFormOptions<Values extends object> {
  readonly event: EventName;
  /** Names the draft: one form for one thing. */
  readonly name: string;
  readonly initial: Values;
  /** The JSON body of the event, from what is typed; may throw TypedError where a figure can't be read. */
  readonly toBody: (values: Values) => object;
  readonly onPosted?: (answer: EventAnswer) => void;
  /** False for who may not read the book: then the server alone reckons what is posted. */
  readonly preview?: boolean;
}

export interface EventForm<Values extends object> {
  readonly values: Values;
  readonly set: (change: Partial<Values>) => void;
  /** What would be posted, where everything fits. */
  readonly records: readonly RecordDraft[] | null;
  /** Why two people have to sign, where they have to. */
  readonly second_signature: string | null;
  /** What keeps it from being posted; shown once posting was tried. */
  readonly errors: readonly FieldError[];
  readonly tried: boolean;
  readonly errorOf: (field: string) => string | null;
  readonly busy: boolean;
  readonly offline: boolean;
  readonly submit: () => Promise<void>;
  /** Empties the form. */
  readonly reset: () => void;
  readonly answer: EventAnswer | null;
}

/** What was typed can't be read as what is asked for; stands beside its field. */
export class TypedError extends Error {
  readonly field: string;

  constructor(field: string, sentence: string) {
    super(sentence);
    this.field = field;
  }
}

export function useEventForm<Values extends object>(options: EventFormOptions<Values>): EventForm<Values> {
  const session = useSession();
  const client = useQueryClient();
  const name = `${session.workshop.id}.${session.user.id}.${options.name}`;
  const [state, setState] = useState(() => begin(name, options.initial));
  const [refused, setRefused] = useState<readonly FieldError[]>([]);
  const [flags, setFlags] = useState({ busy: false, offline: false, tried: false });
  const [answer, setAnswer] = useState<EventAnswer | null>(null);
  const preview = usePreview(options, state.values);

  const set = (change: Partial<Values>) => {
    const values = { ...state.values, ...change };
    setState({ ...state, values });
    setRefused([]);
    keepDraft(name, { key: state.key, values: { ...values } });
  };
  const reset = () => {
    dropDraft(name);
    setState({ key: newKey(), values: options.initial });
    setRefused([]);
    setFlags({ busy: false, offline: false, tried: false });
  };
  const submit = async () => {
    if (flags.busy) return;
    if (preview.body === null || (preview.errors.length > 0 && !flags.offline)) {
      setFlags({ ...flags, tried: true });
      return;
    }
    setFlags({ busy: true, offline: false, tried: true });
    // Kept before it is sent: a reload while the answer is on its way must find the same key.
    keepDraft(name, { key: state.key, values: plain(state.values) });
    try {
      const posted = eventAnswer.parse(
        await send('POST', `/events/${options.event}`, { body: preview.body, key: state.key }),
      );
      reset();
      setAnswer(posted);
      await client.invalidateQueries({ queryKey: keys.book });
      void client.invalidateQueries({ queryKey: keys.session });
      options.onPosted?.(posted);
    } catch (error) {
      setFlags({ busy: false, offline: error instanceof OfflineError, tried: true });
      setRefused(errorsOf(error));
      if (error instanceof ApiProblem && error.isRefusal) {
        // The server has refused: what is sent next is another request. After a fault of its own, whether it was
        // recorded can't be known, so the same key goes again.
        const key = newKey();
        setState({ ...state, key });
        keepDraft(name, { key, values: plain(state.values) });
        await client.invalidateQueries({ queryKey: keys.book });
      }
    }
  };
  const errors = refused.length > 0 ? refused : preview.errors;
  return {
    values: state.values,
    set,
    records: preview.records,
    second_signature: preview.second_signature,
    errors,
    ...flags,
    errorOf: (field) =>
      flags.tried ? (errors.find((error) => error.field === field)?.sentence ?? null) : null,
    submit,
    reset,
    answer,
  };
}

const plain = (values: object): Record<string, unknown> => Object.fromEntries(Object.entries(values));

function begin<Values extends object>(name: string, initial: Values): { key: string; values: Values } {
  const kept = readDraft(name);
  return kept === null
    ? { key: newKey(), values: initial }
    : { key: kept.key, values: { ...initial, ...kept.values } };
}

function errorsOf(error: unknown): readonly FieldError[] {
  if (error instanceof ApiProblem)
    return error.errors.length > 0 ? error.errors : [{ field: null, sentence: error.message }];
  if (error instanceof Error) return [{ field: null, sentence: error.message }];
  throw error;
}

interface Preview {
  readonly body: object | null;
  readonly records: readonly RecordDraft[] | null;
  readonly second_signature: string | null;
  readonly errors: readonly FieldError[];
}

/** Runs the event's own schema and draft on what is typed. */
function usePreview<Values extends object>(options: EventFormOptions<Values>, values: Values): Preview {
  const session = useSession();
  const event = EVENTS[options.event];
  const typed = typedBody(options, values);
  const parsed = typed.body === null ? null : event.schema.safeParse(typed.body);
  const facts = usePreviewFacts(
    parsed?.success === true && options.preview !== false ? event.needs(parsed.data) : null,
  );
  const nothing = { body: typed.body, records: null, second_signature: null };
  if (typed.body === null) return { ...nothing, errors: typed.errors };
  if (parsed?.success !== true) {
    const issues = parsed?.error.issues ?? [];
    return {
      ...nothing,
      errors: issues.map((issue) => ({ field: issue.path.join('.') || null, sentence: issue.message })),
    };
  }
  if (facts === null) return { ...nothing, errors: [] };
  const outcome = event.draft(parsed.data, facts, {
    person_id: session.person.id,
    role: session.person.role,
  });
  if (!outcome.ok) return { ...nothing, errors: outcome.refusals };
  const { records, second_signature } = outcome.value;
  return { body: typed.body, records, second_signature, errors: [] };
}

function typedBody<Values extends object>(options: EventFormOptions<Values>, values: Values) {
  try {
    return { body: options.toBody(values), errors: [] };
  } catch (error) {
    if (error instanceof TypedError)
      return { body: null, errors: [{ field: error.field, sentence: error.message }] };
    throw error;
  }
}
