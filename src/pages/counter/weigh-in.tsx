/** Weighing in a delivery: line by line at the balance, beside what the invoice says; a difference asks for a decision. */
import { useState } from 'react';
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { orNull } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts, useAlloys, useParties } from '../../queries/registers.ts';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { DeliveryFields } from './parts/delivery-fields.tsx';
import type { ReceiptLine } from './parts/receipt-line.ts';
import { emptyLine, lineBody } from './parts/receipt-line.ts';
import { ReceiptFields } from './parts/receipt-fields.tsx';
import { LineList } from './parts/line-list.tsx';
import { ReceiptDecision, ReceiptReckoning, reckonReceipt } from './parts/receipt-reckoning.tsx';

interface WeighInValues {
  readonly party_id: string;
  readonly safe_id: string;
  readonly delivery_note: string;
  readonly lines: readonly ReceiptLine[];
}

export function WeighIn() {
  const accounts = useAccounts();
  const parties = useParties();
  const alloys = useAlloys();
  const facts = useFacts({});
  const posted = usePosted();
  const [at, setAt] = useState(0);
  const form = useEventForm<WeighInValues>({
    event: 'weigh-in',
    name: 'weigh-in',
    initial: { party_id: '', safe_id: onlyPlace(accounts, 'safe'), delivery_note: '', lines: [emptyLine] },
    toBody: (values) => ({
      party_id: values.party_id,
      safe_id: values.safe_id,
      delivery_note: orNull(values.delivery_note),
      lines: values.lines.map((line, index) => lineBody(line, `lines.${index}`, values.party_id)),
    }),
    onPosted: (answer) => {
      setAt(0);
      posted(answer);
    },
  });
  const { values, set, errorOf } = form;
  const line = values.lines[at] ?? emptyLine;
  const change = (next: ReceiptLine) =>
    set({ lines: values.lines.map((one, index) => (index === at ? next : one)) });
  const reckoned = reckonReceipt(line, facts);
  const senders = parties.filter((party) => party.kind === 'supplier' || party.kind === 'customer');
  return (
    <>
      <Page title="Weigh in" lede="Booked is what the balance shows." margin="Counter">
        <Section heading="Delivery">
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <DeliveryFields form={form} senders={senders} safes={placeOptions(accounts, ['safe'])} />
        </Section>
        <Section
          heading={`Line ${at + 1}`}
          notes={
            <>
              <p>A new lot is on hold until its acceptance checks are in.</p>
              <LineList
                lines={values.lines}
                at={at}
                onGo={setAt}
                onAdd={() => {
                  set({ lines: [...values.lines, emptyLine] });
                  setAt(values.lines.length);
                }}
                onTakeAway={() => {
                  set({ lines: values.lines.filter((_, index) => index !== at) });
                  setAt(0);
                }}
              />
            </>
          }
        >
          <div className="work-and-reckoning">
            <div>
              <ReceiptFields
                line={line}
                onChange={change}
                field={`lines.${at}`}
                errorOf={errorOf}
                alloys={alloys}
                isCustomer={senders.find((party) => party.id === values.party_id)?.kind === 'customer'}
              />
              <ReceiptDecision
                reckoned={reckoned}
                decision={line.decision}
                onDecide={(decision) => change({ ...line, decision })}
                error={errorOf(`lines.${at}.decision`)}
              />
            </div>
            <ReceiptReckoning reckoned={reckoned} facts={facts} />
          </div>
        </Section>
        <Section heading="What will be posted">
          {form.records === null ? (
            <p className="none">Nothing yet. Enter the first line and its weight.</p>
          ) : (
            <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
          )}
        </Section>
      </Page>
      <PostBar form={form} act="Post the weigh-in" />
    </>
  );
}
