/** Hash and signature of Node.js, as the dossier's checks ask for them. */
import { createHash, createPublicKey, verify } from 'node:crypto';
import type { DossierCrypto } from '../../shared/dossier/verify.ts';

export const nodeCrypto: DossierCrypto = {
  sha256: (bytes) => createHash('sha256').update(bytes).digest('hex'),
  verify: (pem, message, signature) => Promise.resolve(isSigned(pem, message, signature)),
  keyId: (pem) => Promise.resolve(keyIdOf(pem)),
};

function isSigned(pem: string, message: Uint8Array, signature: Uint8Array): boolean {
  try {
    return verify(null, message, createPublicKey(pem), signature);
  } catch {
    return false;
  }
}

/** SHA-256 of the key's DER, in hex; null for what is no Ed25519 key. */
export function keyIdOf(pem: string): string | null {
  try {
    const key = createPublicKey(pem);
    if (key.asymmetricKeyType !== 'ed25519') return null;
    return createHash('sha256')
      .update(key.export({ type: 'spki', format: 'der' }))
      .digest('hex');
  } catch {
    return null;
  }
}
