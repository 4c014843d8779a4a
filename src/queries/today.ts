/** The keeper's day and the goldsmith's bench. */
import { useSuspenseQuery } from '@tanstack/react-query';
import { myBenchJson, todayJson } from '../../shared/schemas/today.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';

export const useToday = () =>
  useSuspenseQuery({ queryKey: keys.register('today'), queryFn: () => get('/today', todayJson) }).data;

export const useMyBench = () =>
  useSuspenseQuery({ queryKey: keys.register('my-bench'), queryFn: () => get('/my-bench', myBenchJson) })
    .data;
