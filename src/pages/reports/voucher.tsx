/** One voucher whole: entries that balance, what it knows, its weighings, who answers for it, and the hash that seals it. */
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { isVoucherKind } from '../../../shared/book/kinds.ts';
import type { VoucherWhole } from '../../../shared/schemas/vouchers.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { Rosette } from '../../components/ui/rosette.tsx';
import { dayText, longDayText, momentText, numberText, words } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import { useVoucher } from '../../queries/vouchers.ts';
import { paths } from '../../app/paths.ts';
import { CorrectDialog } from './correct-dialog.tsx';
import { ReportNav } from './nav.tsx';
import { ReverseDialog } from './reverse-dialog.tsx';
import { DetailFacts, DetailLists } from './voucher-detail.tsx';
import { EntriesTable } from './voucher-entries.tsx';

export function VoucherPage() {
  const { id = '' } = useParams();
  const voucher = useVoucher(id);
  const moves = isVoucherKind(voucher.kind);
  return (
    <Page
      title={`${words(voucher.kind)}, number ${numberText(voucher.sequence)}`}
      lede={longDayText(voucher.business_date)}
      nav={<ReportNav />}
      margin={<Signed voucher={voucher} />}
      actions={<Actions voucher={voucher} />}
      first={<Fate voucher={voucher} />}
    >
      {moves ? (
        <Section heading="Entries" notes={<p>They sum to nothing, in gross and in each metal.</p>}>
          <EntriesTable entries={voucher.entries} />
        </Section>
      ) : null}
      <Section heading="What it knows" notes={voucher.note === null ? undefined : <p>{voucher.note}</p>}>
        <DetailFacts voucher={voucher} />
      </Section>
      <DetailLists voucher={voucher} />
      <Handovers voucher={voucher} />
      <Documents voucher={voucher} />
      <Section
        heading="Its seal"
        notes={<p>SHA-256 of the record’s exact line, which names the hash before it.</p>}
      >
        <div className="beside">
          <dl className="facts">
            <div>
              <dt>Hash</dt>
              <dd className="hash">{inEights(voucher.hash)}</dd>
            </div>
            <div>
              <dt>Hash of the record before</dt>
              <dd className="hash">{inEights(voucher.previous_hash)}</dd>
            </div>
          </dl>
          <div className="chain-head">
            <Rosette hash={voucher.hash} size={150} name={`Rosette of number ${voucher.sequence}`} />
          </div>
        </div>
      </Section>
    </Page>
  );
}

const inEights = (hash: string): string => hash.replace(/(.{8})(?=.)/g, '$1 ');

function Signed({ voucher }: { readonly voucher: VoucherWhole }) {
  return (
    <>
      <p>
        Recorded by {voucher.recorded_by_name}, {momentText(voucher.recorded_at)}.
      </p>
      {voucher.approved_by_name === null ? null : (
        <p>
          {voucher.approved_by === voucher.recorded_by
            ? `Signed by ${voucher.approved_by_name} alone, single-handed.`
            : `Signed by ${voucher.approved_by_name}.`}
        </p>
      )}
    </>
  );
}

/** What became of it: reversed, or itself the undoing or mending of another. */
function Fate({ voucher }: { readonly voucher: VoucherWhole }) {
  const corrects = voucher.detail['corrects'];
  return (
    <>
      {voucher.reversed_by === null ? null : (
        <Notice
          severity="fault"
          what="This voucher was reversed."
          action={<Link to={paths.voucher(voucher.reversed_by)}>Open the reversal</Link>}
        >
          It stands here as it was recorded; nothing of it counts any more.
        </Notice>
      )}
      {voucher.reverses === null ? null : (
        <p>
          It undoes <Link to={paths.voucher(voucher.reverses)}>the voucher that it mirrors</Link>.
        </p>
      )}
      {typeof corrects === 'string' ? (
        <p>
          It mends <Link to={paths.voucher(corrects)}>the voucher that was wrong</Link>, by the difference
          only.
        </p>
      ) : null}
    </>
  );
}

function Actions({ voucher }: { readonly voucher: VoucherWhole }) {
  const session = useSession();
  const [open, setOpen] = useState<'reverse' | 'correct' | null>(null);
  const close = () => setOpen(null);
  const mendable = isVoucherKind(voucher.kind) && voucher.reversed_by === null && voucher.kind !== 'reversal';
  return (
    <>
      <Button icon="print" onPress={() => window.print()}>
        Print
      </Button>
      {mendable && voucher.kind !== 'correction' && session.can('book.correct') ? (
        <>
          <Button icon="sign" onPress={() => setOpen('correct')}>
            Correct
          </Button>
          <CorrectDialog voucher={voucher} open={open === 'correct'} onClose={close} />
        </>
      ) : null}
      {mendable && session.can('book.reverse') ? (
        <>
          <Button kind="danger" icon="undo" onPress={() => setOpen('reverse')}>
            Reverse
          </Button>
          <ReverseDialog voucher={voucher} open={open === 'reverse'} onClose={close} />
        </>
      ) : null}
    </>
  );
}

const HANDOVER_WORDS: Readonly<Record<string, string>> = {
  waiting: 'has not acknowledged',
  acknowledged: 'has acknowledged',
  disputed: 'disputes the weight',
};

function Handovers({ voucher }: { readonly voucher: VoucherWhole }) {
  if (voucher.handovers.length === 0) return null;
  return (
    <Section heading="Handed over" notes={<p>Until it is acknowledged, the giver answers for it.</p>}>
      <ul className="link-rows">
        {voucher.handovers.map((handover) => (
          <li key={handover.id}>
            <b>{handover.place_name}</b>
            <span>
              From {handover.from_name}. {handover.to_name} {HANDOVER_WORDS[handover.state] ?? handover.state}
              .
            </span>
          </li>
        ))}
      </ul>
    </Section>
  );
}

function Documents({ voucher }: { readonly voucher: VoucherWhole }) {
  if (voucher.documents.length === 0) return null;
  return (
    <Section heading="Papers" notes={<p>Kept by their digest: another file would not fit the record.</p>}>
      <ul className="link-rows">
        {voucher.documents.map((document) => (
          <li key={document.id}>
            <a href={`/api/v1/documents/${document.id}`}>
              {document.name ?? `paper of ${dayText(voucher.business_date)}`}
            </a>
            <span className="hash">{inEights(document.sha256)}</span>
          </li>
        ))}
      </ul>
    </Section>
  );
}
