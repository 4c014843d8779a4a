/** Hash and signature in the browser, as the dossier's checks ask for them; nothing leaves the machine. */
import type { DossierCrypto } from '../../shared/dossier/verify.ts';
import { sha256 } from './sha256.ts';

/** How the DER of every Ed25519 public key begins (RFC 8410, section 4); 32 bytes of key follow. */
const ED25519 = [0x30, 0x2a, 0x30, 0x05, 0x06, 0x03, 0x2b, 0x65, 0x70, 0x03, 0x21, 0x00];

export const browserCrypto: DossierCrypto = {
  sha256,
  keyId: (pem) => {
    const der = derOf(pem);
    return Promise.resolve(der === null ? null : sha256(der));
  },
  async verify(pem, message, signature) {
    const der = derOf(pem);
    if (der === null) return false;
    const key = await keyOf(der);
    return crypto.subtle.verify('Ed25519', key, Uint8Array.from(signature), Uint8Array.from(message));
  },
};

/** Throws an Error whose message tells what to do where the browser knows no Ed25519. */
async function keyOf(der: Uint8Array<ArrayBuffer>): Promise<CryptoKey> {
  try {
    return await crypto.subtle.importKey('spki', der, 'Ed25519', false, ['verify']);
  } catch {
    throw new Error(
      'This browser can’t check Ed25519 signatures. Open the page in a newer one, or check with openssl as VERIFY.md says.',
    );
  }
}

function derOf(pem: string): Uint8Array<ArrayBuffer> | null {
  const inside = /-----BEGIN PUBLIC KEY-----([A-Za-z0-9+/=\s]+)-----END PUBLIC KEY-----/.exec(pem)?.[1];
  if (inside === undefined) return null;
  try {
    const der = Uint8Array.from(atob(inside.replace(/\s/g, '')), (letter) => letter.charCodeAt(0));
    const isKey = der.length === ED25519.length + 32 && ED25519.every((byte, at) => der[at] === byte);
    return isKey ? der : null;
  } catch {
    return null;
  }
}
