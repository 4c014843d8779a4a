/** People: who has which role, until when; invited by e-mail, changed, ended. */
import { useState } from 'react';
import type { MemberJson } from '../../../shared/schemas/identity.ts';
import { ROLES } from '../../../shared/permissions.ts';
import { Button } from '../../components/ui/button.tsx';
import { Dialog } from '../../components/ui/dialog.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import { dayText, words } from '../../lib/formats.ts';
import { usePeople } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { useWrite } from '../../queries/writes.ts';
import { WorkshopNav } from './workshop-nav.tsx';

export function People() {
  const session = useSession();
  const people = usePeople();
  const [ending, setEnding] = useState<MemberJson | null>(null);
  const { write, problem, busy } = useWrite();
  const columns: readonly Column<MemberJson>[] = [
    { id: 'name', head: 'Name', value: (row) => row.name, cell: (row) => <b>{row.name}</b> },
    { id: 'role', head: 'Role', value: (row) => row.role, cell: (row) => words(row.role) },
    {
      id: 'until',
      head: 'Until',
      value: (row) => row.until ?? '',
      cell: (row) => (row.until === null ? <span className="none">no end</span> : dayText(row.until)),
    },
    {
      id: 'active',
      head: 'Standing',
      value: (row) => String(row.active),
      cell: (row) => <StatusWord status={row.active ? 'Active' : 'Ended'} />,
    },
    {
      id: 'end',
      head: '',
      cell: (row) =>
        row.active && session.can('people.end') && row.id !== session.person.id ? (
          <Button kind="quiet" onPress={() => setEnding(row)}>
            End the role
          </Button>
        ) : null,
    },
  ];
  return (
    <Page title="People" lede="Who may do what here." nav={<WorkshopNav />}>
      <Section heading="In this workshop">
        {problem === null ? null : <Notice severity="fault" what={problem} />}
        <RegisterTable
          caption="People"
          columns={columns}
          rows={people}
          rowKey={(row) => row.id}
          csv="people"
          empty="Nobody yet."
        />
        <Dialog
          title={`End the role of ${ending?.name ?? ''}?`}
          open={ending !== null}
          keep="Keep it"
          onClose={() => setEnding(null)}
          action={
            <Button
              kind="danger"
              busy={busy ? 'Ending …' : false}
              onPress={() =>
                void write('DELETE', `/people/${ending?.id ?? ''}/role`).then(() => setEnding(null))
              }
            >
              End the role
            </Button>
          }
        >
          <p>
            It takes effect at once, wherever that person is signed in. What he or she recorded stays in the
            book.
          </p>
        </Dialog>
      </Section>
      {session.can('people.invite') ? (
        <Section
          heading="Invite somebody"
          notes={<p>A link comes by e-mail and works once. Nobody else ever learns the password.</p>}
        >
          <Invite />
        </Section>
      ) : null}
    </Page>
  );
}

const EMPTY = { name: '', email: '', role: 'goldsmith', until: '' };

function Invite() {
  const [values, setValues] = useState(EMPTY);
  const [sent, setSent] = useState<string | null>(null);
  const { write, problem, busy } = useWrite();
  const set = (change: Partial<typeof values>) => setValues((before) => ({ ...before, ...change }));
  const send = async () => {
    const ok = await write('POST', '/invitations', { ...values, until: orNull(values.until) });
    setSent(ok ? values.email : null);
    if (ok) setValues(EMPTY);
  };
  return (
    <>
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      {sent === null ? null : <Notice severity="agreed" what={`The invitation is on its way to ${sent}.`} />}
      <div className="fields">
        <TextField label="Name" value={values.name} onChange={(name) => set({ name })} />
        <TextField
          label="E-mail address"
          type="email"
          value={values.email}
          onChange={(email) => set({ email })}
        />
        <SelectField
          label="Role"
          value={values.role}
          onChange={(role) => set({ role })}
          options={ROLES.map((role) => ({ value: role, label: words(role) }))}
        />
        <TextField
          label="Until"
          hint="Asked for auditors; else it may be left open."
          type="date"
          value={values.until}
          onChange={(until) => set({ until })}
        />
      </div>
      <p>
        <Button kind="primary" busy={busy ? 'Sending …' : false} onPress={() => void send()}>
          Send the invitation
        </Button>
      </p>
    </>
  );
}
