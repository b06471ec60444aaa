// Playwright's global setup: a seeded demonstration for each device, on a server and a database of its own, so that what one device does
// (also jumping the demonstration's clock) never meets the other.
import path from 'node:path';
import { Client } from 'pg';
import { buildServer, buildWeb } from '../../server/scripts/build.mjs';
import { webFolder } from '../../server/scripts/paths.mjs';
import { freePort } from '../../server/scripts/processes.mjs';
import { runServerCommand, startServer } from '../../server/scripts/serverProcess.mjs';
import { closeTestFolder, noteServer, openTestFolder } from '../../server/scripts/testFolder.mjs';

const devices = ['phone', 'wide'];

/** The settings of a server under test: as in the demonstration, but sixty clicks a second are no attack. */
export const serverSettings = {
  NODE_ENV: 'production', DAPPLE_MODE: 'demonstration', WEB_DIR: webFolder, TOKEN_SECRET: 'a secret that only the tests of this run know, long enough',
  BCRYPT_COST: '6', RATE_LIMIT_PER_MINUTE: '1000000', AUTH_RATE_LIMIT: '100000', LOG_LEVEL: 'warn',
};

/** Runs one statement on a database of the test cluster. */
export async function onDatabase(url, statement) {
  const client = new Client({ connectionString: url });
  await client.connect();
  try { return (await client.query(statement)).rows; } finally { await client.end(); }
}

const withName = (url, database) => Object.assign(new URL(url), { pathname: `/${database}` }).href;

/** Makes a database with the whole schema and the demonstration in it. @returns {Promise<{url: string, accounts: object[]}>} */
export async function seedDatabase(templateUrl, name) {
  await onDatabase(withName(templateUrl, 'postgres'), `CREATE DATABASE ${name} TEMPLATE "${new URL(templateUrl).pathname.slice(1)}" STRATEGY file_copy`);
  const env = { ...serverSettings, DATABASE_URL: withName(templateUrl, name) };
  await runServerCommand('migrate', env);
  const accounts = (await runServerCommand('seed', env)).find((line) => Array.isArray(line.accounts))?.accounts;
  return { url: env.DATABASE_URL, accounts: accounts ?? [] };
}

export default async function e2eServers() {
  const given = process.env.TEST_DATABASE_URL !== undefined && process.env.TEST_FOLDER !== undefined;
  const { folder, url } = given ? { folder: process.env.TEST_FOLDER, url: process.env.TEST_DATABASE_URL } : await openTestFolder();
  const servers = [];
  const close = async () => {
    await Promise.all(servers.map((server) => server.stop()));
    if (!given) await closeTestFolder();
  };
  try {
    await buildServer();
    await buildWeb();
    const seeded = await seedDatabase(url, 'e2e_seeded');
    // Specs sign in with what the seed says, the same lines that npm start shows.
    process.env.E2E_ACCOUNTS = JSON.stringify(seeded.accounts);
    for (const device of devices) {
      await onDatabase(withName(url, 'postgres'), `CREATE DATABASE e2e_${device} TEMPLATE e2e_seeded STRATEGY file_copy`);
      const port = await freePort();
      const address = `http://127.0.0.1:${port}`;
      servers.push(await startServer({
        env: { ...serverSettings, DATABASE_URL: withName(url, `e2e_${device}`), PORT: String(port), PUBLIC_URL: address },
        logFile: path.join(folder, `${device}.log`),
        show: (line) => process.stderr.write(`server (${device}): ${line}\n`),
        onSpawn: (pid) => noteServer(folder, pid),
      }));
      process.env[`E2E_${device.toUpperCase()}_URL`] = address;
    }
    return close;
  } catch (error) {
    await close();
    throw error;
  }
}
