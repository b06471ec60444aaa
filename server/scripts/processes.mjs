// Child processes that never outlive the command that started them, and locks that survive a kill.
import { spawn } from 'node:child_process';
import crypto from 'node:crypto';
import fs from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { root } from './paths.mjs';

/** A failure that is the reader's to solve: shown as its sentence alone, without a stack. */
export class Sentence extends Error {}
/** Thrown by work that was under way when the command was told to stop. */
export class Stopped extends Error {}

export const sleep = (milliseconds) => new Promise((resolve) => { setTimeout(resolve, milliseconds); });

const running = new Map();
const cleanups = [];
let stopping = false;
let ended = false;

/** Registers what must be undone at the end, however the end comes; undone in reverse order. Returns a function that takes it back. */
export function atTheEnd(cleanup) {
  cleanups.push(cleanup);
  return () => { const at = cleanups.indexOf(cleanup); if (at >= 0) cleanups.splice(at, 1); };
}

/**
 * Runs a command to its end.
 * @param {string} command
 * @param {string[]} args
 * @param {object} [options]
 * @param {string} [options.cwd] folder, the repository root by default
 * @param {NodeJS.ProcessEnv} [options.env] the whole environment, this process's own by default
 * @param {{uid: number, gid: number}} [options.user] other user to run as (only root can)
 * @param {'capture' | 'show' | 'show-errors' | 'ignore'} [options.output] keep the output, let it through (all, or stderr alone), or drop it
 * @param {boolean} [options.sheltered] true for work that must not be cut in half: a signal waits for it, and it may run while stopping
 * @returns {Promise<{code: number, stdout: string, output: string}>} `output` is stdout and stderr as they came
 */
export async function run(command, args, { cwd = root, env = process.env, user, output = 'capture', sheltered = false } = {}) {
  if (stopping && !sheltered) throw new Stopped();
  const child = spawn(command, args, {
    cwd, env, ...user,
    // A group of its own: Ctrl-C in a terminal reaches the whole foreground group, and then nothing could be stopped in order.
    detached: true,
    stdio: { capture: ['ignore', 'pipe', 'pipe'], show: ['ignore', 'inherit', 'inherit'], 'show-errors': ['ignore', 'ignore', 'inherit'], ignore: 'ignore' }[output],
  });
  const done = new Promise((resolve, reject) => {
    let stdout = '';
    let all = '';
    child.stdout?.setEncoding('utf8').on('data', (text) => { stdout += text; all += text; });
    child.stderr?.setEncoding('utf8').on('data', (text) => { all += text; });
    child.once('error', reject);
    child.once('close', (code, signal) => resolve({ code: code ?? (signal ? 128 : 1), stdout, output: all }));
  });
  running.set(child, { done: done.catch(() => undefined), sheltered });
  try {
    const result = await done;
    if (stopping && !sheltered) throw new Stopped();
    return result;
  } finally {
    running.delete(child);
  }
}

/** As `run`, and throws with the end of the output when the command fails. */
export async function mustRun(what, command, args, options) {
  const result = await run(command, args, options);
  if (result.code !== 0) throw new Sentence(`${what} failed (exit code ${result.code}).${result.output ? `\n${result.output.trim().slice(-3000)}` : ''}`);
  return result;
}

function signalGroup(pid, signal) {
  try { process.kill(-pid, signal); } catch { /* already gone */ }
}

async function undoEverything() {
  for (const [child, { sheltered }] of running) if (!sheltered) signalGroup(child.pid, 'SIGTERM');
  const patience = setTimeout(() => {
    for (const [child, { sheltered }] of running) if (!sheltered) signalGroup(child.pid, 'SIGKILL');
  }, 5_000);
  await Promise.all([...running.values()].map(({ done }) => done));
  clearTimeout(patience);
  while (cleanups.length > 0) {
    try { await cleanups.pop()(); } catch (error) { console.error(String(error?.message ?? error)); }
  }
}

/**
 * Runs a whole command: work, then clean up, also after a failure, Ctrl-C, a closed terminal or SIGTERM.
 * @param {() => Promise<number>} work returns the exit code
 * @param {{onStop?: () => void}} [options] `onStop` is told when a signal asks for the end
 */
export async function runCommand(work, { onStop } = {}) {
  const end = (code) => { ended = true; process.exit(code); };
  for (const [signal, code] of [['SIGINT', 130], ['SIGTERM', 143], ['SIGHUP', 129]]) {
    process.on(signal, () => {
      // npm passes on a signal that the terminal has already sent: the second one says nothing new.
      if (stopping) return;
      stopping = true;
      onStop?.();
      void undoEverything().then(() => end(code));
    });
  }
  const fail = async (error) => {
    if (stopping || ended) return;
    stopping = true;
    console.error(`\n${error instanceof Sentence ? error.message : error?.stack ?? String(error)}`);
    await undoEverything();
    end(1);
  };
  // Also what a library throws where nobody waits for it must not leave servers and databases behind.
  process.on('unhandledRejection', (error) => void fail(error));
  process.on('uncaughtException', (error) => void fail(error));
  try {
    const code = await work();
    if (stopping) return;
    stopping = true;
    await undoEverything();
    end(code);
  } catch (error) {
    await fail(error);
  }
}

