/** Taking an invitation: the link's secret stands behind the # and never reaches a log. */
import { useEffect, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { useQueryClient } from '@tanstack/react-query';
import type { z } from '../../../shared/schemas/zod.ts';
import { invitationInfo } from '../../../shared/schemas/identity.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { send } from '../../lib/api-client.ts';
import { Outside } from './outside.tsx';
import { useOutsideForm } from './use-outside-form.ts';

type Info = z.output<typeof invitationInfo>;

export function Invitation() {
  const token = window.location.hash.slice(1);
  const [info, setInfo] = useState<Info | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const [password, setPassword] = useState('');
  const [code, setCode] = useState<string | null>(null);
  const navigate = useNavigate();
  const client = useQueryClient();
  useEffect(() => {
    send('POST', '/invitations/read', { body: { token } })
      .then((answer) => setInfo(invitationInfo.parse(answer)))
      .catch((error: unknown) =>
        setRefused(error instanceof Error ? error.message : 'This link can’t be read.'),
      );
  }, [token]);
  const form = useOutsideForm(async () => {
    await send('POST', '/invitations/accept', { body: { token, password, code } });
    client.clear();
    await navigate('/');
  });
  if (refused !== null) {
    return (
      <Outside title="Invitation" lede="A link works once, for seven days.">
        <Notice severity="fault" what={refused} />
      </Outside>
    );
  }
  return (
    <Outside
      title="Invitation"
      lede={
        info === null
          ? 'Reading the invitation …'
          : `${info.workshop_name} invites ${info.name} as ${info.role}.`
      }
    >
      {info === null ? null : (
        <form
          noValidate
          onSubmit={(event) => {
            event.preventDefault();
            void form.submit();
          }}
        >
          {form.problem === null ? null : <Notice severity="fault" what={form.problem} />}
          <input type="text" hidden readOnly autoComplete="username" value={info.email} />
          <TextField
            label={info.has_account ? `Password of ${info.email}` : 'Choose a password'}
            hint={
              info.has_account
                ? 'That address has an account already.'
                : 'At least 15 characters. Several words in a row are easy to remember.'
            }
            type="password"
            autoComplete={info.has_account ? 'current-password' : 'new-password'}
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
          <Button kind="primary" counter submit busy={form.busy ? 'Joining …' : false}>
            Join the workshop
          </Button>
        </form>
      )}
    </Outside>
  );
}
