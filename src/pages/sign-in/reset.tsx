/** Setting a new password by the link of an e-mail. Every session of the account ends. */
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { send } from '../../lib/api-client.ts';
import { Outside } from './outside.tsx';
import { useOutsideForm } from './use-outside-form.ts';

export function Reset() {
  const token = window.location.hash.slice(1);
  const [password, setPassword] = useState('');
  const [done, setDone] = useState(false);
  const form = useOutsideForm(async () => {
    await send('POST', '/password-resets/complete', { body: { token, password } });
    setDone(true);
  });
  return (
    <Outside title="Set a new password" lede="Whoever was signed in with the old one is signed out.">
      {done ? (
        <Notice severity="agreed" what="The new password is set.">
          <Link to="/sign-in">Sign in with it</Link>
        </Notice>
      ) : (
        <form
          noValidate
          onSubmit={(event) => {
            event.preventDefault();
            void form.submit();
          }}
        >
          {form.problem === null ? null : <Notice severity="fault" what={form.problem} />}
          <TextField
            label="New password"
            hint="At least 15 characters. Several words in a row are easy to remember."
            type="password"
            autoComplete="new-password"
            value={password}
            onChange={setPassword}
            error={form.errorOf('password')}
          />
          <Button kind="primary" counter submit busy={form.busy ? 'Setting …' : false}>
            Set the password
          </Button>
        </form>
      )}
    </Outside>
  );
}
