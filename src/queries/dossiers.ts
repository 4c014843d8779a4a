/** Audit dossiers: those that were made or are being put together, the chain's head, and asking for a new one. */
import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { z } from '../../shared/schemas/zod.ts';
import { get, send } from '../lib/api-client.ts';
import { newKey } from '../lib/kept-draft.ts';
import { keys } from './keys.ts';

const dossier = z.object({
  id: z.string(),
  state: z.string(),
  step: z.string().nullable(),
  done_parts: z.number().nullable(),
  all_parts: z.number().nullable(),
  made_at: z.string().nullable(),
  file: z.object({ document_id: z.string(), bytes: z.string(), sha256: z.string() }).nullable(),
});
export type Dossier = z.output<typeof dossier>;

const dossiers = z.object({
  dossiers: z.array(dossier),
  head: z.object({ sequence: z.string(), hash: z.string() }),
  key_id: z.string().nullable(),
});

/** Whether it is still being put together. */
export const isInHand = ({ state }: Dossier): boolean => state === 'queued' || state === 'running';

const ASKED_AGAIN_MS = 1_500;

/** Asked again while any dossier is being put together. */
export function useDossiers() {
  return useSuspenseQuery({
    queryKey: keys.list('dossiers', ''),
    queryFn: () => get('/dossiers', dossiers),
    refetchInterval: (query) => (query.state.data?.dossiers.some(isInHand) ? ASKED_AGAIN_MS : false),
  }).data;
}

export function useMakeDossier() {
  const client = useQueryClient();
  return async (): Promise<void> => {
    await send('POST', '/dossiers', { body: { as_of: null }, key: newKey() });
    await client.invalidateQueries({ queryKey: keys.list('dossiers', '') });
  };
}
