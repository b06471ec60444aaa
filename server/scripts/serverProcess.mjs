// Starts the bundled server and its subcommands, and listens to what it says.
import { spawn } from 'node:child_process';
import fs from 'node:fs';
import readline from 'node:readline';
import { root, serverBundle } from './paths.mjs';
import { atTheEnd, endProcess, isStopping, ownName, run, Sentence, Stopped } from './processes.mjs';

const asJson = (line) => { try { return JSON.parse(line); } catch { return null; } };

/**
 * Runs a subcommand of the server bundle to its end.
 * @param {'migrate' | 'seed'} name
 * @param {Record<string, string>} env added to this process's environment
 * @returns {Promise<object[]>} the JSON lines it printed
 */
export async function runServerCommand(name, env) {
  const { code, stdout, output } = await run(process.execPath, ['--enable-source-maps', serverBundle, name], { env: { ...process.env, ...env }, sheltered: true });
  if (code !== 0) throw new Sentence(`"${name}" of the server failed (exit code ${code}):\n${output.trim().slice(-3000)}`);
  return stdout.split('\n').map(asJson).filter((line) => line !== null && typeof line === 'object');
}

/** Warnings and errors of the server's log in one line for people; everything else stays in the log file. */
function worthShowing(line) {
  const entry = asJson(line);
  if (entry === null) return line.trim() === '' ? null : line;
  if (typeof entry !== 'object' || !(entry.level >= 40)) return null;
  return [entry.msg, entry.err?.message].filter(Boolean).join(': ') || null;
}

/**
 * Starts the server and waits until it listens.
 * @param {object} options
 * @param {Record<string, string>} options.env added to this process's environment
 * @param {string} options.logFile everything the server prints goes here
 * @param {(line: string) => void} [options.show] gets warnings and errors
 * @param {(pid: number) => void} [options.onSpawn] told at once, so that the process can be found again after a kill
 * @param {number} [options.patienceMs] how long it may take to listen [ms]
 * @returns {Promise<{port: number, pid: number, ended: Promise<number>, stop: () => Promise<void>}>} `ended` gives the exit code
 * @throws {Sentence} when it ends or stays silent instead
 */
export async function startServer({ env, logFile, show = () => undefined, onSpawn, patienceMs = 60_000 }) {
  if (isStopping()) throw new Stopped();
  // The log of the run before stays beside it: it is what one wants to read after a crash.
  if (fs.existsSync(logFile)) fs.renameSync(logFile, `${logFile}.before`);
  const log = fs.createWriteStream(logFile);
  const child = spawn(process.execPath, ['--enable-source-maps', serverBundle, 'serve'], {
    cwd: root, env: { ...process.env, ...env }, detached: true, stdio: ['ignore', 'pipe', 'pipe'],
  });
  const name = ownName(child.pid);
  onSpawn?.(child.pid);
  const stop = () => endProcess(name);
  const forget = atTheEnd(stop);
  const tail = [];
  let ready;
  const listening = new Promise((resolve) => { ready = resolve; });
  for (const stream of [child.stdout, child.stderr]) {
    readline.createInterface({ input: stream }).on('line', (line) => {
      log.write(`${line}\n`);
      tail.push(worthShowing(line) ?? line);
      if (tail.length > 40) tail.shift();
      const said = asJson(line);
      if (said?.ready === true && Number.isInteger(said.port)) { ready(said.port); return; }
      const text = worthShowing(line);
      if (text !== null) show(text);
    });
  }
  const ended = new Promise((resolve) => {
    child.once('error', () => resolve(1));
    child.once('close', (code) => { forget(); log.end(); resolve(code ?? 1); });
  });
  let timer;
  const silent = new Promise((resolve) => { timer = setTimeout(() => resolve('silent'), patienceMs); });
  const first = await Promise.race([listening.then((port) => ({ port })), ended.then((code) => ({ code })), silent]);
  clearTimeout(timer);
  if (isStopping()) throw new Stopped();
  if (first === 'silent') {
    await stop();
    throw new Sentence(`The server did not listen within ${patienceMs / 1000} s. What it said is in ${logFile}.`);
  }
  if (first.port === undefined) throw new Sentence(`The server ended instead of starting (exit code ${first.code}):\n${tail.join('\n')}`);
  return { port: first.port, pid: child.pid, ended, stop: async () => { await stop(); await ended; } };
}
