/** Secrets that are handed out once: random, and kept only as their hash. */
import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits, safe in an address and in a cookie. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

/** What is kept of a secret: SHA-256 in hex. The secret is random, so no salt is needed. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');
