/** The fields of a new lot and its weighing. Choosing an alloy of the register fills its fineness in. */
import { BASES, LOT_FORMS, ORIGINS, PIECE_FORMS } from '../../../../shared/book/lot.ts';
import { METALS } from '../../../../shared/mass/vector.ts';
import type { AlloyRow } from '../../../../shared/schemas/registers.ts';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { WeightField } from '../../../components/ui/weight-field.tsx';
import { words } from '../../../lib/formats.ts';
import type { ReceiptLine } from './receipt-line.ts';
import { WeighingFields } from '../../../components/domain/weighing-fields.tsx';

interface ReceiptFieldsProps {
  readonly line: ReceiptLine;
  readonly onChange: (line: ReceiptLine) => void;
  readonly field: string;
  readonly errorOf: (field: string) => string | null;
  readonly alloys: readonly AlloyRow[];
  readonly isCustomer?: boolean;
  readonly invoice?: boolean;
}

const option = (value: string) => ({ value, label: words(value) });

export function ReceiptFields({
  line,
  onChange,
  field,
  errorOf,
  alloys,
  isCustomer = false,
  invoice = true,
}: ReceiptFieldsProps) {
  const set = (change: Partial<ReceiptLine>) => onChange({ ...line, ...change });
  const error = (name: string) => errorOf(`${field}.${name}`);
  const chooseAlloy = (name: string) => {
    const alloy = alloys.find((known) => known.name === name);
    if (alloy === undefined) set({ alloy: name });
    else
      set({
        alloy: name,
        gold: alloy.gold_permille,
        silver: alloy.silver_permille,
        platinum: alloy.platinum_permille,
        palladium: alloy.palladium_permille,
      });
  };
  return (
    <div className="grid gap-4">
      <div className="fields">
        <SelectField
          label="Form"
          value={line.form}
          onChange={(form) => set({ form })}
          options={LOT_FORMS.filter((form) => form !== 'account').map(option)}
          error={error('form')}
        />
        <TextField
          label="In a few words"
          hint="“999.9 gold grain”"
          value={line.description}
          onChange={(description) => set({ description })}
          error={error('description')}
        />
        <SelectField
          label="Alloy"
          none="None of the register"
          value={line.alloy}
          onChange={chooseAlloy}
          options={alloys
            .filter((alloy) => !alloy.retired)
            .map((alloy) => ({ value: alloy.name, label: alloy.name }))}
          error={error('alloy')}
        />
        <SelectField
          label="Fineness is"
          value={line.basis}
          onChange={(basis) => set({ basis })}
          options={BASES.map(option)}
          error={error('basis')}
        />
        <SelectField
          label="Origin"
          value={line.origin}
          onChange={(origin) => set({ origin })}
          options={ORIGINS.map(option)}
          error={error('origin')}
        />
        {invoice ? (
          <SelectField
            label="Belongs to"
            value={line.owner}
            onChange={(owner) => set({ owner: owner === 'party' ? 'party' : 'house' })}
            options={[
              { value: 'house', label: 'The house' },
              { value: 'party', label: isCustomer ? 'Stays the customer’s own' : 'Stays the supplier’s' },
            ]}
            error={error('owner_id')}
          />
        ) : null}
      </div>
      <div className="fields">
        {METALS.map((metal) => (
          <WeightField
            key={metal}
            label={words(metal)}
            unit="per 1000"
            value={line[metal]}
            onChange={(permille) => set({ [metal]: permille })}
            error={error(`${metal}_permille`)}
          />
        ))}
      </div>
      <ReceiptWeighing line={line} set={set} error={error} invoice={invoice} />
    </div>
  );
}

interface ReceiptWeighingProps {
  readonly line: ReceiptLine;
  readonly set: (change: Partial<ReceiptLine>) => void;
  readonly error: (name: string) => string | null;
  readonly invoice: boolean;
}

/** What the balance shows, beside what the invoice says. */
function ReceiptWeighing({ line, set, error, invoice }: ReceiptWeighingProps) {
  return (
    <div className="fields">
      <WeighingFields
        value={line.weighing}
        onChange={(weighing) => set({ weighing })}
        errorOf={(name) => error(`weighing.${name}`)}
        stones={line.form === 'old_gold' || line.form === 'finished_work'}
      />
      {invoice ? (
        <WeightField
          label="Invoice weight"
          hint="Empty where there is none."
          value={line.invoice}
          onChange={(text) => set({ invoice: text })}
          error={error('invoice_gross_g')}
        />
      ) : null}
      {PIECE_FORMS.some((form) => form === line.form) ? (
        <TextField
          label="Pieces"
          inputMode="numeric"
          value={line.pieces}
          onChange={(pieces) => set({ pieces })}
          error={error('pieces')}
        />
      ) : null}
    </div>
  );
}
