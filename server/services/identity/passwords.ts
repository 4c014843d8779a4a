/**
 * Passwords: at least 15 characters, or 8 where a second factor is in use; no rules of composition; common ones and
 * those made of the product's, the workshop's or the own name refused; never cut short (OWASP ASVS 5.0, 6.2).
 */
import bcrypt from 'bcryptjs';
import { ProblemError } from '../../problem.ts';

const LEAST = 15;
const LEAST_WITH_SECOND_FACTOR = 8;

/** Beginnings that guessers try first; a long password made of repeats of one is no better. */
const COMMON = [
  'password',
  'passwort',
  'qwerty',
  'letmein',
  'welcome',
  'iloveyou',
  '123456',
  '111111',
  'abc123',
  'admin',
  'goldsmith',
];

/** Refuses a weak or unreadable password with the reason. `about` are names that must not be the password. */
export function checkPassword(password: string, about: readonly string[], second_factor = false): void {
  const refuse = (sentence: string) => {
    throw new ProblemError('invalid', sentence, { errors: [{ field: 'password', sentence }] });
  };
  const least = second_factor ? LEAST_WITH_SECOND_FACTOR : LEAST;
  if (Array.from(password).length < least) {
    refuse(`A password has at least ${least} characters. Several words in a row are easy to remember.`);
  }
  if (bcrypt.truncates(password)) {
    refuse('That password is longer than 72 bytes, and the rest would not be checked. Choose a shorter one.');
  }
  const bare = password.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
  if (new Set(bare).size < 5)
    refuse('That password repeats very few characters. Choose several words in a row.');
  const names = ['grainward', ...about].map((name) => name.toLowerCase().replace(/[^\p{L}\p{N}]/gu, ''));
  for (const known of [...COMMON, ...names.filter((name) => name.length >= 4)]) {
    if (bare.replaceAll(known, '').length < bare.length / 2) {
      refuse(
        'That password is among the first that would be guessed. Choose several words that do not belong together.',
      );
    }
  }
}

/** Hashes slowly, with a salt of its own; cost and salt stand in the hash. */
export const hashPassword = (password: string, cost: number): Promise<string> => bcrypt.hash(password, cost);

/** Whether the password is the one hashed. A password too long for the hash is never right. */
export async function isPassword(password: string, hash: string): Promise<boolean> {
  const same = await bcrypt.compare(password, hash);
  return same && !bcrypt.truncates(password);
}
