import crypto from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { buildServer, buildWeb, webIsStale } from './build.mjs';
import { installPrograms, missingPrograms } from './debian.mjs';
import { installPackages, packagesAreMissing } from './packages.mjs';
import { dataFolder, root, webFolder } from './paths.mjs';
import { startCluster, stopCluster } from './postgres.mjs';
import { atTheEnd, endProcess, freePort, isPortFree, isStopping, ownName, readJson, runCommand, Sentence, takeLock, writeWhole } from './processes.mjs';
import { duration, elapsedMs, say, step } from './progress.mjs';
import { runServerCommand, startServer } from './serverProcess.mjs';

const clusterFolder = path.join(dataFolder, 'postgres');
const lockFile = path.join(dataFolder, 'start.lock');
const serverNameFile = path.join(dataFolder, 'server.pid');

function wantedPort() {
  const text = process.env.PORT ?? '4180';
  const port = Number(text);
  if (!/^\d+$/.test(text) || port < 1 || port > 65_535) throw new Sentence(`PORT must be a number from 1 to 65535, but it is "${text}".`);
  return port;
}

function checkFolder() {
  const place = fs.existsSync(dataFolder) ? dataFolder : root;
  try {
    fs.accessSync(place, fs.constants.W_OK);
  } catch {
    throw new Sentence(`This user may not write in ${place}, where Dapple keeps its database. Start it as the user who owns that folder, or in a clone of one's own.`);
  }
}

/** One start per clone: two would share a database cluster, and each would stop it under the other. */
function lockThisClone(port) {
  const lock = takeLock(lockFile, { port });
  if (lock.holder) {
    throw new Sentence(`Dapple is already started from this folder (process ${lock.holder.pid}, http://127.0.0.1:${lock.holder.port}). Stop it with Ctrl-C where it runs, or with: kill ${lock.holder.pid}`);
  }
  atTheEnd(lock.release);
}

/** A start that was killed could not end its server. */
async function endLeftServer() {
  const left = readJson(serverNameFile);
  if (left) await endProcess(left);
  fs.rmSync(serverNameFile, { force: true });
}

async function checkPort(port) {
  if (await isPortFree(port)) return;
  const other = port < 65_535 && await isPortFree(port + 1) ? port + 1 : await freePort();
  throw new Sentence(`Port ${port} is used by another program. Take another one: PORT=${other} npm start`);
}

/** Signs access tokens; kept, so that people stay signed in over a restart. */
function tokenSecret() {
  if (process.env.TOKEN_SECRET) return process.env.TOKEN_SECRET;
  const file = path.join(dataFolder, 'secret');
  const kept = fs.existsSync(file) ? fs.readFileSync(file, 'utf8').trim() : '';
  if (kept.length >= 64) return kept;
  const made = crypto.randomBytes(48).toString('base64url');
  writeWhole(file, `${made}\n`, 0o600);
  return made;
}

async function database() {
  if (process.env.DATABASE_URL) {
    say('  ✓ database: the one that DATABASE_URL names');
    return process.env.DATABASE_URL;
  }
  return step('starting PostgreSQL', async (note) => {
    atTheEnd(() => stopCluster({ directory: clusterFolder }));
    const cluster = await startCluster({ directory: clusterFolder });
    note(`127.0.0.1:${cluster.port}, kept in ${path.relative(root, cluster.home).startsWith('..') ? cluster.home : path.relative(root, cluster.home)}`);
    return cluster.url;
  });
}

function showAddresses({ port, mode, accounts }) {
  const address = `http://127.0.0.1:${port}`;
  say();
  say(`Dapple is ready after ${duration(elapsedMs())}:  ${address}`);
  if (accounts.length > 0) {
    const width = Math.max(...accounts.map(({ email }) => email.length));
    say();
    say('Demonstration accounts:');
    for (const { role, email, password } of accounts) say(`  ${email.padEnd(width)}  password ${password}   (${role})`);
  }
  if (mode === 'demonstration' && !process.env.SMTP_URL) {
    say();
    say(`Its e-mail is read at:  ${address}/demo/mail`);
  }
  say();
  say('Ctrl-C stops it.');
}

async function work() {
  const port = wantedPort();
  const mode = process.env.DAPPLE_MODE ?? 'demonstration';
  checkFolder();
  lockThisClone(port);
  await endLeftServer();
  await checkPort(port);

  if (packagesAreMissing()) await step('installing packages (npm ci; a minute or more)', installPackages);
  if (!process.env.DATABASE_URL && missingPrograms(['postgres']).length > 0) await step('installing PostgreSQL (apt-get)', () => installPrograms(['postgres']));
  const url = await database();

  await step('bundling the server', async (note) => { note(await buildServer() ? 'made' : 'unchanged'); });
  const env = {
    NODE_ENV: 'production', DATABASE_URL: url, DAPPLE_MODE: mode, PORT: String(port), WEB_DIR: webFolder, TOKEN_SECRET: tokenSecret(),
    PUBLIC_URL: process.env.PUBLIC_URL ?? `http://127.0.0.1:${port}`,
  };
  await step('bringing the database up to date', async () => { await runServerCommand('migrate', env); });
  const accounts = mode !== 'demonstration' ? [] : await step('demonstration yards', async () => (await runServerCommand('seed', env)).find((line) => Array.isArray(line.accounts))?.accounts ?? []);
  await step(webIsStale() ? 'building the screens (about a minute)' : 'screens', async (note) => {
    note(await buildWeb(() => note('waited for another build')) ? 'made' : 'unchanged');
  });

  atTheEnd(() => fs.rmSync(serverNameFile, { force: true }));
  const server = await step('starting the server', () => startServer({
    env, logFile: path.join(dataFolder, 'server.log'), show: (line) => say(`server: ${line}`),
    onSpawn: (pid) => writeWhole(serverNameFile, JSON.stringify(ownName(pid))),
  }));
  showAddresses({ port: server.port, mode, accounts });

  const code = await server.ended;
  if (isStopping()) return 0;
  say(`\nThe server ended by itself (exit code ${code}). What it said is in ${path.relative(root, path.join(dataFolder, 'server.log'))}. Nothing that was saved is lost: start it again with npm start.`);
  return 1;
}

/** Brings Dapple up, keeps it up until it is told to stop, and leaves nothing running. */
export function startDapple() {
  return runCommand(work, { onStop: () => say('\nStopping …') });
}
