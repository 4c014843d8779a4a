/** What waits for a second signature, and what is done with it. */
import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { eventAnswer } from '../../shared/schemas/event-answer.ts';
import type { EventAnswer } from '../../shared/schemas/event-answer.ts';
import { signatureRequest } from '../../shared/schemas/signature-request.ts';
import { z } from '../../shared/schemas/zod.ts';
import { get, send } from '../lib/api-client.ts';
import { keys } from './keys.ts';

const waiting = z.object({ requests: z.array(signatureRequest) });

export function useSignatureRequests() {
  return useSuspenseQuery({
    queryKey: keys.list('signature-requests', ''),
    queryFn: () => get('/signature-requests', waiting),
  }).data.requests;
}

/** Signs, refuses and withdraws; each throws ApiProblem where the server refuses it. */
export function useDecideSignature() {
  const client = useQueryClient();
  const refresh = async () => {
    await client.invalidateQueries({ queryKey: keys.book });
    await client.invalidateQueries({ queryKey: keys.session });
  };
  const path = (id: string, act: string) => `/signature-requests/${id}/${act}`;
  return {
    async sign(id: string, key: string): Promise<EventAnswer> {
      const answer = eventAnswer.parse(await send('POST', path(id, 'approve'), { key }));
      await refresh();
      return answer;
    },
    async refuse(id: string, note: string, key: string): Promise<void> {
      await send('POST', path(id, 'refuse'), { body: { note }, key });
      await refresh();
    },
    async withdraw(id: string, key: string): Promise<void> {
      await send('POST', path(id, 'withdraw'), { key });
      await refresh();
    },
  };
}
