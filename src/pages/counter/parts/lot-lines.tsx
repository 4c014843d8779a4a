/** The lots of an act, chosen from what lies at the place, each with how much of it. */
import type { Facts } from '../../../../shared/book/facts.ts';
import { PIECE_FORMS } from '../../../../shared/book/lot.ts';
import { Button } from '../../../components/ui/button.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import type { TypedAmount } from '../../../components/domain/amount.tsx';
import { lotOptions } from '../../../components/domain/lot-options.ts';
import { AmountFields, noAmount } from '../../../components/domain/amount.tsx';

interface Line {
  readonly lot_id: string;
  readonly amount: TypedAmount;
}

interface LotLinesProps {
  readonly facts: Facts;
  readonly place_id: string;
  readonly lines: readonly Line[];
  readonly onChange: (lines: readonly Line[]) => void;
  readonly errorOf: (field: string) => string | null;
  readonly stated: boolean;
  readonly single: boolean;
}

export function LotLines({ facts, place_id, lines, onChange, errorOf, stated, single }: LotLinesProps) {
  const options = lotOptions(facts, place_id);
  const change = (index: number, line: Line) => onChange(lines.map((one, at) => (at === index ? line : one)));
  if (place_id === '')
    return <p className="none mt-4">Choose the place first; then the lots that lie there show here.</p>;
  if (options.length === 0) return <p className="none mt-4">Nothing lies there.</p>;
  return (
    <div className="mt-5 grid gap-5">
      {lines.map((line, index) => {
        const form = facts.lots.get(line.lot_id)?.form;
        return (
          <div key={index} className="grid gap-3 border-t border-ink pt-3">
            <SelectField
              label={`Lot ${index + 1}`}
              none="Choose a lot"
              value={line.lot_id}
              onChange={(lot_id) => change(index, { ...line, lot_id })}
              options={options}
              error={errorOf(single ? 'lot_id' : `lines.${index}.lot_id`)}
            />
            <AmountFields
              value={line.amount}
              onChange={(amount) => change(index, { ...line, amount })}
              field={single ? 'amount' : `lines.${index}.amount`}
              errorOf={errorOf}
              stated={stated}
              counted={PIECE_FORMS.some((counted) => counted === form)}
            />
            <div>
              <Button kind="quiet" onPress={() => onChange(lines.filter((_, at) => at !== index))}>
                Take the line away
              </Button>
            </div>
          </div>
        );
      })}
      {single && lines.length > 0 ? null : (
        <div>
          <Button icon="plus" onPress={() => onChange([...lines, { lot_id: '', amount: noAmount }])}>
            Add a lot
          </Button>
        </div>
      )}
    </div>
  );
}
