/** The fields that an act on a metal account needs, by what is done. */
import { LOT_FORMS, PIECE_FORMS } from '../../../shared/book/lot.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { AmountFields } from '../../components/domain/amount.tsx';
import { lotOptions } from '../../components/domain/lot-options.ts';
import { placeOptions } from '../../components/domain/places.ts';
import { WeighingFields } from '../../components/domain/weighing-fields.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { words } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts, useAlloys, useParties } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import type { SettleValues } from './settle-values.ts';

export interface SettleFieldsProps {
  readonly values: SettleValues;
  readonly set: (change: Partial<SettleValues>) => void;
  readonly errorOf: (field: string) => string | null;
}

export function SettleFields(props: SettleFieldsProps) {
  switch (props.values.way) {
    case 'draw':
      return <DrawFields {...props} />;
    case 'hand_over':
      return <HandOverFields {...props} />;
    case 'buy':
    case 'sell':
      return <DealFields {...props} />;
    case 'move':
      return <MoveFields {...props} />;
  }
}

function MetalField({ values, set, errorOf }: SettleFieldsProps) {
  return (
    <SelectField
      label="Metal"
      value={values.metal}
      onChange={(metal) => set({ metal })}
      options={METALS.map((metal) => ({ value: metal, label: metalName(metal) }))}
      error={errorOf('act.metal')}
    />
  );
}

function MassField({ values, set, errorOf }: SettleFieldsProps) {
  return (
    <WeightField
      label="Fine metal"
      value={values.mass}
      onChange={(mass) => set({ mass })}
      error={errorOf('act.mass_g')}
    />
  );
}

function SafeField({ values, set, errorOf }: SettleFieldsProps) {
  return (
    <SelectField
      label={values.way === 'draw' ? 'Into' : 'Out of'}
      none="Choose a safe"
      value={values.safe_id}
      onChange={(safe_id) => set({ safe_id })}
      options={placeOptions(useAccounts(), ['safe'])}
      error={errorOf('act.safe_id')}
    />
  );
}

function DrawFields(props: SettleFieldsProps) {
  const { values, set, errorOf } = props;
  const alloys = useAlloys().filter(({ retired }) => !retired);
  return (
    <>
      <MetalField {...props} />
      <SafeField {...props} />
      <SelectField
        label="Form"
        value={values.form}
        onChange={(form) => set({ form })}
        options={LOT_FORMS.filter((form) => form !== 'account').map((form) => ({
          value: form,
          label: words(form),
        }))}
        error={errorOf('act.form')}
      />
      <SelectField
        label="Alloy"
        none="None of the register"
        value={values.alloy}
        onChange={(alloy) => set({ alloy })}
        options={alloys.map(({ name }) => ({ value: name, label: name }))}
        error={errorOf('act.alloy')}
      />
      <TextField
        label="In a few words"
        value={values.description}
        onChange={(description) => set({ description })}
        error={errorOf('act.description')}
      />
      <WeightField
        label="Fineness"
        unit="per 1000"
        value={values.permille}
        onChange={(permille) => set({ permille })}
        error={errorOf('act.permille')}
      />
      <WeighingFields
        value={values.weighing}
        onChange={(weighing) => set({ weighing })}
        errorOf={(field) => errorOf(`act.weighing.${field}`)}
      />
      {PIECE_FORMS.some((form) => form === values.form) ? (
        <TextField
          label="Pieces"
          inputMode="numeric"
          value={values.pieces}
          onChange={(pieces) => set({ pieces })}
          error={errorOf('act.pieces')}
        />
      ) : null}
    </>
  );
}

function HandOverFields(props: SettleFieldsProps) {
  const { values, set, errorOf } = props;
  const facts = useFacts({ place_ids: values.safe_id === '' ? [] : [values.safe_id] });
  return (
    <>
      <SafeField {...props} />
      <SelectField
        label="Lot"
        none="Choose a lot"
        value={values.lot_id}
        onChange={(lot_id) => set({ lot_id })}
        options={lotOptions(facts, values.safe_id)}
        error={errorOf('act.lot_id')}
      />
      <div className="col-span-full">
        <AmountFields
          value={values.amount}
          onChange={(amount) => set({ amount })}
          field="act.amount"
          errorOf={errorOf}
        />
      </div>
    </>
  );
}

function DealFields(props: SettleFieldsProps) {
  const { values, set, errorOf } = props;
  const { workshop } = useSession();
  const suppliers = useParties().filter(({ kind }) => kind === 'supplier');
  return (
    <>
      <MetalField {...props} />
      <MassField {...props} />
      {values.way === 'buy' ? (
        <SelectField
          label="From"
          none="Choose a supplier"
          value={values.supplier_id}
          onChange={(supplier_id) => set({ supplier_id })}
          options={suppliers.map(({ id, name }) => ({ value: id, label: name }))}
          error={errorOf('act.supplier_id')}
        />
      ) : null}
      <WeightField
        label="Price per troy ounce"
        unit={workshop.currency}
        value={values.price_per_ozt}
        onChange={(price_per_ozt) => set({ price_per_ozt })}
        error={errorOf('act.price_per_ozt')}
      />
      <TextField
        label="What the price rests on"
        hint="Fixing, invoice or contract note"
        value={values.reference}
        onChange={(reference) => set({ reference })}
        error={errorOf('act.reference')}
      />
    </>
  );
}

function MoveFields(props: SettleFieldsProps) {
  const { values, set, errorOf } = props;
  const others = useAccounts().filter(({ id }) => id !== values.account_id);
  return (
    <>
      <MetalField {...props} />
      <MassField {...props} />
      <SelectField
        label="To"
        none="Choose another account"
        value={values.to_account_id}
        onChange={(to_account_id) => set({ to_account_id })}
        options={placeOptions(others, ['metal_account'])}
        error={errorOf('act.to_account_id')}
      />
    </>
  );
}
