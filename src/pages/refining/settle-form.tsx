/** An act on a metal account: drawing, handing over, buying or fixing, selling, moving. */
import type { Facts } from '../../../shared/book/facts.ts';
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { usePosted } from '../../components/domain/use-posted.ts';
import { Button } from '../../components/ui/button.tsx';
import type { Choice } from '../../components/ui/choice.tsx';
import { Choices } from '../../components/ui/choice.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useAccounts } from '../../queries/registers.ts';
import { SettleFields } from './settle-fields.tsx';
import type { SettleValues, SettleWay } from './settle-values.ts';
import { noSettle, settleBody } from './settle-values.ts';

const WAYS: readonly Choice<SettleWay>[] = [
  { value: 'draw', label: 'Draw metal', words: 'Account to safe, weighed in. It is the house’s at once.' },
  { value: 'hand_over', label: 'Hand metal over', words: 'A lot leaves the safe onto the account.' },
  { value: 'buy', label: 'Buy or fix', words: 'Bought onto the account, or what was drawn is fixed.' },
  { value: 'sell', label: 'Sell', words: 'Sold from the account for money.' },
  { value: 'move', label: 'Move', words: 'To another metal account.' },
];

export function SettleForm({ facts }: { readonly facts: Facts }) {
  const accounts = useAccounts();
  const form = useEventForm<SettleValues>({
    event: 'settle',
    name: 'settle',
    initial: {
      ...noSettle,
      account_id: onlyPlace(accounts, 'metal_account'),
      safe_id: onlyPlace(accounts, 'safe'),
    },
    toBody: settleBody,
    onPosted: usePosted(),
  });
  const { values, set, errorOf } = form;
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void form.submit();
      }}
    >
      <Section
        heading="On an account"
        notes={<p>Metal that is taken unfixed is a draw: the debt stands until it is fixed.</p>}
      >
        <ErrorSummary errors={form.errors} shown={form.tried} />
        <Choices
          legend="What is done"
          value={values.way}
          onChange={(way) => set({ way })}
          choices={WAYS}
          error={errorOf('act')}
        />
        <div className="fields mt-5">
          <SelectField
            label="Metal account"
            none="Choose an account"
            value={values.account_id}
            onChange={(account_id) => set({ account_id })}
            options={placeOptions(accounts, ['metal_account'])}
            error={errorOf('account_id')}
          />
          <SettleFields values={values} set={set} errorOf={errorOf} />
        </div>
      </Section>
      <Section heading="What is posted">
        {form.records === null ? (
          <p className="none mt-0">What will be posted shows here as soon as the mass is in.</p>
        ) : (
          <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
        )}
        <div className="flex flex-wrap gap-3">
          <Button submit kind="primary" busy={form.busy ? 'Posting …' : false}>
            Post it to the account
          </Button>
          <Button kind="quiet" onPress={form.reset}>
            Empty the form
          </Button>
        </div>
      </Section>
    </form>
  );
}
