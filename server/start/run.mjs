/** Running other programs from the start scripts, and ending every one of them when the script ends. */
import { spawn } from 'node:child_process';

const children = new Set();
const atEnd = [];
let ending = false;

/** Runs a program to its end; gives its exit code. Output goes to ours unless `quiet`. */
export function run(program, args, options = {}) {
  const { quiet = false, ...rest } = options;
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      stdio: quiet ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'],
      ...rest,
    });
    children.add(child);
    let output = '';
    child.stdout?.on('data', (data) => (output += data));
    child.stderr?.on('data', (data) => (output += data));
    child.on('error', reject);
    child.on('close', (code, signal) => {
      children.delete(child);
      resolve({ code: code ?? (signal === null ? 1 : 128), output });
    });
  });
}

/** Starts a program that goes on; it is ended with the script. */
export function start(program, args, options = {}) {
  const child = spawn(program, args, { stdio: 'inherit', ...options });
  children.add(child);
  child.on('close', () => children.delete(child));
  return child;
}

/** Does something when the script ends, last added first: stopping a database, removing a folder. */
export function whenEnding(work) {
  atEnd.unshift(work);
}

/** Ends every program that was started, then the rest, then this process. */
export async function end(code) {
  if (ending) return;
  ending = true;
  const waiting = [...children].map((child) => new Promise((resolve) => child.once('close', resolve)));
  for (const child of children) child.kill('SIGTERM');
  await Promise.race([Promise.all(waiting), new Promise((resolve) => setTimeout(resolve, 12_000).unref())]);
  for (const child of children) child.kill('SIGKILL');
  for (const work of atEnd) await work();
  process.exit(code);
}

process.on('SIGINT', () => void end(0));
process.on('SIGTERM', () => void end(0));
