/** After a post: says what was posted with its number, and goes on to where the next task is. */
import { useNavigate } from 'react-router-dom';
import type { EventAnswer } from '../../../shared/schemas/event-answer.ts';
import { useToast } from '../ui/toast.tsx';
import { numberText } from '../../lib/formats.ts';

export function usePosted(next: string | null = null): (answer: EventAnswer) => void {
  const show = useToast();
  const navigate = useNavigate();
  return (answer) => {
    const last = answer.records.at(-1);
    if (last === undefined)
      show({ words: 'It waits for a second signature. Nothing is posted yet.', to: '/signatures' });
    else
      show({
        words: `Voucher ${numberText(last.sequence)} posted.`,
        to: `/reports/vouchers/${last.sequence}`,
      });
    if (next !== null) void navigate(next);
  };
}
