/** One's own account: theme, handover PIN, password, the workshops that one has a role in, signing out. */
import { useState } from 'react';
import { useTheme } from '../../lib/theme.ts';
import { Button } from '../../components/ui/button.tsx';
import { Choices } from '../../components/ui/choice.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useSession, useSignOut } from '../../queries/session.ts';
import { useWrite } from '../../queries/writes.ts';
import { SecondFactor } from './second-factor.tsx';

const THEMES = [
  { value: 'system', label: 'As the system', words: 'Light by day, dark by night, if the device does so.' },
  { value: 'paper', label: 'Paper', words: 'Ink on paper.' },
  { value: 'charcoal', label: 'Charcoal', words: 'For a dim workshop.' },
] as const;

export function MyAccount() {
  const session = useSession();
  const signOut = useSignOut();
  const [theme, setTheme] = useTheme();
  return (
    <Page
      title="My account"
      lede={`${session.person.name}, ${session.person.role} of ${session.workshop.name}`}
      actions={
        <Button icon="out" onPress={() => void signOut()}>
          Sign out
        </Button>
      }
    >
      <Section
        heading="Handover PIN"
        notes={
          <p>With it you take metal over at the counter. After five wrong tries it pauses for 15 minutes.</p>
        }
      >
        <TwoFields
          path="/session/pin"
          first={{ name: 'password', label: 'Your password', type: 'password' }}
          second={{
            name: 'pin',
            label: session.person.has_pin ? 'New PIN' : 'PIN',
            hint: 'Four to eight figures.',
          }}
          act="Set the PIN"
          done="The PIN is set."
        />
      </Section>
      <Section heading="Password" notes={<p>Everybody else who is signed in with it is signed out.</p>}>
        <TwoFields
          path="/session/password"
          first={{ name: 'current', label: 'Password now', type: 'password' }}
          second={{
            name: 'password',
            label: 'New password',
            hint: 'At least 15 characters. Several words in a row are easy to remember.',
          }}
          act="Change the password"
          done="The password is changed."
        />
      </Section>
      <Section
        heading="Second factor"
        notes={
          <p>
            After the password, a code of an authenticator. Whoever learns the password alone can’t sign in.
          </p>
        }
      >
        <SecondFactor />
      </Section>
      <Section heading="Look" notes={<p>Kept on this device.</p>}>
        <Choices legend="Theme" value={theme} onChange={setTheme} choices={THEMES} />
      </Section>
    </Page>
  );
}

interface Asked {
  readonly name: string;
  readonly label: string;
  readonly hint?: string;
  readonly type?: 'password';
}

function TwoFields({
  path,
  first,
  second,
  act,
  done,
}: {
  readonly path: string;
  readonly first: Asked;
  readonly second: Asked;
  readonly act: string;
  readonly done: string;
}) {
  const [values, setValues] = useState<readonly [string, string]>(['', '']);
  const [isDone, setDone] = useState(false);
  const { busy, problem, write } = useWrite();
  return (
    <form
      className="grid max-w-md gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void write('PUT', path, { [first.name]: values[0], [second.name]: values[1] }).then((ok) => {
          setDone(ok);
          if (ok) setValues(['', '']);
        });
      }}
    >
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      {isDone ? <Notice severity="agreed" what={done} /> : null}
      <TextField
        label={first.label}
        type="password"
        autoComplete="current-password"
        value={values[0]}
        onChange={(text) => setValues([text, values[1]])}
      />
      <TextField
        label={second.label}
        hint={second.hint}
        type="password"
        autoComplete="new-password"
        value={values[1]}
        onChange={(text) => setValues([values[0], text])}
      />
      <Button submit busy={busy ? 'Sending …' : false}>
        {act}
      </Button>
    </form>
  );
}
