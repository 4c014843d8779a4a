/** Where a delivery comes from, its note, and the safe that it goes into. */
import type { PartyRow } from '../../../../shared/schemas/registers.ts';
import type { Option } from '../../../components/ui/select-field.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';

interface Delivery {
  readonly party_id: string;
  readonly safe_id: string;
  readonly delivery_note: string;
}

interface DeliveryFieldsProps {
  readonly form: {
    readonly values: Delivery;
    set(change: Partial<Delivery>): void;
    errorOf(field: string): string | null;
  };
  readonly senders: readonly PartyRow[];
  readonly safes: readonly Option[];
}

export function DeliveryFields({ form, senders, safes }: DeliveryFieldsProps) {
  const { values } = form;
  return (
    <div className="fields">
      <SelectField
        label="From"
        none="Choose supplier or customer"
        value={values.party_id}
        onChange={(party_id) => form.set({ party_id })}
        options={senders.map(({ id, name, kind }) => ({
          value: id,
          label: name,
          group: kind === 'supplier' ? 'Suppliers' : 'Customers',
        }))}
        error={form.errorOf('party_id')}
      />
      <TextField
        label="Delivery note"
        value={values.delivery_note}
        onChange={(delivery_note) => form.set({ delivery_note })}
        error={form.errorOf('delivery_note')}
      />
      <SelectField
        label="Into"
        none="Choose a safe"
        value={values.safe_id}
        onChange={(safe_id) => form.set({ safe_id })}
        options={safes}
        error={form.errorOf('safe_id')}
      />
    </div>
  );
}
