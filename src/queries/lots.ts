/** Lots: the list by filter, one whole, what the scan field finds. */
import type { InfiniteData, UseInfiniteQueryResult } from '@tanstack/react-query';
import { useInfiniteQuery, useSuspenseQuery } from '@tanstack/react-query';
import { lotPage, lotWhole } from '../../shared/schemas/lots.ts';
import { searchHit } from '../../shared/schemas/search.ts';
import { z } from '../../shared/schemas/zod.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';

/** A list read page by page: `query` is its address without the cursor. */
export function usePages<Page extends { readonly next_cursor: string | null }>(
  path: string,
  query: string,
  page: z.ZodType<Page>,
): UseInfiniteQueryResult<InfiniteData<Page>> {
  return useInfiniteQuery({
    queryKey: keys.list(path, query),
    initialPageParam: '',
    queryFn: ({ pageParam }) =>
      get(`${path}?${query}${pageParam === '' ? '' : `&cursor=${pageParam}`}`, page),
    getNextPageParam: (last) => last.next_cursor,
  });
}

export const useLots = (query: string) => usePages('/lots', query, lotPage);

export function useLot(id: string) {
  return useSuspenseQuery({ queryKey: keys.one('lot', id), queryFn: () => get(`/lots/${id}`, lotWhole) })
    .data;
}

const hits = z.object({ hits: z.array(searchHit) });

export const search = (q: string) =>
  get(`/search?q=${encodeURIComponent(q)}`, hits).then((answer) => answer.hits);
