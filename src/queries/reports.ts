/** Reports: balances, losses, reconciliation. A new filter keeps the figures before it on screen until its own come. */
import { useDeferredValue } from 'react';
import { useSuspenseQuery } from '@tanstack/react-query';
import { balancesJson, lossesJson, reconciliationJson } from '../../shared/schemas/reports.ts';
import type { z } from '../../shared/schemas/zod.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';

function report<T>(path: string, schema: z.ZodType<T>) {
  return function useReport(filter: Readonly<Record<string, string>>): T {
    const query = useDeferredValue(new URLSearchParams(filter).toString());
    return useSuspenseQuery({
      queryKey: keys.list(path, query),
      queryFn: () => get(`${path}?${query}`, schema),
    }).data;
  };
}

export const useBalances = report('/reports/balances', balancesJson);
export const useLosses = report('/reports/losses', lossesJson);
export const useReconciliation = report('/reports/reconciliation', reconciliationJson);
