/**
 * Checks a dossier from its files alone: no server, no database. It recomputes everything from `book.jsonl` and trusts
 * nothing else in it. That a key or a head is the right one can't be shown by the dossier; the reader brings those.
 */
import { closedPeriods, reversals, timeRunsOn } from './checks/rules.ts';
import { listedFiles, tablesAgree } from './checks/files.ts';
import { neverBelow, zeroSums } from './checks/balances.ts';
import { readChain } from './checks/chain.ts';
import { namedHeads, registersStand } from './checks/registers.ts';
import { signatures } from './checks/signatures.ts';
import type { Check, Finding } from './finding.ts';
import { checkOf } from './finding.ts';
import type { Manifest } from './manifest.ts';
import { manifestSchema } from './manifest.ts';
import type { HashedRecord } from './replay.ts';

export interface Head {
  readonly sequence: string;
  readonly hash: string;
}

/** What the reader holds already, from outside the dossier. */
export interface Outside {
  /** Fingerprints of keys that he or she trusts. */
  readonly key_ids: readonly string[];
  readonly heads: readonly Head[];
}

/** Hash and signature, handed in so that the same check runs in a browser and in Node.js. */
export interface DossierCrypto {
  sha256(bytes: Uint8Array): string;
  /** Whether the Ed25519 signature is right; and the fingerprint of the key's DER. */
  verify(public_key_pem: string, message: Uint8Array, signature: Uint8Array): Promise<boolean>;
  keyId(public_key_pem: string): Promise<string | null>;
}

export interface Verification {
  readonly checks: readonly Check[];
  readonly workshop: string | null;
  readonly head: Head | null;
  readonly key_id: string | null;
  /** 0: all holds; 1: something fails; 2: it can't be read. */
  readonly exit_code: 0 | 1 | 2;
}

/** Checks the files of a dossier, by path. */
export async function verifyDossier(
  files: ReadonlyMap<string, Uint8Array>,
  outside: Outside,
  crypto: DossierCrypto,
): Promise<Verification> {
  const manifest = readManifest(files);
  const book = decode(files.get('book.jsonl'));
  if (manifest === null || book === null)
    return unreadable(manifest === null ? 'manifest.json' : 'book.jsonl');
  const encoder = new TextEncoder();
  const { chain, findings } = readChain(book, (text) => crypto.sha256(encoder.encode(text)));
  const records = chain.map(({ record }) => record);
  const last = chain.at(-1);
  const head = last === undefined ? null : { sequence: last.record.sequence, hash: last.hash };
  const pem = decode(files.get('public-key.pem')) ?? '';
  const key_id = await crypto.keyId(pem);
  const checks = [
    checkOf(
      'signature',
      'The manifest is signed by the key that lies beside it',
      await signatureFindings(files, pem, key_id, manifest, crypto),
    ),
    checkOf(
      'files',
      'Every file is listed with its size and digest, and none is unlisted',
      listedFiles(files, manifest, (bytes) => crypto.sha256(bytes)),
    ),
    checkOf('chain', 'Every record carries the hash of the one before it, without a gap', findings),
    checkOf('head', 'The manifest names the head that the chain ends at', headFindings(manifest, head)),
    checkOf('named_heads', 'Every dossier that the book names ended where it says', namedHeads(chain)),
    checkOf(
      'registers',
      'Every account and lot is opened once, and before it is used',
      registersStand(records),
    ),
    checkOf('sums', 'Every voucher sums to nothing in all five masses', zeroSums(records)),
    checkOf('places', 'No place ever held less than nothing of a lot', neverBelow(records)),
    checkOf('reversals', 'Every reversal is the exact mirror of a voucher, once', reversals(records)),
    checkOf('periods', 'Nothing entered a closed period', closedPeriods(records)),
    checkOf('time', 'Time never runs back', timeRunsOn(records)),
    checkOf(
      'signatories',
      'Who recorded and approved had the role for it, and were two where two are asked for',
      signatures(records),
    ),
    checkOf('tables', 'Every table equals what the chain gives', tablesAgree(files, chain)),
    keyCheck(key_id, outside),
    headsCheck(chain, manifest, outside),
  ];
  const fails = checks.some(({ verdict }) => verdict === 'fails');
  return { checks, workshop: manifest.workshop.name, head, key_id, exit_code: fails ? 1 : 0 };
}

