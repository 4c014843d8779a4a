/** SHA-256 in the browser gives what FIPS 180-4's examples and Node.js give, at every length around a block. */
import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { sha256 } from '../../../src/lib/sha256.ts';

const text = (words: string): Uint8Array => new TextEncoder().encode(words);

describe('SHA-256', () => {
  it('gives the published digests (FIPS 180-4 examples: “abc”, two blocks)', () => {
    expect(sha256(text('abc'))).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
    expect(sha256(text('abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq'))).toBe(
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    );
  });

  it('agrees with Node.js at every length from nothing to three blocks', () => {
    for (let length = 0; length <= 192; length += 1) {
      const bytes = Uint8Array.from({ length }, (_, at) => (at * 37 + length) % 256);
      expect(sha256(bytes), `${length} bytes`).toBe(createHash('sha256').update(bytes).digest('hex'));
    }
  });
});
