/** Asking for a link to set a new password; it says the same whether or not there is an account. */
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { send } from '../../lib/api-client.ts';
import { Outside } from './outside.tsx';
import { useOutsideForm } from './use-outside-form.ts';

export function Forgotten() {
  const [email, setEmail] = useState('');
  const [sent, setSent] = useState(false);
  const form = useOutsideForm(async () => {
    await send('POST', '/password-resets', { body: { email } });
    setSent(true);
  });
  return (
    <Outside title="Set a new password" lede="A link comes by e-mail. It works once, for an hour.">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void form.submit();
        }}
      >
        {sent ? (
          <Notice severity="agreed" what="If that address has an account, the link is on its way.">
            Look in your post.
          </Notice>
        ) : null}
        {form.problem === null ? null : <Notice severity="fault" what={form.problem} />}
        <TextField
          label="E-mail address"
          type="email"
          autoComplete="username"
          value={email}
          onChange={setEmail}
          error={form.errorOf('email')}
        />
        <Button kind="primary" counter submit busy={form.busy ? 'Sending …' : false}>
          Send the link
        </Button>
        <p>
          <Link to="/sign-in">Back to sign-in</Link>
        </p>
      </form>
    </Outside>
  );
}
