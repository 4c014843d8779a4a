/** Sending one of the forms outside: busy while it goes, refusals by field, nothing lost that was typed. */
import { useState } from 'react';
import { ApiProblem } from '../../lib/api-client.ts';

export function useOutsideForm(action: () => Promise<void>) {
  const [state, setState] = useState<{
    busy: boolean;
    problem: { sentence: string; fields: ReadonlyMap<string, string> } | null;
  }>({
    busy: false,
    problem: null,
  });
  return {
    busy: state.busy,
    problem: state.problem?.sentence ?? null,
    errorOf: (field: string) => state.problem?.fields.get(field) ?? null,
    async submit() {
      if (state.busy) return;
      setState({ busy: true, problem: null });
      try {
        await action();
        setState({ busy: false, problem: null });
      } catch (error) {
        setState({ busy: false, problem: problemOf(error) });
      }
    },
  };
}

function problemOf(error: unknown) {
  if (error instanceof ApiProblem) {
    return {
      sentence: error.message,
      fields: new Map(error.errors.map(({ field, sentence }) => [field ?? '', sentence])),
    };
  }
  return {
    sentence: error instanceof Error ? error.message : 'Something failed. Try again.',
    fields: new Map<string, string>(),
  };
}
