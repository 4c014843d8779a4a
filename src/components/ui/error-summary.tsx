/**
 * What keeps a form from being posted, said at once: it takes the focus, each sentence leads to the field that it
 * stands beside, and the fields keep their own messages.
 */
import { useEffect, useRef } from 'react';
import type { FieldError } from '../../forms/use-event-form.ts';

const COUNTS = ['', 'One thing keeps', 'Two things keep', 'Three things keep', 'Four things keep'];

interface ErrorSummaryProps {
  readonly errors: readonly FieldError[];
  readonly shown: boolean;
}

export function ErrorSummary({ errors, shown }: ErrorSummaryProps) {
  const box = useRef<HTMLDivElement>(null);
  const sentences = [...new Set(errors.map((error) => error.sentence))];
  const fields = new Set(errors.filter((error) => error.field !== null).map((error) => error.sentence));
  const many = sentences.length;
  useEffect(() => {
    if (shown && many > 0) box.current?.focus();
  }, [shown, many]);
  if (!shown || many === 0) return null;
  return (
    <div className="summary" role="alert" tabIndex={-1} ref={box}>
      <h2>{COUNTS[many] ?? `${many} things keep`} this from being posted</h2>
      <ul>
        {sentences.map((sentence) => (
          <li key={sentence}>
            {fields.has(sentence) ? (
              <button type="button" onClick={() => focusBeside(sentence)}>
                {sentence}
              </button>
            ) : (
              sentence
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}

/** Puts the focus in the first field that carries the sentence. */
function focusBeside(sentence: string): void {
  const beside = [...document.querySelectorAll<HTMLElement>('[data-error]')].find(
    (field) => field.dataset['error'] === sentence,
  );
  const control = beside?.querySelector<HTMLElement>('input, select, textarea');
  control?.scrollIntoView({ block: 'center' });
  control?.focus({ preventScroll: true });
}
