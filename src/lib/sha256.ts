/**
 * SHA-256 of bytes, at once: the browser's own digest answers later, and a chain of many thousand records is checked in
 * one go. Source: FIPS 180-4, sections 4.1.2, 5.1.1 and 6.2.2.
 */

/** The first 32 bits of the fractional parts of the roots of the first primes (FIPS 180-4, 4.2.2 and 5.3.3). */
const PRIMES = firstPrimes(64);
const K = Uint32Array.from(PRIMES, (prime) => fraction(Math.cbrt(prime)));
const START = Uint32Array.from(PRIMES.slice(0, 8), (prime) => fraction(Math.sqrt(prime)));

function firstPrimes(many: number): readonly number[] {
  const primes: number[] = [];
  for (let n = 2; primes.length < many; n += 1) if (primes.every((prime) => n % prime !== 0)) primes.push(n);
  return primes;
}

function fraction(root: number): number {
  return Math.floor((root - Math.floor(root)) * 2 ** 32);
}

const rotate = (word: number, by: number): number => (word >>> by) | (word << (32 - by));

/** The digest in lower-case hex. */
export function sha256(bytes: Uint8Array): string {
  const state = START.slice();
  const padded = pad(bytes);
  const words = new Uint32Array(64);
  for (let at = 0; at < padded.byteLength; at += 64) block(state, words, padded, at);
  return [...state].map((word) => word.toString(16).padStart(8, '0')).join('');
}

/** The message, a one bit, zeros, and its length in bits as 64 bits: whole blocks of 64 bytes. */
function pad(bytes: Uint8Array): DataView {
  const padded = new DataView(new ArrayBuffer(Math.ceil((bytes.length + 9) / 64) * 64));
  new Uint8Array(padded.buffer).set(bytes);
  padded.setUint8(bytes.length, 0x80);
  padded.setBigUint64(padded.byteLength - 8, BigInt(bytes.length) * 8n);
  return padded;
}

const at = (words: Uint32Array, index: number): number => words[index] ?? 0;

function block(state: Uint32Array, words: Uint32Array, message: DataView, from: number): void {
  for (let t = 0; t < 16; t += 1) words[t] = message.getUint32(from + t * 4);
  for (let t = 16; t < 64; t += 1) {
    const [early, late] = [at(words, t - 15), at(words, t - 2)];
    const small0 = rotate(early, 7) ^ rotate(early, 18) ^ (early >>> 3);
    const small1 = rotate(late, 17) ^ rotate(late, 19) ^ (late >>> 10);
    words[t] = at(words, t - 16) + small0 + at(words, t - 7) + small1;
  }
  let [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = state;
  for (let t = 0; t < 64; t += 1) {
    const big1 = rotate(e, 6) ^ rotate(e, 11) ^ rotate(e, 25);
    const first = (h + big1 + ((e & f) ^ (~e & g)) + at(K, t) + at(words, t)) | 0;
    const big0 = rotate(a, 2) ^ rotate(a, 13) ^ rotate(a, 22);
    const second = (big0 + ((a & b) ^ (a & c) ^ (b & c))) | 0;
    [h, g, f, e, d, c, b, a] = [g, f, e, (d + first) | 0, c, b, a, (first + second) | 0];
  }
  [a, b, c, d, e, f, g, h].forEach((word, index) => {
    state[index] = at(state, index) + word;
  });
}
