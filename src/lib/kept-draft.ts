/**
 * A draft of a form, kept in the browser under its person, workshop and form until it is posted, with the key of its
 * request: so it survives a reload and a lost connection, and is recorded once.
 */
import { z } from '../../shared/schemas/zod.ts';

const kept = z.object({ key: z.string(), values: z.record(z.string(), z.unknown()) });
export type KeptDraft = z.output<typeof kept>;

const place = (name: string) => `grainward.draft.${name}`;

/** A fresh key for a request that has not been sent. */
export const newKey = (): string => crypto.randomUUID();

export function readDraft(name: string): KeptDraft | null {
  try {
    return kept.parse(JSON.parse(localStorage.getItem(place(name)) ?? ''));
  } catch {
    return null;
  }
}

/** Keeps a draft. Where the browser keeps nothing (private window), the form goes on without. */
export function keepDraft(name: string, draft: KeptDraft): void {
  try {
    localStorage.setItem(place(name), JSON.stringify(draft));
  } catch {
    return;
  }
}

export function dropDraft(name: string): void {
  try {
    localStorage.removeItem(place(name));
  } catch {
    return;
  }
}