export const isStopping = () => stopping;

/**
 * When a process started, in clock ticks since boot; null when there is none or only its zombie is left.
 * Together with the pid this names a process for good: pids are used again.
 */
export function startTimeOf(pid) {
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return fields[0] === 'Z' || fields[0] === 'X' ? null : fields[19];
  } catch {
    return null;
  }
}

export const ownName = (pid = process.pid) => ({ pid, startTime: startTimeOf(pid) });
export const isAlive = (name) => Number.isInteger(name?.pid) && name.startTime !== null && startTimeOf(name.pid) === name.startTime;

/** Ends a process of ours by its name from `ownName`: asks first, then insists. */
export async function endProcess(name, patienceMs = 6_000) {
  if (!isAlive(name)) return;
  try { process.kill(name.pid, 'SIGTERM'); } catch { return; }
  for (let waited = 0; waited < patienceMs && isAlive(name); waited += 50) await sleep(50);
  if (!isAlive(name)) return;
  try { process.kill(name.pid, 'SIGKILL'); } catch { return; }
  for (let waited = 0; waited < 2_000 && isAlive(name); waited += 50) await sleep(50);
}

export function readJson(file) {
  try { return JSON.parse(fs.readFileSync(file, 'utf8')); } catch { return null; }
}

/** Writes a file so that a kill leaves the old content or the new, never a half. */
export function writeWhole(file, content, mode = 0o644) {
  const draft = `${file}.${process.pid}.${crypto.randomBytes(4).toString('hex')}`;
  fs.writeFileSync(draft, content, { mode });
  fs.renameSync(draft, file);
}

/**
 * Takes a lock file, or says who holds it. A lock whose process is gone is taken over.
 * @param {string} file
 * @param {object} [note] kept in the lock for whoever finds it taken
 * @returns {{holder: object | null, release: () => void}} `holder` is null when the lock is ours
 */
export function takeLock(file, note = {}) {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  const mine = { ...ownName(), ...note, token: crypto.randomBytes(8).toString('hex') };
  const draft = `${file}.${mine.token}`;
  fs.writeFileSync(draft, JSON.stringify(mine));
  try {
    for (let attempt = 0; attempt < 50; attempt += 1) {
      try {
        // A link either appears whole or fails: nobody ever reads a half-written lock.
        fs.linkSync(draft, file);
        return { holder: null, release: () => { if (readJson(file)?.token === mine.token) fs.rmSync(file, { force: true }); } };
      } catch (error) {
        if (error.code !== 'EEXIST') throw error;
      }
      const found = readJson(file);
      if (found && isAlive(found)) return { holder: found, release: () => undefined };
      const aside = `${file}.stale.${mine.token}`;
      try { fs.renameSync(file, aside); } catch { continue; }
      const moved = readJson(aside);
      // Another process may have replaced the stale lock between our reading and our renaming: put theirs back.
      if (moved && isAlive(moved)) { try { fs.linkSync(aside, file); } catch { /* a third one was faster */ } }
      fs.rmSync(aside, { force: true });
    }
    throw new Sentence(`The lock ${file} could not be taken. Remove it and try again.`);
  } finally {
    fs.rmSync(draft, { force: true });
  }
}

/** Waits for a lock, does the work, gives the lock back. */
export async function whileLocked(file, work, onWait) {
  let told = false;
  for (;;) {
    const lock = takeLock(file);
    if (!lock.holder) {
      const untrack = atTheEnd(lock.release);
      try { return await work(); } finally { untrack(); lock.release(); }
    }
    if (isStopping()) throw new Stopped();
    if (!told) { onWait?.(lock.holder); told = true; }
    await sleep(200);
  }
}

const canListen = (port, host) => new Promise((resolve) => {
  const probe = net.createServer();
  probe.once('error', () => resolve(false));
  probe.listen({ port, host, exclusive: true }, () => { probe.close(() => resolve(true)); });
});

/** Whether nobody listens on a port of this machine, on any address. */
export const isPortFree = async (port) => (await canListen(port, '127.0.0.1')) && (await canListen(port, '0.0.0.0'));

/** A free port outside the range from which the kernel lends ports to outgoing connections, so that it stays free for a while. */
export async function freePort() {
  for (let attempt = 0; attempt < 200; attempt += 1) {
    const port = crypto.randomInt(20_000, 32_000);
    if (await isPortFree(port)) return port;
  }
  throw new Sentence('No free network port was found on 127.0.0.1.');
}
