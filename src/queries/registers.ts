/** The workshop's registers: one query each. */
import { useSuspenseQuery } from '@tanstack/react-query';
import {
  accountRow,
  allowanceRow,
  alloyRow,
  jobRow,
  partyRow,
  periodRow,
  priceRow,
  rowsOf,
  settingRow,
} from '../../shared/schemas/registers.ts';
import { memberJson } from '../../shared/schemas/identity.ts';
import { z } from '../../shared/schemas/zod.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';

function register<T>(name: string, row: z.ZodType<T>) {
  const schema = rowsOf(row);
  return function useRegister(): readonly T[] {
    return useSuspenseQuery({ queryKey: keys.register(name), queryFn: () => get(`/${name}`, schema) }).data
      .rows;
  };
}

export const useAccounts = register('accounts', accountRow);
export const useParties = register('parties', partyRow);
export const useAlloys = register('alloys', alloyRow);
export const usePrices = register('prices', priceRow);
export const useAllowances = register('allowances', allowanceRow);
export const useJobs = register('jobs', jobRow);
export const usePeriods = register('periods', periodRow);
export const useSettings = register('settings', settingRow);

const people = z.object({ people: z.array(memberJson) });

export function usePeople() {
  return useSuspenseQuery({ queryKey: keys.register('people'), queryFn: () => get('/people', people) }).data
    .people;
}
