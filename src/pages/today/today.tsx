/** Today: what is out of the safe and with whom, what waits at the counter, where the house's metal lies. */
import { paths } from '../../app/paths.ts';
import { LinkButton } from '../../components/ui/button.tsx';
import { Figure, LabelledFigure } from '../../components/ui/figure.tsx';
import { IndexPlate } from '../../components/ui/index-plate.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { dayText, longDayText, moneyText } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import { useToday } from '../../queries/today.ts';
import { Holders } from './holders.tsx';
import { House } from './house.tsx';
import { CounterQueue } from './queue.tsx';

export function Today() {
  const session = useSession();
  const day = useToday();
  const gold = day.prices.find((price) => price.metal === 'gold');
  return (
    <Page
      title="Today"
      margin={
        <p>
          Business day
          <br />
          <b className="text-ink">{longDayText(day.today)}</b>
        </p>
      }
      actions={
        session.can('book.weigh_in') ? (
          <>
            <LinkButton to={paths.weighIn} kind="primary" icon="in">
              Weigh in
            </LinkButton>
            <LinkButton to={paths.issue} icon="out">
              Issue
            </LinkButton>
            <LinkButton to={paths.weighBack} icon="back">
              Weigh back
            </LinkButton>
          </>
        ) : undefined
      }
    >
      <Section
        heading="Out of the safe"
        notes={
          <>
            <p>
              {day.holders.length === 0
                ? 'Nobody holds metal.'
                : `${day.holders.length} holders. Every figure opens its vouchers.`}
            </p>
            {gold === undefined ? (
              <p>No gold price is entered, so nothing is valued.</p>
            ) : (
              <p>
                Price of {dayText(gold.priced_on)}: gold {moneyText(gold.price_per_ozt, gold.currency, true)}{' '}
                per troy ounce, {gold.source}.
              </p>
            )}
          </>
        }
      >
        <ValueOut day={day} />
        <Holders day={day} />
      </Section>
      <Section heading="At the counter" notes={<p>What waits for somebody, oldest first.</p>}>
        <CounterQueue day={day} />
      </Section>
      <Section
        heading="In the house"
        notes={<p>Fine grams by place. Sweeps are estimates until the refiner settles.</p>}
      >
        <House day={day} />
      </Section>
    </Page>
  );
}

function ValueOut({ day }: { readonly day: ReturnType<typeof useToday> }) {
  if (day.value_out === null || day.holders.length === 0) return null;
  const limit = day.night_limit;
  const [value, most] = [Number.parseFloat(day.value_out), Number.parseFloat(limit ?? '0')];
  const over = limit !== null && value > most;
  return (
    <div className="figures mb-5">
      <LabelledFigure
        label="Out of the safe now"
        under={
          limit === null ? 'no night limit is set' : `of ${moneyText(limit, day.currency)} allowed at night`
        }
      >
        <Figure text={moneyText(day.value_out, day.currency)} />
      </LabelledFigure>
      {limit === null ? null : (
        <div className="min-w-[280px] flex-1">
          <IndexPlate
            value={value}
            limit={most}
            limitName="night limit"
            finding={`${moneyText(day.value_out, day.currency)} is out of the safe; ${moneyText(limit, day.currency)} may be out at night`}
          />
        </div>
      )}
      {over ? (
        <LabelledFigure label="" under="at least, before closing">
          <StatusWord status="Must come back" />
          <br />
          <Figure text={moneyText((value - most).toFixed(2), day.currency)} />
        </LabelledFigure>
      ) : null}
    </div>
  );
}
