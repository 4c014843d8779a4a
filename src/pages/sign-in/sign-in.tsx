/** Signing in with e-mail address and password. */
import { useState } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { useQueryClient } from '@tanstack/react-query';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { send } from '../../lib/api-client.ts';
import { Outside } from './outside.tsx';
import { useOutsideForm } from './use-outside-form.ts';

export function SignIn() {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [code, setCode] = useState<string | null>(null);
  const [query] = useSearchParams();
  const navigate = useNavigate();
  const client = useQueryClient();
  const form = useOutsideForm(async () => {
    await send('POST', '/session', { body: { email, password, code } });
    client.clear();
    const to = query.get('to') ?? '/';
    await navigate(to.startsWith('/') && !to.startsWith('//') ? to : '/');
  });
  return (
    <Outside title="Sign in" lede="to the book of your workshop">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void form.submit();
        }}
      >
        {query.get('ended') === null ? null : (
          <Notice severity="near" what="Your access to that workshop has ended.">
            Ask its proprietor to renew it.
          </Notice>
        )}
        {form.problem === null ? null : (
          <Refused sentence={form.problem} waits={form.code === 'second_factor_needed'} />
        )}
        <TextField
          label="E-mail address"
          type="email"
          autoComplete="username"
          value={email}
          onChange={setEmail}
          error={form.errorOf('email')}
        />
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          value={password}
          onChange={setPassword}
          error={form.errorOf('password')}
        />
        {code !== null || form.code === 'second_factor_needed' ? (
          <TextField
            label="Code"
            hint="Six figures of your authenticator, or a recovery code."
            autoComplete="one-time-code"
            value={code ?? ''}
            onChange={setCode}
            error={form.errorOf('code')}
          />
        ) : null}
        <Button kind="primary" counter submit busy={form.busy ? 'Signing in …' : false}>
          Sign in
        </Button>
        <p className="outside-links">
          <Link to="/forgotten">Forgotten password</Link>
          <Link to="/sign-up">Open a book for a workshop</Link>
        </p>
        <p className="outside-note">
          Invited as an auditor? Use the link in your letter; it opens one workshop, read-only, until its
          date.
        </p>
      </form>
    </Outside>
  );
}

/** The first sentence says what is so and stands bold. */
function Refused({ sentence, waits }: { readonly sentence: string; readonly waits: boolean }) {
  const end = sentence.indexOf('. ') + 1;
  const severity = waits ? 'waiting' : 'fault';
  return end === 0 ? (
    <Notice severity={severity} what={sentence} />
  ) : (
    <Notice severity={severity} what={sentence.slice(0, end)}>
      {sentence.slice(end)}
    </Notice>
  );
}
