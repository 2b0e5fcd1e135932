// What the boot needs to know about processes, programs and ports. Plain Node, nothing installed.
import fs from 'node:fs';
import net from 'node:net';
import path from 'node:path';

/** @param {number} ms */
export const pause = (ms) => new Promise((resolve) => setTimeout(resolve, ms));

/** Is there such a process, whoever owns it? */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return !isZombie(pid);
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/** A process that ended and whose parent hasn't asked: in a container nobody may ever ask. */
function isZombie(pid) {
  return statFields(pid)?.[0] === 'Z';
}

/** When the process started, in the kernel's ticks; tells a pid from the same number used again. '' where unknown. */
export const startOf = (pid) => statFields(pid)?.[19] ?? '';

function statFields(pid) {
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  } catch {
    return undefined;
  }
}

/** Does this process run with `part` in its command line? Where /proc is missing its being alive has to do. */
export function runsWith(pid, part) {
  if (!pid || !isAlive(pid)) return false;
  if (!fs.existsSync('/proc/self/cmdline')) return true;
  try {
    return fs.readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').includes(part);
  } catch {
    return false;
  }
}

/** Sends TERM, then KILL after `patienceMs`; resolves when the process is gone. */
export async function endProcess(pid, patienceMs) {
  const until = Date.now() + patienceMs;
  signal(pid, 'SIGTERM');
  while (isAlive(pid) && Date.now() < until) await pause(20);
  if (!isAlive(pid)) return;
  signal(pid, 'SIGKILL');
  while (isAlive(pid)) await pause(20);
}

function signal(pid, name) {
  try {
    process.kill(pid, name);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

/** The first of these programs that is installed, as a path; undefined when none is. */
export function which(...names) {
  const folders = [...(process.env.PATH ?? '').split(':'), '/usr/sbin', '/usr/bin', '/sbin', '/bin', '/usr/local/sbin', '/usr/local/bin'];
  for (const name of names) {
    for (const folder of folders) {
      const file = path.join(folder || '/', name);
      try {
        fs.accessSync(file, fs.constants.X_OK);
        return file;
      } catch {
        // not in this folder
      }
    }
  }
  return undefined;
}

/** Can this TCP port be opened, on every given address that the machine has? */
export async function isPortFree(port, addresses = ['127.0.0.1']) {
  for (const address of addresses) if (!(await opens(port, address))) return false;
  return true;
}

function opens(port, address) {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', (error) => resolve(error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT'));
    server.listen({ port, host: address, exclusive: true, ipv6Only: address.includes(':') }, () => server.close(() => resolve(true)));
  });
}

/** A TCP port on loopback that was free a moment ago. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}
