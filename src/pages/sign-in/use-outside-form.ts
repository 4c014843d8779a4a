/** Sending one of the forms outside: busy while it goes, refusals by field, nothing lost that was typed. */
import { useState } from 'react';
import { ApiProblem, speakAs } from '../../lib/api-client.ts';

interface Problem {
  readonly code: string | null;
  readonly sentence: string;
  readonly fields: ReadonlyMap<string, string>;
}

export function useOutsideForm(action: () => Promise<void>) {
  const [state, setState] = useState<{
    busy: boolean;
    problem: Problem | null;
  }>({
    busy: false,
    problem: null,
  });
  return {
    busy: state.busy,
    problem: state.problem?.sentence ?? null,
    /** The refusal's code, so that a form can ask for what is missing. */
    code: state.problem?.code ?? null,
    errorOf: (field: string) => state.problem?.fields.get(field) ?? null,
    async submit() {
      if (state.busy) return;
      setState({ busy: true, problem: null });
      speakAs(null);
      try {
        await action();
        setState({ busy: false, problem: null });
      } catch (error) {
        setState({ busy: false, problem: problemOf(error) });
      }
    },
  };
}

function problemOf(error: unknown): Problem {
  if (error instanceof ApiProblem) {
    return {
      code: error.code,
      sentence: error.message,
      fields: new Map(error.errors.map(({ field, sentence }) => [field ?? '', sentence])),
    };
  }
  return {
    code: null,
    sentence: error instanceof Error ? error.message : 'Something failed. Try again.',
    fields: new Map<string, string>(),
  };
}
