/**
 * What a killed PostgreSQL leaves behind. A process that nobody has buried still answers to its number, so PostgreSQL
 * takes itself for running; its lock file goes only when no process works in the folder any more.
 */
import { existsSync, readFileSync, readdirSync, readlinkSync, realpathSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { giveUp } from './say.mjs';

const WAIT_S = 15;

/** Removes the lock file of a server that was killed; waits for its last processes. Linux only, elsewhere nothing. */
export async function clearLeftBehind(data) {
  const lock = join(data, 'postmaster.pid');
  if (!existsSync('/proc/self/stat') || !existsSync(lock)) return;
  const [pid = ''] = readFileSync(lock, 'utf8').split('\n');
  if (isAlive(pid.trim())) return;
  for (let seconds = 0; worksIn(data).length > 0; seconds += 1) {
    if (seconds === WAIT_S)
      giveUp(
        `processes of a killed database still work in ${data}: ${worksIn(data).join(', ')}. End them first.`,
      );
    await new Promise((resolve) => setTimeout(resolve, 1_000));
  }
  rmSync(lock, { force: true });
}

/** Whether a process is there and not merely waiting to be buried (state Z in proc(5)). */
function isAlive(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return !['Z', 'X'].includes(stat.slice(stat.lastIndexOf(')') + 2)[0]);
  } catch {
    return false;
  }
}

/** Numbers of the processes whose working folder this is, as it is of every process of PostgreSQL. */
function worksIn(data) {
  return readdirSync('/proc').filter((pid) => {
    if (!/^\d+$/.test(pid) || !isAlive(pid)) return false;
    try {
      return readlinkSync(`/proc/${pid}/cwd`) === realpathSync(data);
    } catch {
      return false;
    }
  });
}
