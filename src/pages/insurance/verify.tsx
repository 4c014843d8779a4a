/** Checks a dossier in the browser: drop the ZIP, and each check says whether it holds, with the record where it fails. */
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { unzipDossier } from '../../../shared/dossier/unzip.ts';
import type { Verification } from '../../../shared/dossier/verify.ts';
import { verifyDossier } from '../../../shared/dossier/verify.ts';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { browserCrypto } from '../../lib/browser-crypto.ts';
import { paths } from '../../app/paths.ts';
import { DropFile } from './drop-file.tsx';
import { VerifyResult } from './verify-result.tsx';

interface Known {
  readonly key_id: string;
  readonly sequence: string;
  readonly hash: string;
}

type State =
  | { readonly at: 'none' }
  | { readonly at: 'checking'; readonly name: string }
  | { readonly at: 'refused'; readonly sentence: string }
  | { readonly at: 'checked'; readonly name: string; readonly found: Verification };

const HEX = /^[0-9a-f]{64}$/;
const plain = (text: string): string => text.replace(/\s/g, '').toLowerCase();

async function check(file: File, known: Known): Promise<State> {
  try {
    const files = unzipDossier(new Uint8Array(await file.arrayBuffer()));
    if (typeof files === 'string') return { at: 'refused', sentence: files };
    const hash = plain(known.hash);
    const outside = {
      key_ids: known.key_id.trim() === '' ? [] : [plain(known.key_id)],
      heads: hash === '' ? [] : [{ sequence: plain(known.sequence), hash }],
    };
    return { at: 'checked', name: file.name, found: await verifyDossier(files, outside, browserCrypto) };
  } catch (error) {
    return {
      at: 'refused',
      sentence: error instanceof Error ? error.message : 'The file could not be read.',
    };
  }
}

export function VerifyPage() {
  const [known, setKnown] = useState<Known>({ key_id: '', sequence: '', hash: '' });
  const [state, setState] = useState<State>({ at: 'none' });
  const wrong = wrongOf(known);
  const take = (file: File) => {
    if (wrong.key_id !== null || wrong.hash !== null || wrong.sequence !== null) {
      setState({
        at: 'refused',
        sentence: 'What you hold already is not whole. Mend it above, then drop the file again.',
      });
      return;
    }
    setState({ at: 'checking', name: file.name });
    void check(file, known).then(setState);
  };
  return (
    <Page
      title="Check a dossier"
      lede="in this browser; nothing is sent anywhere"
      nav={
        <nav className="subnav" aria-label="Insurance and audit">
          <Link to={paths.insurance}>Audit export</Link>
        </nav>
      }
      margin={<p>Everything is reckoned again from the chain; nothing else in the file is trusted.</p>}
    >
      <Section
        heading="What you hold already"
        notes={
          <p>From an earlier statement or from the workshop, not from this file. Both may be left empty.</p>
        }
      >
        <div className="fields">
          <TextField
            label="Fingerprint of the key"
            hint="64 figures and letters"
            value={known.key_id}
            onChange={(key_id) => setKnown({ ...known, key_id })}
            error={wrong.key_id}
          />
          <TextField
            label="Record of an earlier head"
            inputMode="numeric"
            value={known.sequence}
            onChange={(sequence) => setKnown({ ...known, sequence })}
            error={wrong.sequence}
          />
          <TextField
            label="Hash of that head"
            hint="64 figures and letters"
            value={known.hash}
            onChange={(hash) => setKnown({ ...known, hash })}
            error={wrong.hash}
          />
        </div>
      </Section>
      <Section heading="The dossier" notes={<p>The ZIP as the workshop gave it.</p>}>
        <DropFile label="Drop the ZIP here, or choose it" onFile={take} />
        {state.at === 'checking' ? <p role="status">Checking {state.name} …</p> : null}
        {state.at === 'refused' ? <Notice severity="fault" what={state.sentence} /> : null}
      </Section>
      {state.at === 'checked' ? <VerifyResult name={state.name} found={state.found} /> : null}
    </Page>
  );
}

/** What is wrong with what the reader brings; empty is fine. */
function wrongOf({ key_id, sequence, hash }: Known) {
  const hex = (text: string) =>
    plain(text) === '' || HEX.test(plain(text))
      ? null
      : 'A fingerprint or hash has 64 figures and letters from a to f. Look at the paper again.';
  const numbered = /^[1-9]\d*$/.test(plain(sequence)) || (plain(sequence) === '' && plain(hash) === '');
  return {
    key_id: hex(key_id),
    hash:
      plain(hash) === '' && plain(sequence) !== ''
        ? 'The head’s hash is missing. Enter it, or leave both out.'
        : hex(hash),
    sequence: numbered ? null : 'Enter the number of the record that the hash belongs to.',
  };
}
