/** What a dossier's check found: one verdict, the key and head to compare, and every check with its findings. */
import type { Check, Verdict } from '../../../shared/dossier/finding.ts';
import type { Verification } from '../../../shared/dossier/verify.ts';
import { Notice } from '../../components/ui/notice.tsx';
import { Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { Rosette } from '../../components/ui/rosette.tsx';
import type { Status } from '../../components/ui/status-word.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { numberText } from '../../lib/formats.ts';

const WORDS: Readonly<Record<Verdict, Status>> = {
  holds: 'Holds',
  fails: 'Fails',
  cannot_be_shown: 'Cannot be shown',
};

/** Findings shown of one check; a broken chain would else fill the page. */
const SHOWN = 20;

export function VerifyResult({ name, found }: { readonly name: string; readonly found: Verification }) {
  const failed = found.checks.filter(({ verdict }) => verdict === 'fails').length;
  return (
    <>
      <Section heading="What was found" notes={<p>{name}</p>}>
        {failed === 0 ? (
          <Notice severity="agreed" what="Every check that the file can answer holds.">
            Metal that was never booked, a shared sign-in or a wrong balance can’t be seen in any export.
          </Notice>
        ) : (
          <Notice severity="fault" what={failed === 1 ? 'One check fails.' : `${failed} checks fail.`}>
            Keep the file as it is, and ask the workshop for a fresh dossier of the same book.
          </Notice>
        )}
        <RegisterTable
          caption="Checks of the dossier"
          rows={found.checks}
          rowKey={(check) => check.id}
          empty="Nothing was checked."
          columns={[
            { id: 'name', head: 'Check', cell: (check) => check.name, value: (check) => check.name },
            {
              id: 'verdict',
              head: 'Outcome',
              cell: (check) => <StatusWord status={WORDS[check.verdict]} />,
              value: (check) => check.verdict,
            },
            { id: 'findings', head: 'Where', cell: (check) => <Findings check={check} /> },
          ]}
        />
      </Section>
      {found.head === null ? null : (
        <Section
          heading="To compare"
          notes={<p>With an earlier statement, and with what the workshop told you.</p>}
        >
          <div className="beside">
            <dl className="facts">
              <div>
                <dt>Workshop</dt>
                <dd>{found.workshop ?? 'not named'}</dd>
              </div>
              <div>
                <dt>Last record</dt>
                <dd>{numberText(found.head.sequence)}</dd>
              </div>
              <div>
                <dt>Its hash</dt>
                <dd className="hash">{inEights(found.head.hash)}</dd>
              </div>
              <div>
                <dt>Fingerprint of the key</dt>
                <dd className="hash">{found.key_id === null ? 'no key' : inEights(found.key_id)}</dd>
              </div>
            </dl>
            <div className="chain-head">
              <Rosette hash={found.head.hash} size={180} name={`Rosette of record ${found.head.sequence}`} />
            </div>
          </div>
        </Section>
      )}
    </>
  );
}

const inEights = (hash: string): string => hash.replace(/(.{8})(?=.)/g, '$1 ');

function Findings({ check }: { readonly check: Check }) {
  const more = check.findings.length - SHOWN;
  return (
    <>
      {check.findings.slice(0, SHOWN).map(({ at, sentence }) => (
        <p key={`${at ?? ''}${sentence}`} className="m-0">
          {at === null ? null : <b>{/^\d+$/.test(at) ? `Record ${numberText(at)}: ` : `${at}: `}</b>}
          {sentence}
        </p>
      ))}
      {more > 0 ? <p className="m-0">{more} more of the same check.</p> : null}
    </>
  );
}
