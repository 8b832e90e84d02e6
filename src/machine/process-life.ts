import { readFileSync } from 'node:fs';
import { hostname } from 'node:os';

/** Who holds something: enough to tell later whether that process still runs. */
export interface Holder {
  readonly pid: number;
  readonly host: string;
  /** When the process began, where the system tells (Linux: clock ticks since boot, and the boot's own name); "" elsewhere. */
  readonly began: string;
}

/** This process as a holder. */
export const thisProcess = (): Holder => ({ pid: process.pid, host: hostname(), began: began(process.pid) });

/** Whether the holder still runs; true where that cannot be told, as for another machine. */
export function mayRun(holder: Holder): boolean {
  if (holder.host !== hostname()) return true;
  try {
    process.kill(holder.pid, 0);
  } catch (error) {
    // EPERM: it runs, under another user.
    if ((error as NodeJS.ErrnoException).code !== 'EPERM') return false;
  }
  // A number of a dead process is given out again: then the beginnings differ.
  const now = began(holder.pid);
  return holder.began === '' || now === '' || holder.began === now;
}

/** proc(5): field 22 of /proc/PID/stat, counted after the name in brackets, which may hold anything. */
function began(pid: number): string {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    // A zombie has ended and only waits to be collected.
    if (fields[0] === 'Z') return 'ended';
    return `${readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim()} ${fields[19]}`;
  } catch {
    return '';
  }
}
