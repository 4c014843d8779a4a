/** What the start scripts say: one line per step, with its time. Plain Node, no packages: it runs before they are there. */
const started = new Map();

/** Says that a step begins. */
export function begin(step) {
  started.set(step, Date.now());
  process.stdout.write(`· ${step} …\n`);
}

/** Says that a step is done, and how long it took; a cross where it is not `well`. */
export function done(step, words = '', well = true) {
  const seconds = ((Date.now() - (started.get(step) ?? Date.now())) / 1000).toFixed(1);
  process.stdout.write(`${well ? '✓' : '✗'} ${step}${words === '' ? '' : `: ${words}`} (${seconds} s)\n`);
}

/** A reason, in a sentence, why a script can't go on. */
export class CantGoOn extends Error {}

/** Stops the script with a sentence; what it has started is ended on the way out. */
export function giveUp(sentence) {
  throw new CantGoOn(sentence);
}
