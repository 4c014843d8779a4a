/** How much of a lot leaves a place: weighed, by count, all of it, or stated where nobody could weigh it. */
import type { TypedWeighing } from '../../forms/typed.ts';
import { noWeighing, typedGrams, typedWeighing } from '../../forms/typed.ts';
import { CheckBox } from '../ui/choice.tsx';
import { SelectField } from '../ui/select-field.tsx';
import { TextField } from '../ui/text-field.tsx';
import { WeightField } from '../ui/weight-field.tsx';
import { WeighingFields } from './weighing-fields.tsx';

export interface TypedAmount {
  readonly how: 'weighed' | 'pieces' | 'all' | 'stated';
  readonly weighing: TypedWeighing;
  readonly pieces: string;
  readonly gross: string;
  readonly emptied: boolean;
}

export const noAmount: TypedAmount = {
  how: 'weighed',
  weighing: noWeighing,
  pieces: '',
  gross: '',
  emptied: false,
};

/** The amount of a body; `field` is its path. */
export function typedAmount(amount: TypedAmount, field: string): object {
  const pieces = amount.pieces.trim() === '' ? null : amount.pieces.trim();
  switch (amount.how) {
    case 'all':
      return { how: 'all' };
    case 'pieces':
      return { how: 'pieces', pieces: amount.pieces.trim() };
    case 'stated':
      return { how: 'stated', gross_g: typedGrams(amount.gross, `${field}.gross_g`), pieces };
    case 'weighed':
      return {
        how: 'weighed',
        weighing: typedWeighing(amount.weighing, `${field}.weighing`),
        pieces,
        emptied: amount.emptied,
      };
  }
}

interface AmountFieldsProps {
  readonly value: TypedAmount;
  readonly onChange: (value: TypedAmount) => void;
  readonly field: string;
  readonly errorOf: (field: string) => string | null;
  readonly stated?: boolean;
  readonly counted?: boolean;
}

export function AmountFields({
  value,
  onChange,
  field,
  errorOf,
  stated = false,
  counted = false,
}: AmountFieldsProps) {
  const ways = [
    { value: 'weighed', label: 'Weighed on the balance' },
    { value: 'all', label: 'All of it, as it stands in the book' },
    { value: 'pieces', label: 'By the piece, at its mean mass' },
    ...(stated ? [{ value: 'stated', label: 'A mass that nobody could weigh' }] : []),
  ];
  return (
    <div className="fields">
      <SelectField
        label="How much"
        value={value.how}
        onChange={(how) =>
          onChange({ ...value, how: ways.some((way) => way.value === how) ? asHow(how) : value.how })
        }
        options={ways}
        error={errorOf(field)}
      />
      {value.how === 'weighed' ? (
        <>
          <WeighingFields
            value={value.weighing}
            onChange={(weighing) => onChange({ ...value, weighing })}
            errorOf={(name) => errorOf(`${field}.weighing.${name}`)}
          />
          <CheckBox
            label="The container is now empty"
            checked={value.emptied}
            onChange={(emptied) => onChange({ ...value, emptied })}
          />
        </>
      ) : null}
      {value.how === 'stated' ? (
        <WeightField
          label="Gross"
          value={value.gross}
          onChange={(gross) => onChange({ ...value, gross })}
          error={errorOf(`${field}.gross_g`)}
        />
      ) : null}
      {value.how === 'pieces' || (counted && value.how !== 'all') ? (
        <TextField
          label="Pieces"
          inputMode="numeric"
          value={value.pieces}
          onChange={(pieces) => onChange({ ...value, pieces })}
          error={errorOf(`${field}.pieces`)}
        />
      ) : null}
    </div>
  );
}

function asHow(text: string): TypedAmount['how'] {
  return text === 'all' || text === 'pieces' || text === 'stated' ? text : 'weighed';
}
