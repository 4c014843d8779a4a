/** One consignment: how far it has come, its packages, its arrival, and where its outturn is entered. */
import { Link, useParams } from 'react-router-dom';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { LinkButton } from '../../components/ui/button.tsx';
import { Empty } from '../../components/ui/empty.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { dayText, moneyText, numberText, ugFigure, words } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';
import { ArriveForm } from './arrive-form.tsx';
import { ConsignmentSteps } from './consignment-steps.tsx';
import type { Step } from './consignment-steps.tsx';
import { FineMasses } from './fine-masses.tsx';
import { RefiningNav } from './nav.tsx';
import { useConsignment } from './use-consignment.ts';
import type { Consignment, HeldLot } from './use-consignment.ts';

export function ConsignmentPage() {
  const { id = '' } = useParams();
  const consignment = useConsignment(id);
  if (consignment === null)
    return (
      <Page
        title="No consignment"
        nav={<RefiningNav />}
        first={
          <Empty
            what="That voucher is no consignment."
            action={<Link to={paths.refining}>To sweeps and refining</Link>}
          />
        }
      />
    );
  return <Whole consignment={consignment} />;
}

function stepOf({ on_the_way, at_destination }: Consignment): Step {
  if (on_the_way.length > 0) return 'sent';
  return at_destination.length > 0 ? 'received' : 'credited';
}

function Whole({ consignment }: { readonly consignment: Consignment }) {
  const { can, workshop } = useSession();
  const { code, destination, courier, on_the_way, at_destination, outturns, declared_value } = consignment;
  return (
    <Page
      title={`Consignment ${code}`}
      lede={`to ${destination?.name ?? 'a place outside'}`}
      nav={<RefiningNav />}
      margin={
        <>
          <p>
            Voucher <Link to={paths.voucher(consignment.id)}>{numberText(consignment.sequence)}</Link>, with{' '}
            {courier?.name ?? 'a courier'}.
          </p>
          {declared_value === null ? null : (
            <p>Declared at {moneyText(declared_value, workshop.currency)}.</p>
          )}
        </>
      }
      actions={
        at_destination.length > 0 && can('book.outturn') ? (
          <LinkButton kind="primary" icon="refiner" to={paths.outturn(consignment.id)}>
            Enter the outturn
          </LinkButton>
        ) : null
      }
      first={
        <>
          {consignment.reversed ? (
            <Notice severity="fault" what="This consignment was reversed.">
              Nothing of it is on the way.
            </Notice>
          ) : null}
          <ConsignmentSteps consignment={consignment} now={stepOf(consignment)} />
        </>
      }
    >
      {on_the_way.length > 0 ? (
        <Section heading="Arrival" notes={<p>The weight that the receiver found, lot by lot.</p>}>
          {can('book.consign') ? (
            <ArriveForm consign_id={consignment.id} lots={on_the_way} />
          ) : (
            <LotTable caption="Lots on the way" rows={on_the_way} />
          )}
        </Section>
      ) : null}
      {at_destination.length > 0 ? (
        <Section heading="There, not settled yet" notes={<p>What an outturn has not settled stays there.</p>}>
          <LotTable caption="Lots that are not settled" rows={at_destination} />
        </Section>
      ) : null}
      <Section heading="Packages">
        <RegisterTable
          caption="Packages and seals"
          rows={consignment.packages}
          rowKey={(row) => row.seal}
          empty="No package is named."
          columns={[
            { id: 'seal', head: 'Seal', cell: (row) => row.seal, value: (row) => row.seal },
            { id: 'content', head: 'What is in it', cell: (row) => row.content, value: (row) => row.content },
          ]}
        />
      </Section>
      <Section heading="Outturns">
        <RegisterTable
          caption="Outturns of this consignment"
          rows={outturns}
          rowKey={(row) => row.id}
          empty="No outturn is entered yet."
          emptyWords="The refiner’s statement settles it once the consignment has arrived."
          columns={[
            {
              id: 'sequence',
              head: 'Voucher',
              cell: (row) => <Link to={paths.voucher(row.id)}>{numberText(row.sequence)}</Link>,
            },
            { id: 'statement', head: 'Statement', cell: (row) => text(row.detail['statement']) },
            { id: 'stage', head: 'Stage', cell: (row) => words(text(row.detail['stage'])) },
            { id: 'date', head: 'Of', cell: (row) => dayText(row.business_date) },
          ]}
        />
      </Section>
    </Page>
  );
}

const text = (value: unknown): string => (typeof value === 'string' ? value : 'none named');

function LotTable({ caption, rows }: { readonly caption: string; readonly rows: readonly HeldLot[] }) {
  return (
    <RegisterTable
      caption={caption}
      rows={rows}
      rowKey={(row) => row.lot_id}
      empty="No lot is left."
      columns={[
        { id: 'lot', head: 'Lot', cell: (row) => <LotChip {...row.lot} />, value: (row) => row.lot.code },
        { id: 'basis', head: 'Content is', cell: (row) => words(row.lot.basis) },
        { id: 'fine', head: 'Fine, g', figure: 'fine', cell: (row) => <FineMasses mass={row.mass} /> },
        { id: 'gross', head: 'Gross, g', figure: 'gross', cell: (row) => ugFigure(row.mass.gross) },
      ]}
    />
  );
}
