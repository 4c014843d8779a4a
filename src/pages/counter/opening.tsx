/** Opening stock: what was counted when the book began. */
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { typedWeighing } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts, useAlloys } from '../../queries/registers.ts';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { ReceiptFields } from './parts/receipt-fields.tsx';
import type { ReceiptLine } from './parts/receipt-line.ts';
import { emptyLine, newLotBody } from './parts/receipt-line.ts';
import { usePosted } from '../../components/domain/use-posted.ts';

interface OpeningLine {
  readonly place_id: string;
  readonly line: ReceiptLine;
}

export function Opening() {
  const accounts = useAccounts();
  const alloys = useAlloys();
  const facts = useFacts({});
  const posted = usePosted();
  const first: OpeningLine = { place_id: onlyPlace(accounts, 'safe'), line: emptyLine };
  const form = useEventForm<{ readonly lines: readonly OpeningLine[] }>({
    event: 'opening',
    name: 'opening',
    initial: { lines: [first] },
    toBody: ({ lines }) => ({
      lines: lines.map(({ place_id, line }, index) => ({
        place_id,
        ...newLotBody(line, null),
        weighing: typedWeighing(line.weighing, `lines.${index}.weighing`),
      })),
    }),
    onPosted: posted,
  });
  const { lines } = form.values;
  const change = (index: number, next: OpeningLine) =>
    form.set({ lines: lines.map((one, at) => (at === index ? next : one)) });
  return (
    <>
      <Page title="Opening stock" lede="What was there when the book began." margin="Counter">
        {lines.map((one, index) => (
          <Section key={index} heading={`Line ${index + 1}`}>
            {index === 0 ? <ErrorSummary errors={form.errors} shown={form.tried} /> : null}
            <div className="mb-4">
              <SelectField
                label="Where it lies"
                none="Choose a place"
                value={one.place_id}
                onChange={(place_id) => change(index, { ...one, place_id })}
                options={placeOptions(accounts, ['safe', 'bench', 'station', 'bin', 'outworker', 'refiner'])}
                error={form.errorOf(`lines.${index}.place_id`)}
              />
            </div>
            <ReceiptFields
              line={one.line}
              onChange={(line) => change(index, { ...one, line })}
              field={`lines.${index}`}
              errorOf={form.errorOf}
              alloys={alloys}
              invoice={false}
            />
            {lines.length > 1 ? (
              <Button kind="quiet" onPress={() => form.set({ lines: lines.filter((_, at) => at !== index) })}>
                Take the line away
              </Button>
            ) : null}
          </Section>
        ))}
        <Section heading="What will be posted">
          <p>
            <Button icon="plus" onPress={() => form.set({ lines: [...lines, first] })}>
              Add a line
            </Button>
          </p>
          {form.records === null ? (
            <p className="none">Nothing yet. Enter what was counted.</p>
          ) : (
            <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
          )}
        </Section>
      </Page>
      <PostBar form={form} act="Post the opening stock" />
    </>
  );
}
