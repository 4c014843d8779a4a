/** Mends a voucher: what its lines should have weighed, and which line takes the difference. */
import { useNavigate } from 'react-router-dom';
import { MASS_KEYS } from '../../../shared/mass/vector.ts';
import type { VoucherEntry, VoucherWhole } from '../../../shared/schemas/vouchers.ts';
import { Button } from '../../components/ui/button.tsx';
import { Dialog } from '../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useToast } from '../../components/ui/toast.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { typedGrams } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { gramsFigure, isNothing, numberText } from '../../lib/formats.ts';
import { paths } from '../../app/paths.ts';
import type { VoucherDialogProps } from './reverse-dialog.tsx';

interface Typed {
  /** Right gross by line, without its sign; empty where the line was right. */
  readonly right: Readonly<Record<string, string>>;
  readonly rest_line: string;
  readonly reason: string;
}

const NOTHING: Typed = { right: {}, rest_line: '', reason: '' };

/** The body of a correction: a line keeps the side that it was booked on. */
function bodyOf(typed: Typed, voucher: VoucherWhole) {
  const wrong = voucher.entries.filter((entry) => (typed.right[entry.line] ?? '').trim() !== '');
  return {
    voucher_id: voucher.id,
    reason: typed.reason,
    rest_line: typed.rest_line === '' ? null : typed.rest_line,
    lines: wrong.map((entry, at) => ({
      line: entry.line,
      gross_g: `${isOut(entry) ? '-' : ''}${typedGrams(typed.right[entry.line] ?? '', `lines.${at}.gross_g`)}`,
    })),
  };
}

const isOut = (entry: VoucherEntry): boolean =>
  MASS_KEYS.some((key) => !isNothing(entry[`${key}_g`]) && entry[`${key}_g`].startsWith('-'));

const nameOf = (entry: VoucherEntry): string =>
  `${entry.line}: ${isOut(entry) ? 'out of' : 'into'} ${entry.account_name}, ${entry.lot_code}`;

export function CorrectDialog({ voucher, open, onClose }: VoucherDialogProps) {
  const toast = useToast();
  const navigate = useNavigate();
  const number = numberText(voucher.sequence);
  const form = useEventForm<Typed>({
    event: 'correction',
    name: `correction-${voucher.id}`,
    initial: NOTHING,
    toBody: (typed) => bodyOf(typed, voucher),
    onPosted: (answer) => {
      onClose();
      const posted = answer.records.at(-1);
      if (posted === undefined) {
        toast({ words: `The correction of ${number} waits for a second signature.`, to: paths.signatures });
      } else {
        toast({ words: `Voucher ${number} is corrected.`, to: paths.voucher(posted.id) });
        void navigate(paths.voucher(posted.id));
      }
    },
  });
  const { values } = form;
  const wrong = voucher.entries.filter((entry) => (values.right[entry.line] ?? '').trim() !== '');
  return (
    <Dialog
      title={`Correct voucher ${number}?`}
      open={open}
      keep="Keep it"
      onClose={onClose}
      action={
        <Button kind="primary" busy={form.busy ? 'Posting …' : false} onPress={() => void form.submit()}>
          Post the correction
        </Button>
      }
    >
      <p>The difference only is posted, with today’s date. A second person has to sign it first.</p>
      <ErrorSummary errors={form.errors} shown={form.tried} />
      {voucher.entries.map((entry) => (
        <WeightField
          key={entry.line}
          label={nameOf(entry)}
          hint={`booked ${gramsFigure(entry.gross_g.replace('-', ''))} g gross; leave it empty where that was right`}
          value={values.right[entry.line] ?? ''}
          onChange={(grams) => form.set({ right: { ...values.right, [entry.line]: grams } })}
          error={form.errorOf(`lines.${wrong.indexOf(entry)}.gross_g`)}
        />
      ))}
      <SelectField
        label="The line that takes the difference"
        none="None: the lines above add up by themselves"
        value={values.rest_line}
        onChange={(rest_line) => form.set({ rest_line })}
        options={voucher.entries.map((entry) => ({ value: entry.line, label: nameOf(entry) }))}
        error={form.errorOf('rest_line')}
      />
      <TextField
        label="Reason"
        lines={3}
        value={values.reason}
        onChange={(reason) => form.set({ reason })}
        error={form.errorOf('reason')}
      />
    </Dialog>
  );
}
