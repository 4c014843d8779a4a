/** Who is signed in, where, and what he or she may do. */
import { queryOptions, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import type { Action } from '../../shared/permissions.ts';
import { sessionJson } from '../../shared/schemas/identity.ts';
import type { SessionJson } from '../../shared/schemas/identity.ts';
import { get, send, speakAs } from '../lib/api-client.ts';
import { keys } from './keys.ts';

export const sessionQuery = queryOptions({
  queryKey: keys.session,
  queryFn: async () => {
    const session = await get('/session', sessionJson);
    speakAs(session.person.id);
    return session;
  },
  retry: false,
  staleTime: 30_000,
});

export interface Session extends SessionJson {
  /** Whether the role that one has here may do an action. */
  readonly can: (action: Action) => boolean;
}

export function useSession(): Session {
  const { data } = useSuspenseQuery(sessionQuery);
  return { ...data, can: (action) => data.may.includes(action) };
}

/** Signs out and forgets everything that was read. */
export function useSignOut(): () => Promise<void> {
  const client = useQueryClient();
  return async () => {
    await send('DELETE', '/session');
    client.clear();
    window.location.assign('/sign-in');
  };
}

/** Goes into another workshop; nothing of the one before stays on screen. */
export function useEnterWorkshop(): (workshop_id: string) => Promise<void> {
  const client = useQueryClient();
  return async (workshop_id) => {
    await send('POST', '/session/workshop', { body: { workshop_id } });
    client.clear();
    window.location.assign('/');
  };
}
