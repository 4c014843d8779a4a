/** What is typed of an act on a metal account, and the body of the event that it becomes. */
import { METALS } from '../../../shared/mass/vector.ts';
import type { TypedAmount } from '../../components/domain/amount.tsx';
import { noAmount, typedAmount } from '../../components/domain/amount.tsx';
import type { TypedWeighing } from '../../forms/typed.ts';
import { noWeighing, orNull, typedFigure, typedGrams, typedWeighing } from '../../forms/typed.ts';

export type SettleWay = 'draw' | 'hand_over' | 'buy' | 'sell' | 'move';

export interface SettleValues {
  readonly account_id: string;
  readonly way: SettleWay;
  readonly metal: string;
  readonly mass: string;
  readonly price_per_ozt: string;
  readonly reference: string;
  readonly supplier_id: string;
  readonly to_account_id: string;
  readonly safe_id: string;
  readonly form: string;
  readonly alloy: string;
  readonly description: string;
  readonly permille: string;
  readonly weighing: TypedWeighing;
  readonly pieces: string;
  readonly lot_id: string;
  readonly amount: TypedAmount;
}

export const noSettle: SettleValues = {
  account_id: '',
  way: 'draw',
  metal: METALS[0],
  mass: '',
  price_per_ozt: '',
  reference: '',
  supplier_id: '',
  to_account_id: '',
  safe_id: '',
  form: 'grain',
  alloy: '',
  description: '',
  permille: '',
  weighing: noWeighing,
  pieces: '',
  lot_id: '',
  amount: { ...noAmount, how: 'all' },
};

/** The event's body. Throws TypedError where a figure can't be read. */
export const settleBody = (values: SettleValues) => ({
  account_id: values.account_id,
  act: { way: values.way, ...actBody(values) },
});

function actBody(values: SettleValues): object {
  const { metal, safe_id } = values;
  switch (values.way) {
    case 'draw':
      return {
        metal,
        safe_id,
        form: values.form,
        alloy: orNull(values.alloy),
        description: values.description,
        permille: typedFigure(values.permille),
        weighing: typedWeighing(values.weighing, 'act.weighing'),
        pieces: orNull(values.pieces.trim()),
      };
    case 'hand_over':
      return { safe_id, lot_id: values.lot_id, amount: typedAmount(values.amount, 'act.amount') };
    case 'buy':
      return { supplier_id: values.supplier_id, ...dealBody(values) };
    case 'sell':
      return dealBody(values);
    case 'move':
      return { metal, mass_g: typedGrams(values.mass, 'act.mass_g'), to_account_id: values.to_account_id };
  }
}

const dealBody = (values: SettleValues) => ({
  metal: values.metal,
  mass_g: typedGrams(values.mass, 'act.mass_g'),
  price_per_ozt: orNull(typedFigure(values.price_per_ozt)),
  reference: orNull(values.reference),
});
