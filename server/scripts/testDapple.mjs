import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { buildServer, buildWeb } from './build.mjs';
import { installPrograms, missingPrograms } from './debian.mjs';
import { installPackages, packagesAreMissing } from './packages.mjs';
import { root, tool } from './paths.mjs';
import { atTheEnd, readJson, run, runCommand, Sentence, Stopped } from './processes.mjs';
import { duration, elapsedMs, say, step } from './progress.mjs';
import { closeTestFolder, openTestFolder } from './testFolder.mjs';

const parts = ['lint', 'types', 'jest', 'e2e'];

function chosenParts(args) {
  const chosen = new Set();
  for (const arg of args) {
    const list = /^--only=(.+)$/.exec(arg)?.[1]?.split(',');
    if (!list?.every((name) => parts.includes(name))) throw new Sentence(`"${arg}" is not known. Use: npm test -- --only=${parts.join(',')}`);
    list.forEach((name) => chosen.add(name));
  }
  return chosen.size > 0 ? chosen : new Set(parts);
}

/** The environment of the tests: without what the person at the keyboard has set for a server of their own. */
function cleanEnv(extra) {
  const env = { ...process.env };
  for (const name of Object.keys(env)) if (/^(DATABASE_URL|PORT|HOST|PUBLIC_URL|WEB_DIR|TOKEN_SECRET|BCRYPT_COST|SMTP_URL|MAIL_|DAPPLE_|WEATHER_|LOG_LEVEL|RATE_LIMIT|AUTH_RATE|TRUSTED_|NODE_ENV$|NODE_OPTIONS$|E2E_|TEST_)/.test(name)) delete env[name];
  return { ...env, ...extra };
}

/** A check that passes or fails as a whole; what it says is shown when it fails. */
async function check(title, args, env) {
  let result;
  await step(title, async (note) => {
    result = await run(process.execPath, args, { env });
    note(result.code === 0 ? 'nothing to say' : 'failed', result.code === 0);
  });
  if (result.code === 0) return { passed: 1, failed: 0 };
  say(result.output.trim());
  return { passed: 0, failed: 1 };
}

/** Typed routes: without the generated file, tsc believes every link. Expo's command also edits two tracked files, which get their text back. */
async function generateRouteTypes(env) {
  const files = ['.gitignore', 'tsconfig.json'].map((name) => path.join(root, name)).map((file) => ({ file, text: fs.readFileSync(file, 'utf8') }));
  const restore = () => files.forEach(({ file, text }) => { if (fs.readFileSync(file, 'utf8') !== text) fs.writeFileSync(file, text); });
  const forget = atTheEnd(restore);
  try {
    const { code, output } = await run(process.execPath, [tool.expo, 'customize', 'tsconfig.json'], { env: { ...env, CI: '1', EXPO_NO_TELEMETRY: '1' } });
    if (code !== 0) throw new Sentence(`The types of the routes could not be made:\n${output.trim()}`);
  } finally {
    restore();
    forget();
  }
}

/** Folders of tests of which each must have something to run: an empty one would pass in silence. */
const jestFolders = ['tests/scheduling', 'tests/server', 'tests/components'];

async function jest(env, folder) {
  say('\nJest: computation, API on PostgreSQL, components');
  const results = path.join(folder, 'jest.json');
  const { code } = await run(process.execPath,
    [tool.jest, '-c', 'tests/jest.config.js', '--ci', `--maxWorkers=${Math.max(2, os.availableParallelism() - 1)}`, '--json', `--outputFile=${results}`],
    { env: { ...env, TZ: 'UTC' }, output: 'show-errors' });
  const report = readJson(results);
  if (!report) return { passed: 0, failed: 1 };
  let failed = report.numFailedTests + report.numRuntimeErrorTestSuites;
  const skipped = report.numPendingTests + report.numTodoTests;
  if (skipped > 0) say(`${skipped} tests were skipped; a skipped test counts as failed.`);
  for (const place of jestFolders) {
    const ran = report.testResults.some((file) => file.name.startsWith(path.join(root, place)) && file.assertionResults.some(({ status }) => status === 'passed'));
    if (ran) continue;
    say(`No test of ${place} passed.`);
    failed += 1;
  }
  failed += skipped;
  if (code !== 0 && failed === 0) { say(`Jest ended with exit code ${code}.`); failed = 1; }
  return { passed: report.numPassedTests, failed };
}

