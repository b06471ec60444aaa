import { execFileSync } from 'node:child_process';
import path from 'node:path';

/** Removes the throw-away cluster that `databaseUp` made for these tests alone. */
export default function databaseDown(): void {
  if (process.env.TEST_DATABASE_IS_OWN !== 'yes') return;
  const script = path.resolve(__dirname, '../../server/scripts/testFolder.mjs');
  execFileSync(process.execPath, [script, 'down', '--owner', String(process.pid)], { stdio: ['ignore', 'ignore', 'inherit'] });
}