function readManifest(files: ReadonlyMap<string, Uint8Array>): Manifest | null {
  try {
    return manifestSchema.parse(JSON.parse(decode(files.get('manifest.json')) ?? ''));
  } catch {
    return null;
  }
}

function decode(bytes: Uint8Array | undefined): string | null {
  try {
    return bytes === undefined
      ? null
      : new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

function unreadable(path: string): Verification {
  const finding = {
    at: path,
    sentence: `${path} is missing or can't be read. This is no dossier, or it was damaged.`,
  };
  return {
    checks: [checkOf('readable', 'It can be read as a dossier', [finding])],
    workshop: null,
    head: null,
    key_id: null,
    exit_code: 2,
  };
}

async function signatureFindings(
  files: ReadonlyMap<string, Uint8Array>,
  pem: string,
  key_id: string | null,
  manifest: Manifest,
  crypto: DossierCrypto,
): Promise<readonly Finding[]> {
  const message = files.get('manifest.json');
  const signature = files.get('manifest.sig');
  if (message === undefined || signature === undefined || key_id === null)
    return [{ at: 'manifest.sig', sentence: 'The signature or the public key is missing or damaged.' }];
  const findings: Finding[] = [];
  if (!(await crypto.verify(pem, message, signature)))
    findings.push({
      at: 'manifest.sig',
      sentence: 'The signature does not belong to this manifest and this key.',
    });
  if (key_id !== manifest.key_id)
    findings.push({
      at: 'public-key.pem',
      sentence: 'The key that lies beside the manifest is not the one that it names.',
    });
  return findings;
}

function headFindings(manifest: Manifest, head: Head | null): readonly Finding[] {
  const same =
    head !== null && manifest.chain.sequence === head.sequence && manifest.chain.hash === head.hash;
  return same
    ? []
    : [{ at: 'manifest.json', sentence: 'The chain does not end at the head that the manifest names.' }];
}

function keyCheck(key_id: string | null, outside: Outside): Check {
  const name = 'The key is one that you know from outside';
  if (outside.key_ids.length === 0) {
    const sentence =
      'You brought no fingerprint. A key that only the dossier brings proves nothing: compare the fingerprint with the one that the workshop gave you.';
    return { id: 'key', name, verdict: 'cannot_be_shown', findings: [{ at: null, sentence }] };
  }
  const known = outside.key_ids.some((id) => id.toLowerCase() === key_id);
  return checkOf(
    'key',
    name,
    known ? [] : [{ at: 'public-key.pem', sentence: 'The fingerprint is none of those that you brought.' }],
  );
}

function headsCheck(chain: readonly HashedRecord[], manifest: Manifest, outside: Outside): Check {
  const name = 'The book extends every earlier head that you hold';
  if (outside.heads.length === 0) {
    const listed = manifest.earlier_heads.length;
    const sentence = `You brought no earlier head. ${listed} ${listed === 1 ? 'is' : 'are'} named in the dossier itself, which proves nothing.`;
    return { id: 'heads', name, verdict: 'cannot_be_shown', findings: [{ at: null, sentence }] };
  }
  const findings = outside.heads.flatMap(({ sequence, hash }) => {
    const record = chain.find((known) => known.record.sequence === sequence);
    if (record === undefined)
      return [
        {
          at: sequence,
          sentence: `The book ends before record ${sequence}, which you have seen: it was shortened.`,
        },
      ];
    return record.hash === hash.toLowerCase()
      ? []
      : [
          {
            at: sequence,
            sentence: `Record ${sequence} is not the one that you have seen: the book was rewritten.`,
          },
        ];
  });
  return checkOf('heads', name, findings);
}
