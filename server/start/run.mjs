/** Running other programs from the start scripts, and ending every one of them when the script ends. */
import { spawn } from 'node:child_process';
import { CantGoOn } from './say.mjs';

const LAST_WORDS_MS = 12_000;
const children = new Set();
const atEnd = [];
let ending = false;

/**
 * Runs a script to its end; the number it gives is the exit code, none means that it goes on until it is interrupted.
 * `interrupted` is the exit code after Ctrl-C.
 */
export async function script(main, { interrupted }) {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void end(interrupted));
  try {
    const code = await main();
    if (code !== undefined) await end(code);
  } catch (error) {
    const words = error instanceof CantGoOn ? `Grainward can't go on: ${error.message}` : error.stack;
    process.stderr.write(`\n${words}\n`);
    await end(1);
  }
}

/**
 * Runs a program to its end; gives its exit code and what it said, which goes to our own output unless `quiet`.
 * Once the script is ending nothing new begins and nothing comes back, but for what has `last`.
 */
export function run(program, args, options = {}) {
  const { quiet = false, last = false, input, ...rest } = options;
  if (ending && !last) return new Promise(() => undefined);
  return new Promise((resolve, reject) => {
    const ours = quiet ? 'pipe' : 'inherit';
    const child = spawn(program, args, {
      stdio: [input === undefined ? 'ignore' : 'pipe', ours, ours],
      ...rest,
    });
    if (!last) children.add(child);
    child.stdin?.end(input);
    let output = '';
    child.stdout?.on('data', (data) => (output += data));
    child.stderr?.on('data', (data) => (output += data));
    child.on('error', reject);
    child.on('close', (code, signal) => {
      children.delete(child);
      if (signal !== null && !ending)
        process.stderr.write(`${program} was ended from outside by ${signal}.\n`);
      if (!ending || last) resolve({ code: code ?? 1, output });
    });
  });
}

/** Starts a program that goes on; it is ended with the script. */
export function start(program, args, options = {}) {
  const child = spawn(program, args, { stdio: ['ignore', 'inherit', 'inherit'], ...options });
  children.add(child);
  child.on('close', () => children.delete(child));
  return child;
}

/** Does something when the script ends, last added first: stopping a database, removing a folder. */
export function whenEnding(work) {
  atEnd.unshift(work);
}

/** Ends every program that was started, then the rest, then this process. Never comes back. */
export async function end(code) {
  if (ending) return new Promise(() => undefined);
  ending = true;
  const waiting = [...children].map((child) => new Promise((resolve) => child.once('close', resolve)));
  for (const child of children) child.kill('SIGTERM');
  await Promise.race([Promise.all(waiting), new Promise((resolve) => setTimeout(resolve, LAST_WORDS_MS))]);
  for (const child of children) child.kill('SIGKILL');
  for (const work of atEnd) await work();
  process.exit(code);
}
