/** Asks whether a voucher is to be reversed, for what reason, and says what will be in the book afterwards. */
import { useNavigate } from 'react-router-dom';
import type { VoucherWhole } from '../../../shared/schemas/vouchers.ts';
import { Button } from '../../components/ui/button.tsx';
import { Dialog } from '../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useToast } from '../../components/ui/toast.tsx';
import { useEventForm } from '../../forms/use-event-form.ts';
import { numberText } from '../../lib/formats.ts';
import { paths } from '../../app/paths.ts';

export interface VoucherDialogProps {
  readonly voucher: VoucherWhole;
  readonly open: boolean;
  readonly onClose: () => void;
}

export function ReverseDialog({ voucher, open, onClose }: VoucherDialogProps) {
  const toast = useToast();
  const navigate = useNavigate();
  const number = numberText(voucher.sequence);
  const form = useEventForm({
    event: 'reversal',
    name: `reversal-${voucher.id}`,
    initial: { reason: '' },
    toBody: ({ reason }) => ({ voucher_id: voucher.id, reason }),
    onPosted: (answer) => {
      onClose();
      const posted = answer.records.at(-1);
      if (posted === undefined) {
        toast({ words: `The reversal of ${number} waits for a second signature.`, to: paths.signatures });
      } else {
        toast({ words: `Voucher ${number} is reversed.`, to: paths.voucher(posted.id) });
        void navigate(paths.voucher(posted.id));
      }
    },
  });
  return (
    <Dialog
      title={`Reverse voucher ${number}?`}
      open={open}
      keep="Keep it"
      onClose={onClose}
      action={
        <Button kind="danger" busy={form.busy ? 'Posting …' : false} onPress={() => void form.submit()}>
          Reverse voucher
        </Button>
      }
    >
      <p>
        Its exact mirror image is posted, once, and both stay in the book. A second person has to sign it
        first.
      </p>
      <ErrorSummary errors={form.errors} shown={form.tried} />
      <TextField
        label="Reason"
        lines={3}
        value={form.values.reason}
        onChange={(reason) => form.set({ reason })}
        error={form.errorOf('reason')}
      />
    </Dialog>
  );
}
