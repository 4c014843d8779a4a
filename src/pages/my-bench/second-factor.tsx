/**
 * One's own second factor: set up with an authenticator's first code, turned off by password and code, and the recovery
 * codes that sign in once each where the authenticator is lost. The codes are shown once and never again.
 */
import { useState } from 'react';
import { recoveryCodes, secondFactorSetup } from '../../../shared/schemas/identity.ts';
import type { z } from '../../../shared/schemas/zod.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useSession } from '../../queries/session.ts';
import { useAsked } from '../../queries/writes.ts';

export function SecondFactor() {
  const { user } = useSession();
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  if (codes !== null) return <RecoveryCodes codes={codes} onKept={() => setCodes(null)} />;
  return user.second_factor ? <TurnedOn onCodes={setCodes} /> : <SetUp onCodes={setCodes} />;
}

interface CodesProps {
  readonly onCodes: (codes: readonly string[]) => void;
}

function SetUp({ onCodes }: CodesProps) {
  const [password, setPassword] = useState('');
  const [code, setCode] = useState('');
  const [setup, setSetup] = useState<z.output<typeof secondFactorSetup> | null>(null);
  const { busy, problem, ask } = useAsked();
  const begin = () => ask('POST', '/second-factor/setup', { password }, secondFactorSetup).then(setSetup);
  const turnOn = async (of: string) => {
    const answer = await ask('POST', '/second-factor', { setup: of, code }, recoveryCodes);
    if (answer !== null) onCodes(answer.recovery_codes);
  };
  return (
    <form
      className="grid max-w-md gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void (setup === null ? begin() : turnOn(setup.setup));
      }}
    >
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      {setup === null ? (
        <TextField
          label="Your password"
          type="password"
          autoComplete="current-password"
          value={password}
          onChange={setPassword}
        />
      ) : (
        <>
          <img className="qr" src={setup.qr} width="180" height="180" alt="QR code for the authenticator" />
          <p>
            Or type this into it: <span className="hash">{setup.secret}</span>
          </p>
          <CodeField value={code} onChange={setCode} />
        </>
      )}
      <Button submit icon="hold" busy={busy ? 'Sending …' : false}>
        {setup === null ? 'Set up a second factor' : 'Turn it on'}
      </Button>
    </form>
  );
}

function TurnedOn({ onCodes }: CodesProps) {
  const [password, setPassword] = useState('');
  const [code, setCode] = useState('');
  const { busy, problem, ask } = useAsked();
  const renew = async () => {
    const answer = await ask('POST', '/second-factor/recovery-codes', { password, code }, recoveryCodes);
    if (answer !== null) onCodes(answer.recovery_codes);
  };
  return (
    <form className="grid max-w-md gap-4" onSubmit={(event) => event.preventDefault()}>
      <StatusWord status="Active" />
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      <TextField
        label="Your password"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={setPassword}
      />
      <CodeField value={code} onChange={setCode} />
      <div className="flex flex-wrap gap-2">
        <Button busy={busy ? 'Sending …' : false} onPress={() => void renew()}>
          Make new recovery codes
        </Button>
        <Button
          kind="danger"
          busy={busy ? 'Sending …' : false}
          onPress={() => void ask('POST', '/second-factor/off', { password, code }, null)}
        >
          Turn it off
        </Button>
      </div>
    </form>
  );
}

interface CodeFieldProps {
  readonly value: string;
  readonly onChange: (code: string) => void;
}

function CodeField({ value, onChange }: CodeFieldProps) {
  return (
    <TextField
      label="Code"
      hint="Six figures of your authenticator."
      autoComplete="one-time-code"
      inputMode="numeric"
      value={value}
      onChange={onChange}
    />
  );
}

interface RecoveryCodesProps {
  readonly codes: readonly string[];
  readonly onKept: () => void;
}

function RecoveryCodes({ codes, onKept }: RecoveryCodesProps) {
  return (
    <div className="grid max-w-md gap-4">
      <Notice severity="near" what="These codes are shown once.">
        Each signs in once where the authenticator is lost. Print them, and keep them where you keep your
        keys.
      </Notice>
      <ul className="recovery-codes">
        {codes.map((code) => (
          <li key={code}>{code}</li>
        ))}
      </ul>
      <div className="flex flex-wrap gap-2">
        <Button icon="print" onPress={() => window.print()}>
          Print
        </Button>
        <Button kind="primary" onPress={onKept}>
          I have kept them
        </Button>
      </div>
    </div>
  );
}
