/** How what is credited is paid: onto a metal account, in metal that comes back, or in money; each metal may be split. */
import type { Facts } from '../../../shared/book/facts.ts';
import { claimOf } from '../../../shared/events/refining/standing-lot.ts';
import { Button } from '../../components/ui/button.tsx';
import { Choices } from '../../components/ui/choice.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { placeOptions } from '../../components/domain/places.ts';
import type { EventForm } from '../../forms/use-event-form.ts';
import { ugFigure } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import type { OutturnValues, TypedPayment } from './outturn-values.ts';
import { creditedMetals, creditedOf, paidUg, paymentsOf } from './outturn-values.ts';

interface OutturnPaymentsProps {
  readonly form: EventForm<OutturnValues>;
  readonly account_id: string;
}

export function OutturnPayments({ form, account_id }: OutturnPaymentsProps) {
  const { values, set, errorOf } = form;
  const payments = paymentsOf(values, account_id);
  const accounts = useAccounts().filter(({ kind }) => kind === 'metal_account');
  const facts = useFacts({ place_ids: accounts.map(({ id }) => id) });
  const change = (payment: TypedPayment, next: readonly TypedPayment[]) =>
    set({ payments: payments.flatMap((one) => (one === payment ? next : [one])) });
  if (payments.length === 0)
    return <p className="none">Enter what is credited first; then its payment is chosen here.</p>;
  const wrong = errorOf('payments');
  return (
    <>
      {payments.map((payment, at) => (
        <PaymentFields
          key={at}
          payment={payment}
          whole={ugFigure(paidUg(payment, payments, values))}
          facts={facts}
          onChange={(next) => change(payment, [next])}
          onRemove={
            payments.filter((one) => one.metal === payment.metal).length > 1
              ? () => change(payment, [])
              : null
          }
          onSplit={() => change(payment, [payment, { ...payment, way: 'money', mass: '', amount: '' }])}
          errorOf={(field) => errorOf(`payments.${at}.${field}`)}
        />
      ))}
      {wrong === null ? null : <p className="choices-error">{wrong}</p>}
      <dl className="facts">
        {creditedMetals(values).map((metal) => (
          <div key={metal}>
            <dt>{metalName(metal)} credited, all of it paid</dt>
            <dd className="fig">{ugFigure(creditedOf(values, metal))} g</dd>
          </div>
        ))}
      </dl>
    </>
  );
}

interface PaymentFieldsProps {
  readonly payment: TypedPayment;
  readonly whole: string;
  readonly facts: Facts;
  readonly onChange: (payment: TypedPayment) => void;
  readonly onRemove: (() => void) | null;
  readonly onSplit: () => void;
  readonly errorOf: (field: string) => string | null;
}

function PaymentFields({ payment, whole, facts, onChange, onRemove, onSplit, errorOf }: PaymentFieldsProps) {
  const accounts = useAccounts();
  const { workshop } = useSession();
  const metal = metalName(payment.metal).toLowerCase();
  const stands =
    payment.account_id === ''
      ? 'Choose which one'
      : `Stands at ${ugFigure(claimOf(facts, payment.account_id, payment.metal))} g ${metal}`;
  return (
    <div className="mb-6">
      <Choices
        legend={`${metalName(payment.metal)}, ${whole} g`}
        value={payment.way}
        onChange={(way) => onChange({ ...payment, way })}
        choices={[
          { value: 'metal_account', label: 'To our metal account', words: stands },
          {
            value: 'returned',
            label: 'Metal returned',
            words: 'A new lot at the refiner, weighed in when it comes',
          },
          { value: 'money', label: 'Paid in money', words: 'At their fixing, written on the statement' },
        ]}
      />
      <div className="fields mt-3">
        {payment.way === 'metal_account' ? (
          <SelectField
            label="Metal account"
            none="Choose an account"
            value={payment.account_id}
            onChange={(account_id) => onChange({ ...payment, account_id })}
            options={placeOptions(accounts, ['metal_account'])}
            error={errorOf('account_id')}
          />
        ) : null}
        {payment.way === 'money' ? (
          <WeightField
            label="Amount paid"
            unit={workshop.currency}
            value={payment.amount}
            onChange={(amount) => onChange({ ...payment, amount })}
            error={errorOf('amount')}
          />
        ) : null}
        <WeightField
          label={`Of the ${metal}`}
          hint="Empty for all that is left of it"
          value={payment.mass}
          onChange={(mass) => onChange({ ...payment, mass })}
          error={errorOf('mass_g')}
        />
        <Button kind="quiet" onPress={onSplit}>
          Split this payment
        </Button>
        {onRemove === null ? null : (
          <Button kind="quiet" onPress={onRemove}>
            Take this part away
          </Button>
        )}
      </div>
    </div>
  );
}
