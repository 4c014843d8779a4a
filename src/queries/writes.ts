/** Writes that are no events: sent, then what they change is read again. */
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { z } from '../../shared/schemas/zod.ts';
import { send } from '../lib/api-client.ts';
import { keys } from './keys.ts';

/** Asks for something by a write and gives its answer by schema; null where it was refused, or has no answer. */
export function useAsked() {
  const client = useQueryClient();
  const [state, setState] = useState<{ busy: boolean; problem: string | null }>({
    busy: false,
    problem: null,
  });
  const ask = async <T>(
    method: 'POST' | 'PUT',
    path: string,
    body: object,
    answer: z.ZodType<T> | null,
  ): Promise<T | null> => {
    setState({ busy: true, problem: null });
    try {
      const sent = await send(method, path, { body });
      await client.invalidateQueries({ queryKey: keys.session });
      setState({ busy: false, problem: null });
      return answer === null ? null : answer.parse(sent);
    } catch (error) {
      const sentence = error instanceof Error ? error.message : 'Something failed. Try again.';
      setState({ busy: false, problem: sentence });
      return null;
    }
  };
  return { ...state, ask };
}

/** Sends a write and reads the book anew; `problem` is the sentence of a refusal. */
export function useWrite() {
  const client = useQueryClient();
  const [state, setState] = useState<{ busy: boolean; problem: string | null }>({
    busy: false,
    problem: null,
  });
  const write = async (method: 'POST' | 'PUT' | 'DELETE', path: string, body?: object): Promise<boolean> => {
    setState({ busy: true, problem: null });
    try {
      await send(method, path, body === undefined ? {} : { body });
      await client.invalidateQueries({ queryKey: keys.book });
      await client.invalidateQueries({ queryKey: keys.session });
      setState({ busy: false, problem: null });
      return true;
    } catch (error) {
      setState({
        busy: false,
        problem: error instanceof Error ? error.message : 'Something failed. Try again.',
      });
      return false;
    }
  };
  return { ...state, write };
}
