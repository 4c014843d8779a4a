/** Reports: balances, losses, reconciliation, refiners, owners' statements. A new filter keeps the figures before it on screen until its own come. */
import { useDeferredValue } from 'react';
import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { balancesJson, lossesJson, reconciliationJson } from '../../shared/schemas/reports.ts';
import { ownerStatementJson, refinersJson } from '../../shared/schemas/statements.ts';
import type { z } from '../../shared/schemas/zod.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';
import { usePages } from './lots.ts';

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

/** Consignments to refiners, page by page. */
export const useRefiners = (query: string) => usePages('/reports/refiners', query, refinersJson);

/** One owner's metal statement; for nobody there is none to read. */
export function useOwnerStatement(party_id: string, days: Readonly<Record<'from' | 'to', string>>) {
  const query = new URLSearchParams(days).toString();
  return useQuery({
    queryKey: keys.list(`/reports/statements/owner/${party_id}`, query),
    queryFn: () => get(`/reports/statements/owner/${party_id}?${query}`, ownerStatementJson),
    enabled: party_id !== '',
  });
}
