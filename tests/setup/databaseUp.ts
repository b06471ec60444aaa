import { execFileSync } from 'node:child_process';
import path from 'node:path';
import { migrate } from '../../server/migrate';

/**
 * Prepares the template database that `workerDatabase` copies: in the cluster of `npm test` when that runs the tests,
 * otherwise in a throw-away cluster that `databaseDown` removes.
 */
export default async function databaseUp(): Promise<void> {
  if (!process.env.TEST_DATABASE_URL) {
    const script = path.resolve(__dirname, '../../server/scripts/testFolder.mjs');
    const url = execFileSync(process.execPath, [script, 'up', '--owner', String(process.pid)], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'inherit'] });
    process.env.TEST_DATABASE_URL = url.trim();
    process.env.TEST_DATABASE_IS_OWN = 'yes';
  }
  await migrate(process.env.TEST_DATABASE_URL);
}
