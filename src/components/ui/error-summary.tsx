/** What keeps a form from being posted, said at once; it takes the focus, and the fields keep their own messages. */
import { useEffect, useRef } from 'react';
import type { FieldError } from '../../forms/use-event-form.ts';

const COUNTS = ['', 'One thing keeps', 'Two things keep', 'Three things keep', 'Four things keep'];

export function ErrorSummary({
  errors,
  shown,
}: {
  readonly errors: readonly FieldError[];
  readonly shown: boolean;
}) {
  const box = useRef<HTMLDivElement>(null);
  const sentences = [...new Set(errors.map((error) => error.sentence))];
  const many = sentences.length;
  useEffect(() => {
    if (shown && many > 0) box.current?.focus();
  }, [shown, many]);
  if (!shown || many === 0) return null;
  return (
    <div className="summary" role="alert" tabIndex={-1} ref={box}>
      <h2>{COUNTS[many] ?? `${many} things keep`} this from being posted</h2>
      {sentences.map((sentence) => (
        <div key={sentence}>{sentence}</div>
      ))}
    </div>
  );
}
