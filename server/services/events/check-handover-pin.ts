/** Where a handover is answered at the counter, the receiver's PIN is checked here, before the event is recorded. */
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { checkPin } from '../identity/pins.ts';
import type { PersonInWorkshop } from './person.ts';

const answeredByPin = z.object({ how: z.literal('pin'), pin: z.string(), voucher_id: z.uuid() });

/** Checks the PIN of a handover's receiver; anything that is not such an answer passes. Throws `wrong_pin`. */
export async function checkHandoverPin(
  context: AppContext,
  body: unknown,
  by: PersonInWorkshop,
): Promise<void> {
  const answer = answeredByPin.safeParse(body);
  if (!answer.success) return;
  const scope = { workshop_id: by.workshop_id, user_id: null };
  const handover = await context.db.inScope(scope, (tx) =>
    tx.maybe(
      z.object({ to_person_id: z.string() }),
      `SELECT to_person_id::text FROM handover WHERE workshop_id = current_workshop() AND voucher_id = $1::uuid
        AND state <> 'acknowledged' LIMIT 1`,
      [answer.data.voucher_id],
    ),
  );
  if (handover !== null) await checkPin(context, by.workshop_id, handover.to_person_id, answer.data.pin);
}