async function e2e(env, folder) {
  say();
  try {
    await step('bundling the server', async (note) => { note(await buildServer() ? 'made' : 'unchanged'); });
    await step('screens', async (note) => { note(await buildWeb(() => note('waited for another build')) ? 'made' : 'unchanged'); });
  } catch (error) {
    if (error instanceof Stopped) throw error;
    say(error.message);
    return { passed: 0, failed: 1 };
  }
  say('\nPlaywright: phone 390 × 844 and wide 1280 × 800');
  const results = path.join(folder, 'playwright.json');
  const { code } = await run(process.execPath, [tool.playwright, 'test', '-c', 'tests/e2e/playwright.config.ts'], { env: { ...env, E2E_RESULTS: results }, output: 'show' });
  const report = readJson(results);
  if (!report) return { passed: 0, failed: 1 };
  const { expected, unexpected, flaky, skipped } = report.stats;
  if (skipped > 0) say(`${skipped} tests were skipped; a skipped test counts as failed.`);
  let failed = unexpected + flaky + skipped;
  if (expected + failed === 0) say('No test ran in the browser.');
  if (failed === 0 && (code !== 0 || expected === 0)) failed = 1;
  return { passed: expected, failed };
}

async function work() {
  const chosen = chosenParts(process.argv.slice(2));
  if (packagesAreMissing()) await step('installing packages (npm ci; a minute or more)', installPackages);
  const needed = [...(chosen.has('jest') || chosen.has('e2e') ? ['postgres'] : []), ...(chosen.has('e2e') ? ['chromium'] : [])];
  if (missingPrograms(needed).length > 0) await step(`installing ${missingPrograms(needed).join(' and ')} (apt-get)`, () => installPrograms(needed));

  let env = cleanEnv({});
  let folder;
  if (needed.length > 0) {
    await step('throw-away PostgreSQL', async () => {
      atTheEnd(() => closeTestFolder());
      const opened = await openTestFolder();
      folder = opened.folder;
      env = { ...env, TEST_DATABASE_URL: opened.url, TEST_FOLDER: folder };
    });
  }

  const results = {};
  // Lint reads types too: without those of the routes it takes needed assertions for needless ones.
  if (chosen.has('lint') || chosen.has('types')) await step('types of the routes', () => generateRouteTypes(env));
  if (chosen.has('lint')) results.lint = await check('lint', [tool.eslint, '.', '--max-warnings', '0'], env);
  if (chosen.has('types')) results.types = await check('types (tsc)', [tool.tsc, '--noEmit'], env);
  if (chosen.has('jest')) results.jest = await jest(env, folder);
  if (chosen.has('e2e')) results.e2e = await e2e(env, folder);

  say();
  for (const [name, { passed, failed }] of Object.entries(results)) say(`  ${failed === 0 ? '✓' : '✗'} ${name.padEnd(5)}  ${passed} passed, ${failed} failed`);
  const sum = (key) => Object.values(results).reduce((total, each) => total + each[key], 0);
  say(`  after ${duration(elapsedMs())}`);
  say(`\n${sum('passed')} passed, ${sum('failed')} failed`);
  return sum('failed') === 0 && sum('passed') > 0 ? 0 : 1;
}

/** Runs all tests, or those of --only, and leaves nothing running and no tracked file changed. */
export function testDapple() {
  return runCommand(work, { onStop: () => say('\nStopping …') });
}
