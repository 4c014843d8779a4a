/** Opening a book for a workshop; who does it is its proprietor. */
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { useQueryClient } from '@tanstack/react-query';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { send } from '../../lib/api-client.ts';
import { Outside } from './outside.tsx';
import { useOutsideForm } from './use-outside-form.ts';

const CURRENCIES = ['EUR', 'GBP', 'USD', 'CHF', 'SEK', 'NOK', 'DKK', 'INR', 'JPY', 'AUD', 'CAD'];
const ZONES = Intl.supportedValuesOf('timeZone');

export function SignUp() {
  const [values, setValues] = useState({
    workshop_name: '',
    time_zone: Intl.DateTimeFormat().resolvedOptions().timeZone,
    currency: 'EUR',
    name: '',
    email: '',
    password: '',
  });
  const set = (name: keyof typeof values) => (value: string) =>
    setValues((before) => ({ ...before, [name]: value }));
  const navigate = useNavigate();
  const client = useQueryClient();
  const form = useOutsideForm(async () => {
    await send('POST', '/workshops', { body: values });
    client.clear();
    await navigate('/');
  });
  return (
    <Outside title="Open a book" lede="For one workshop. You are its proprietor and can invite the others.">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void form.submit();
        }}
      >
        {form.problem === null ? null : <Notice severity="fault" what={form.problem} />}
        <TextField
          label="Name of the workshop"
          value={values.workshop_name}
          onChange={set('workshop_name')}
          error={form.errorOf('workshop_name')}
        />
        <div className="fields">
          <SelectField
            label="Time zone"
            hint="Its midnight ends the business day."
            value={values.time_zone}
            onChange={set('time_zone')}
            options={ZONES.map((zone) => ({ value: zone, label: zone.replaceAll('_', ' ') }))}
            error={form.errorOf('time_zone')}
          />
          <SelectField
            label="Currency"
            hint="For prices and values."
            value={values.currency}
            onChange={set('currency')}
            options={CURRENCIES.map((code) => ({ value: code, label: code }))}
          />
        </div>
        <TextField
          label="Your name"
          value={values.name}
          onChange={set('name')}
          autoComplete="name"
          error={form.errorOf('name')}
        />
        <TextField
          label="E-mail address"
          type="email"
          value={values.email}
          onChange={set('email')}
          autoComplete="username"
          error={form.errorOf('email')}
        />
        <TextField
          label="Password"
          type="password"
          hint="At least 15 characters. Several words in a row are easy to remember."
          value={values.password}
          onChange={set('password')}
          autoComplete="new-password"
          error={form.errorOf('password')}
        />
        <Button kind="primary" counter submit busy={form.busy ? 'Opening the book …' : false}>
          Open the book
        </Button>
        <p>
          <Link to="/sign-in">Sign in instead</Link>
        </p>
      </form>
    </Outside>
  );
}
