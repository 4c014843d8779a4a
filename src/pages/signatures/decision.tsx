/** The decision on a request: sign or refuse somebody else's, withdraw one's own. Each is sent once. */
import { useState } from 'react';
import type { SignatureRequest } from '../../../shared/schemas/signature-request.ts';
import { Button } from '../../components/ui/button.tsx';
import { Dialog } from '../../components/ui/dialog.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useToast } from '../../components/ui/toast.tsx';
import { numberText, words } from '../../lib/formats.ts';
import { newKey } from '../../lib/kept-draft.ts';
import { useSession } from '../../queries/session.ts';
import { useDecideSignature } from '../../queries/signatures.ts';
import { paths } from '../../app/paths.ts';

/** Runs a decision once at a time, and says why where the server refuses it. */
function useOnce() {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const [key, setKey] = useState(newKey);
  const run = async (act: (key: string) => Promise<void>) => {
    if (busy) return;
    setBusy(true);
    setProblem(null);
    try {
      await act(key);
    } catch (error) {
      setProblem(error instanceof Error ? error.message : 'It could not be sent. Try it again.');
      setKey(newKey());
    } finally {
      setBusy(false);
    }
  };
  return { busy, problem, run };
}

export function Decision({ request }: { readonly request: SignatureRequest }) {
  const { person, can } = useSession();
  const decide = useDecideSignature();
  const toast = useToast();
  const { busy, problem, run } = useOnce();
  const [refusing, setRefusing] = useState(false);
  const own = request.requested_by === person.id;
  if (!can('signature.give')) return null;
  const sign = () =>
    run(async (key) => {
      const posted = (await decide.sign(request.id, key)).records.at(-1);
      if (posted === undefined) return;
      toast({
        words: `Voucher ${numberText(posted.sequence)} is signed and posted.`,
        to: paths.voucher(posted.id),
      });
    });
  const withdraw = () =>
    run(async (key) => {
      await decide.withdraw(request.id, key);
      toast({ words: `${words(request.event)} is withdrawn. Nothing was posted.`, to: null });
    });
  return (
    <>
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      <div className="flex flex-wrap items-start gap-2">
        {own ? (
          <Button icon="undo" busy={busy ? 'Sending …' : false} onPress={() => void withdraw()}>
            Withdraw it
          </Button>
        ) : (
          <>
            <Button icon="sign" busy={busy ? 'Posting …' : false} onPress={() => void sign()}>
              Sign and post
            </Button>
            <Button kind="danger" onPress={() => setRefusing(true)}>
              Refuse
            </Button>
            <RefuseDialog request={request} open={refusing} onClose={() => setRefusing(false)} />
          </>
        )}
      </div>
      {own ? <p className="fig-under">You asked for this, so someone else must sign it.</p> : null}
    </>
  );
}

interface RefuseProps {
  readonly request: SignatureRequest;
  readonly open: boolean;
  readonly onClose: () => void;
}

function RefuseDialog({ request, open, onClose }: RefuseProps) {
  const decide = useDecideSignature();
  const toast = useToast();
  const { busy, problem, run } = useOnce();
  const [note, setNote] = useState('');
  const refuse = () =>
    run(async (key) => {
      await decide.refuse(request.id, note, key);
      onClose();
      toast({ words: `${words(request.event)} is refused. Nothing was posted.`, to: null });
    });
  return (
    <Dialog
      title={`Refuse the ${words(request.event).toLowerCase()}?`}
      open={open}
      keep="Keep it waiting"
      onClose={onClose}
      action={
        <Button kind="danger" busy={busy ? 'Sending …' : false} onPress={() => void refuse()}>
          Refuse it
        </Button>
      }
    >
      <p>The book stays as it is. {request.requested_by_name} reads why.</p>
      <TextField label="Why it is refused" lines={3} value={note} onChange={setNote} error={problem} />
    </Dialog>
  );
}
