/** Writes that are no events: sent, then what they change is read again. */
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { send } from '../lib/api-client.ts';
import { keys } from './keys.ts';

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
