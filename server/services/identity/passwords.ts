/**
 * Passwords: at least 15 characters, or 8 where a second factor is in use; no rules of composition; common ones and
 * those made of the product's, the workshop's or the own name refused; never cut short (OWASP ASVS 5.0, 6.2).
 */
import bcrypt from 'bcryptjs';
import { ProblemError } from '../../problem.ts';
import { COMMON } from './common-passwords.ts';

export const LEAST_CHARACTERS = 15;
const LEAST_WITH_SECOND_FACTOR = 8;

/** Refuses a weak or unreadable password with the reason. `about` are names that must not be the password. */
export function checkPassword(password: string, about: readonly string[], second_factor = false): void {
  const refuse = (sentence: string) => {
    throw new ProblemError('invalid', sentence, { errors: [{ field: 'password', sentence }] });
  };
  const least = second_factor ? LEAST_WITH_SECOND_FACTOR : LEAST_CHARACTERS;
  if (Array.from(password).length < least) {
    refuse(`A password has at least ${least} characters. Several words in a row are easy to remember.`);
  }
  if (bcrypt.truncates(password)) {
    refuse('That password is longer than 72 bytes, and the rest would not be checked. Choose a shorter one.');
  }
  if (new Set(password).size < 5)
    refuse('That password repeats very few characters. Choose several words in a row.');
  const bare = password.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
  const names = ['grainward', ...about.flatMap((name) => [name, ...name.split(/\s+/)])].map((name) =>
    name.toLowerCase().replace(/[^\p{L}\p{N}]/gu, ''),
  );
  const known = [...COMMON, ...names.filter((name) => name.length >= 4)].sort((a, b) => b.length - a.length);
  const rest = known.reduce((left, word) => left.replaceAll(word, ''), bare);
  if (rest.length < bare.length / 2) {
    refuse(
      'That password is among the first that would be guessed. Choose several words that do not belong together.',
    );
  }
}

/** Hashes slowly, with a salt of its own; cost and salt stand in the hash. */
export const hashPassword = (password: string, cost: number): Promise<string> => bcrypt.hash(password, cost);

/** A hash that no password has, of the same cost: what an absent account is compared with, so that it takes as long. */
export const absentHash = (cost: number): string =>
  `$2b$${String(cost).padStart(2, '0')}$${'.'.repeat(22)}${'.'.repeat(31)}`;

/** Whether the password is the one hashed. A password too long for the hash is never right. */
export async function isPassword(password: string, hash: string): Promise<boolean> {
  const same = await bcrypt.compare(password, hash);
  return same && !bcrypt.truncates(password);
}
