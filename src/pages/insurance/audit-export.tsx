/** The audit export: a dossier of the whole book, put together in the background, that is checked without Grainward. */
import { useState } from 'react';
import { Button, LinkButton } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { Rosette } from '../../components/ui/rosette.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { figureText, momentText, numberText } from '../../lib/formats.ts';
import type { Dossier } from '../../queries/dossiers.ts';
import { isInHand, useDossiers, useMakeDossier } from '../../queries/dossiers.ts';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';
import { CONTENTS } from './contents.ts';
import { DossierProgress } from './dossier-progress.tsx';

export function AuditExportPage() {
  const { dossiers, head, key_id } = useDossiers();
  const inHand = dossiers.filter(isInHand);
  return (
    <Page
      title="Audit export"
      lede="for the insurer, the whole book as it stands"
      margin={<p>Insurance & audit</p>}
      actions={
        <>
          <LinkButton to={paths.verify} icon="check">
            Check a dossier
          </LinkButton>
          <Make busy={inHand.length > 0} />
        </>
      }
      first={inHand.map((dossier) => (
        <DossierProgress key={dossier.id} dossier={dossier} />
      ))}
    >
      <Section
        heading="Dossiers"
        notes={<p>Each holds the book from its first record to the last one of its hour.</p>}
      >
        <Dossiers dossiers={dossiers.filter((dossier) => !isInHand(dossier))} />
      </Section>
      <Section
        heading="What is in it"
        notes={<p>Checked without Grainward: openssl and any spreadsheet will do. VERIFY.md says how.</p>}
      >
        <div className="beside">
          <RegisterTable
            caption="Files of a dossier"
            rows={CONTENTS}
            rowKey={(row) => row.path}
            empty="No file."
            columns={[
              { id: 'path', head: 'File', cell: (row) => <b>{row.path}</b> },
              { id: 'content', head: 'Content', cell: (row) => row.content },
            ]}
          />
          <ChainHead head={head} key_id={key_id} />
        </div>
      </Section>
    </Page>
  );
}

/** Asks for a dossier; while one is being put together another is not asked for. */
function Make({ busy }: { readonly busy: boolean }) {
  const { can } = useSession();
  const make = useMakeDossier();
  const [state, setState] = useState<{ sending: boolean; problem: string | null }>({
    sending: false,
    problem: null,
  });
  if (!can('dossier.make')) return null;
  const ask = async () => {
    setState({ sending: true, problem: null });
    try {
      await make();
      setState({ sending: false, problem: null });
    } catch (error) {
      setState({
        sending: false,
        problem: error instanceof Error ? error.message : 'It could not be asked for.',
      });
    }
  };
  return (
    <>
      {state.problem === null ? null : <Notice severity="fault" what={state.problem} />}
      <Button
        kind="primary"
        icon="seal"
        busy={state.sending ? 'Asking for it …' : false}
        notYet={busy ? 'One is being put together already. Wait until it is done.' : null}
        onPress={() => void ask()}
      >
        Make the dossier
      </Button>
    </>
  );
}

function Dossiers({ dossiers }: { readonly dossiers: readonly Dossier[] }) {
  return (
    <RegisterTable
      caption="Dossiers that were made"
      rows={dossiers}
      rowKey={(row) => row.id}
      empty="No dossier was made yet."
      emptyWords="Make the first one for your insurer; the next ones name its chain head, so that nothing can be rewritten between them."
      columns={[
        {
          id: 'made_at',
          head: 'Made',
          cell: (row) =>
            row.made_at === null ? <span className="none">not yet</span> : momentText(row.made_at),
          value: (row) => row.made_at ?? '',
        },
        {
          id: 'state',
          head: 'State',
          cell: (row) => <StatusWord status={row.file === null ? 'Failed' : 'Done'} />,
        },
        {
          id: 'bytes',
          head: 'Size, bytes',
          figure: 'plain',
          cell: (row) =>
            row.file === null ? <span className="none">none</span> : figureText(row.file.bytes),
          value: (row) => row.file?.bytes ?? '',
        },
        {
          id: 'sha256',
          head: 'SHA-256',
          cell: (row) =>
            row.file === null ? (
              'Nothing was written. Make it again.'
            ) : (
              <span className="hash">{inEights(row.file.sha256)}</span>
            ),
        },
        {
          id: 'file',
          head: 'File',
          cell: (row) =>
            row.file === null ? null : (
              <a href={`/api/v1/dossiers/${row.id}/file`} download>
                Take the ZIP
              </a>
            ),
        },
      ]}
    />
  );
}

const inEights = (hash: string): string => hash.replace(/(.{8})(?=.)/g, '$1 ');

interface ChainHeadProps {
  readonly head: { readonly sequence: string; readonly hash: string };
  readonly key_id: string | null;
}

function ChainHead({ head, key_id }: ChainHeadProps) {
  return (
    <div className="chain-head">
      <Rosette hash={head.hash} size={200} name={`Rosette of the chain head, record ${head.sequence}`} />
      <p className="m-0 font-semibold">Chain head, record {numberText(head.sequence)}</p>
      <p className="hash">{inEights(head.hash)}</p>
      {key_id === null ? (
        <p className="fig-under">No key has signed yet; the first dossier brings one.</p>
      ) : (
        <>
          <p className="fig-under">Fingerprint of the key that signs</p>
          <p className="hash">{inEights(key_id)}</p>
        </>
      )}
    </div>
  );
}
