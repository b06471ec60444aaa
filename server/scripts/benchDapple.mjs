import { spawn } from 'node:child_process';
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import readline from 'node:readline';
import zlib from 'node:zlib';
import { buildServer, buildWeb } from './build.mjs';
import { chromium, installPrograms, missingPrograms } from './debian.mjs';
import { installPackages, packagesAreMissing } from './packages.mjs';
import { root, tool } from './paths.mjs';
import { atTheEnd, endProcess, freePort, mustRun, ownName, run, runCommand, Sentence } from './processes.mjs';
import { progressOnErrors, say, step } from './progress.mjs';
import { startServer } from './serverProcess.mjs';
import { closeTestFolder, noteServer, openTestFolder } from './testFolder.mjs';

const chromiumFlags = ['--headless=new', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];

/** The value below which the given part of the numbers lies (nearest rank). */
function quantile(numbers, part) {
  const sorted = [...numbers].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.max(0, Math.ceil(part * sorted.length) - 1))];
}
const median = (numbers) => quantile(numbers, 0.5);

let allOk = true;

/** Lets the measurement of the seasons write the README's section and its picture. */
const WRITE_SEASONS = '--write-seasons';
const writesSeasons = process.argv.includes(WRITE_SEASONS);

/** Prints one figure. @param {'most' | 'least'} bound whether the limit is the most or the least that is allowed */
function report(name, value, unit, bound, limit) {
  const ok = Number.isFinite(value) && (bound === 'most' ? value <= limit : value >= limit);
  allOk &&= ok;
  process.stdout.write(`${JSON.stringify({ name, value: Number.isFinite(value) ? Math.round(value * 100) / 100 : null, unit, limit, ok })}\n`);
}

/** A seeded demonstration on a throw-away database, shared by the measurements that need a server. */
async function demonstration() {
  const { seedDatabase, serverSettings, onDatabase } = await import('../../tests/setup/e2eServers.mjs');
  await step('bundling the server', async () => { await buildServer(); });
  await step('screens', async () => { await buildWeb(); });
  return step('a demonstration on a throw-away database', async () => {
    atTheEnd(() => closeTestFolder());
    const { folder, url } = await openTestFolder();
    const { url: databaseUrl, accounts } = await seedDatabase(url, 'bench');
    // The throw-away cluster gathers no statistics by itself, and the planner of PostgreSQL wants them.
    await onDatabase(databaseUrl, 'ANALYZE');
    const port = await freePort();
    const address = `http://127.0.0.1:${port}`;
    await startServer({
      env: { ...serverSettings, DATABASE_URL: databaseUrl, PORT: String(port), PUBLIC_URL: address }, logFile: path.join(folder, 'bench.log'), show: say, onSpawn: (pid) => noteServer(folder, pid),
    });
    return { folder, address, accounts };
  });
}

/** JavaScript that the app's first screen asks for, each file gzipped. The front page itself is HTML and runs none of it. */
async function javascript({ address }) {
  const { chromium: browserType } = await import('@playwright/test');
  const browser = await browserType.launch({ executablePath: chromium, args: chromiumFlags });
  try {
    const page = await browser.newPage({ viewport: { width: 390, height: 844 } });
    const scripts = new Map();
    page.on('response', (response) => { if (response.request().resourceType() === 'script') scripts.set(response.url(), response); });
    await page.goto(`${address}/sign-in`, { waitUntil: 'networkidle' });
    // Chunks that the page fetches by itself a moment later belong to the first visit too.
    await page.waitForTimeout(1_500);
    if (scripts.size === 0) throw new Sentence('The first screen asked for no script at all.');
    let bytes = 0;
    for (const [url, response] of [...scripts]) {
      const size = zlib.gzipSync(await response.body(), { level: 9 }).length;
      say(`    ${(size / 1000).toFixed(1).padStart(6)} kB  ${path.basename(url)}`);
      bytes += size;
    }
    report('entry-javascript', bytes / 1000, 'kB gzip', 'most', 420);
  } finally {
    await browser.close();
  }
}

/** Planning of the reference yard, in a process of its own. */
async function plan({ folder }) {
  const bundle = path.join(folder, 'planTime.cjs');
  await mustRun('Bundling the reference yard', process.execPath, [tool.esbuild, 'tests/bench/planTime.ts', '--bundle', '--platform=node', '--target=node20', '--log-level=warning', `--outfile=${bundle}`]);
  const { stdout } = await mustRun('Planning the reference yard', process.execPath, [bundle]);
  const { planner, setsPerPlan, dosesPerPlan, times, fourfoldTimes } = JSON.parse(stdout);
  say(`    ${planner}: ${setsPerPlan.toFixed(1)} sets and ${dosesPerPlan.toFixed(1)} doses a plan`);
  if (!(setsPerPlan > 0 && dosesPerPlan > 0)) throw new Sentence('The plan of the reference yard is empty: its time says nothing.');
  report('plan-median', median(times), 'ms', 'most', 120);
  report('plan-p95', quantile(times, 0.95), 'ms', 'most', 400);
  report('plan-four-times-the-yard', median(fourfoldTimes) / median(times), 'ratio', 'most', 10);
}

/** The planner before the referee: small yards that HiGHS solves to the end, and a bound for large ones. */
async function refereeGap({ folder }) {
  const bundle = path.join(folder, 'refereeGap.cjs');
  await mustRun('Bundling the referee', process.execPath, [tool.esbuild, 'tests/bench/refereeGap.ts', '--bundle', '--platform=node', '--target=node20', '--external:highs', '--log-level=warning', `--outfile=${bundle}`]);
  const { stdout } = await mustRun('Proving optima', process.execPath, [bundle], { env: { ...process.env, NODE_PATH: path.join(root, 'node_modules') } });
  const { planner, gaps, unproven, breaches, refereeSeconds, overBound } = JSON.parse(stdout);
  const mean = gaps.reduce((sum, gap) => sum + gap, 0) / gaps.length;
  say(`    ${planner}: ${gaps.length} yards proven in ${refereeSeconds.toFixed(0)} s, ${unproven} not within their time; least gap ${(100 * Math.min(...gaps)).toFixed(3)} %`);
  say(`    14 positions, 10 days: ${overBound.map((ratio) => ratio.toFixed(2)).join(', ')} times a bound that no plan goes below (Lagrange)`);
  report('referee-yards-proven', gaps.length, 'yards', 'least', 100);
  report('referee-gap-mean', 100 * mean, '%', 'most', 2);
  report('referee-gap-worst', 100 * Math.max(...gaps), '%', 'most', 6);
  report('referee-limits-broken', breaches, 'limits', 'most', 0);
}

/** Sums of the computation, in a process of their own. */
async function sums({ folder }) {
  const bundle = path.join(folder, 'sumsTime.cjs');
  await mustRun('Bundling the sums', process.execPath, [tool.esbuild, 'tests/bench/sumsTime.ts', '--bundle', '--platform=node', '--target=node20', '--log-level=warning', `--outfile=${bundle}`]);
  const { stdout } = await mustRun('Timing the sums', process.execPath, [bundle]);
  const { difference, et0, plain, exposure } = JSON.parse(stdout);
  if (!(difference < 1e-9)) throw new Sentence('Reference ET and the plain loop beside it do not agree: their times say nothing.');
  say(`    10,000 reference ETs ${Math.min(...et0).toFixed(2)} ms, plain loop ${Math.min(...plain).toFixed(2)} ms; a year of exposure ${Math.min(...exposure).toFixed(0)} ms at best`);
  // The least of each is what other work on the machine disturbed least.
  report('et0-over-plain-loop', Math.min(...et0) / Math.min(...plain), 'ratio', 'most', 2);
  report('exposure-year', median(exposure), 'ms of one core', 'most', 200);
}

/** Searches and forecasts of the computation, in a process of their own. */
async function searches({ folder }) {
  const bundle = path.join(folder, 'searchTime.cjs');
  await mustRun('Bundling the searches', process.execPath, [tool.esbuild, 'tests/bench/searchTime.ts', '--bundle', '--platform=node', '--target=node20', '--log-level=warning', `--outfile=${bundle}`]);
  const { stdout } = await mustRun('Timing the searches', process.execPath, [bundle]);
  const found = JSON.parse(stdout);
  if (Object.values(found).some(({ least }) => !(least > 0))) throw new Sentence('A search or forecast found nothing: its time says nothing.');
  report('move-distance-search', median(found.moveDistance.times), 'ms', 'most', 20);
  report('move-distance-in-zone', median(found.moveInZone.times), 'ms', 'most', 20);
  report('seedbed-forecast', median(found.seedbedForecast.times), 'ms', 'most', 2);
  say(`    doses that keep a seedbed moist for ten days: ${median(found.keepMoist.times).toFixed(2)} ms`);
}

async function json(address, pathname, options = {}) {
  const response = await fetch(`${address}${pathname}`, { ...options, headers: { 'content-type': 'application/json', ...options.headers } });
  if (!response.ok) throw new Sentence(`${pathname} answered ${response.status}: ${await response.text()}`);
  return response.json();
}

/** p95 of the answers of one route under load [ms]. Fails when a single answer is an error: those are fast. */
async function p95(address, pathname, headers, seconds) {
  const { default: autocannon } = await import('autocannon');
  const times = [];
  const load = autocannon({ url: `${address}${pathname}`, connections: 64, duration: seconds, headers });
  load.on('response', (_client, _status, _bytes, milliseconds) => { times.push(milliseconds); });
  const result = await load;
  if (result.non2xx > 0 || result.errors > 0 || times.length === 0) throw new Sentence(`${pathname} under load: ${result.non2xx} error answers, ${result.errors} broken connections, ${times.length} answers.`);
  return quantile(times, 0.95);
}

/** A screen's read against the barest read of the same server, in turns, so that other work on the machine meets both. */
async function api({ address, accounts }) {
  const owner = accounts.find(({ role }) => /owner/i.test(role));
  if (!owner) throw new Sentence('The demonstration has no owner to sign in as.');
  const { accessToken } = await json(address, '/api/auth/sign-in', { method: 'POST', body: JSON.stringify({ email: owner.email, password: owner.password }) });
  const headers = { authorization: `Bearer ${accessToken}` };
  const { yards } = await json(address, '/api/yards', { headers });
  if (!yards?.length) throw new Sentence('The owner of the demonstration has no yard.');
  const today = `/api/yards/${yards[0].id}/today`;
  await p95(address, '/api/floor', headers, 2);
  await p95(address, today, headers, 2);
  const ratios = [];
  for (let turn = 0; turn < 3; turn += 1) {
    const floor = await p95(address, '/api/floor', headers, 4);
    const read = await p95(address, today, headers, 4);
    say(`    p95 floor ${floor.toFixed(1)} ms, today ${read.toFixed(1)} ms`);
    ratios.push(read / floor);
  }
  report('api-p95-over-floor', median(ratios), 'ratio', 'most', 3);
}

async function lighthouseOnce(address, file) {
  // Now and then Chromium starts too slowly for the trace (NO_NAVSTART) and everything scores nothing: that says nothing about the page.
  for (let attempt = 0; attempt < 4; attempt += 1) {
    await run(process.execPath, [tool.lighthouse, address, '--quiet', '--output=json', `--output-path=${file}`, '--only-categories=performance,accessibility,best-practices', `--chrome-flags=${chromiumFlags.join(' ')}`],
      { env: { ...process.env, CHROME_PATH: chromium } });
    const result = fs.existsSync(file) ? JSON.parse(fs.readFileSync(file, 'utf8')) : null;
    fs.rmSync(file, { force: true });
    if (result && !result.runtimeError && result.categories.performance.score !== null) return result;
  }
  throw new Sentence('Lighthouse failed four times in a row.');
}

const visitText = ({ categories, audits }) => `performance ${Math.round(categories.performance.score * 100)}, first content ${audits['first-contentful-paint'].displayValue}, largest ${audits['largest-contentful-paint'].displayValue}, blocked ${audits['total-blocking-time'].displayValue}, shift ${audits['cumulative-layout-shift'].displayValue}`;

/** Lighthouse's default device, a phone on a slow line: the median of three visits of the front page; one of the app's first screen is told beside it. */
async function lighthouse({ address, folder }) {
  const scores = { performance: [], accessibility: [], 'best-practices': [] };
  const faults = new Set();
  for (let visit = 0; visit < 3; visit += 1) {
    const found = await lighthouseOnce(address, path.join(folder, `lighthouse-${visit}.json`));
    const { categories, audits } = found;
    for (const name of Object.keys(scores)) scores[name].push(categories[name].score * 100);
    for (const name of ['accessibility', 'best-practices']) {
      for (const { id, weight } of categories[name].auditRefs) if (weight > 0 && audits[id].score !== null && audits[id].score < 1) faults.add(`${name}: ${audits[id].title}`);
    }
    say(`    visit ${visit + 1}: ${visitText(found)}`);
  }
  for (const fault of faults) say(`    ${fault}`);
  say(`    sign in, where the app starts: ${visitText(await lighthouseOnce(`${address}/sign-in`, path.join(folder, 'lighthouse-sign-in.json')))}`);
  report('lighthouse-performance', median(scores.performance), 'score', 'least', 90);
  report('lighthouse-accessibility', median(scores.accessibility), 'score', 'least', 100);
  report('lighthouse-best-practices', median(scores['best-practices']), 'score', 'least', 100);
}

/** Starts this clone as a person would and stops it again. @returns {Promise<number>} time until it was ready [s] */
async function startOnce(port) {
  const from = performance.now();
  const child = spawn(process.execPath, ['server/scripts/start.mjs'], { cwd: root, env: { ...process.env, PORT: String(port) }, detached: true, stdio: ['ignore', 'pipe', 'pipe'] });
  const name = ownName(child.pid);
  const forget = atTheEnd(() => endProcess(name, 30_000));
  let said = '';
  child.stderr.setEncoding('utf8').on('data', (text) => { said += text; });
  const ended = new Promise((resolve) => { child.once('close', resolve); });
  const ready = new Promise((resolve) => {
    readline.createInterface({ input: child.stdout }).on('line', (line) => { said += `${line}\n`; if (line.startsWith('Dapple is ready')) resolve((performance.now() - from) / 1000); });
  });
  const seconds = await Promise.race([ready, ended.then(() => null)]);
  await endProcess(name, 30_000);
  await ended;
  forget();
  if (seconds === null) throw new Sentence(`npm start did not get ready:\n${said.trim()}`);
  return seconds;
}

/** The first start makes what is missing and is not counted. */
async function start() {
  const port = await freePort();
  await startOnce(port);
  const seconds = [];
  for (let again = 0; again < 3; again += 1) seconds.push(await startOnce(port));
  report('second-start', median(seconds), 's', 'most', 10);
}

/** Lives through whole seasons in two processes and compares who decides about the water; then lets two workers plan a night. */
async function seasons({ folder }) {
  const bundle = path.join(folder, 'seasonsBench.cjs');
  await mustRun('Bundling the seasons', process.execPath, [tool.esbuild, 'tests/bench/seasonsBench.ts', '--bundle', '--platform=node', '--target=node20', '--log-level=warning', `--outfile=${bundle}`]);
  const ask = async (what, args) => (await mustRun(what, process.execPath, ['--expose-gc', bundle, ...args])).stdout;
  const processes = [0, 1];
  const files = await Promise.all(processes.map(async (part) => {
    const file = path.join(folder, `seasons-${part}.json`);
    fs.writeFileSync(file, await ask('Replaying seasons', ['replay', String(part), String(processes.length), path.join(root, 'node_modules/vega-datasets/data')]));
    return file;
  }));
  const { text, figures, closingErrorMm, seasons: count } = JSON.parse(await ask('Summing up the seasons', ['report', writesSeasons ? root : '-', ...files]));
  for (const line of text.split('\n')) if (line.startsWith('|') || line.startsWith('**')) say(`    ${line}`);
  report('seasons-replayed', count, 'seasons', 'least', 1);
  report('seasons-closing-error', closingErrorMm, 'mm a day', 'most', 0.01);
  for (const { name, value, unit, bound, limit } of figures) report(name, value, unit, bound, limit);
  await night(ask);
}

/** Yards that two workers plan for a night, the clock time they take and the memory they use, for growing numbers of yards. */
async function night(ask) {
  const { planner, planMs } = JSON.parse(await ask('Timing one plan', ['pace']));
  const most = 10_000;
  const budgetMs = 75_000;
  // Ten thousand where that is a matter of a minute; a slower planner is measured on fewer and reckoned up.
  const top = Math.max(40, Math.min(most, Math.floor((2 * budgetMs) / planMs / 1.75 / 40) * 40));
  const sizes = [top / 4, top / 2, top].map((size) => Math.round(size));
  const nights = [];
  for (const yards of sizes) {
    const works = await Promise.all([0, 1].map(async (worker) => JSON.parse(await ask('Planning a night', ['night', String(worker * most), String(yards / 2)]))));
    if (works.some((work) => !(work.sets > work.yards))) throw new Sentence('The plans of the night are empty: their time says nothing.');
    const wallMs = Math.max(...works.map((work) => work.wallMs));
    nights.push({ yards, msPerYard: wallMs / yards, cpuPerYard: works.reduce((sum, work) => sum + work.cpuMs, 0) / yards, grownMb: Math.max(...works.map((work) => work.endHeapMb - work.earlyHeapMb)), peakRssMb: Math.max(...works.map((work) => work.peakRssMb)) });
    say(`    ${planner}: ${yards} yards in ${(wallMs / 1000).toFixed(1)} s, ${(wallMs / yards).toFixed(2)} ms a yard; memory at most ${nights.at(-1).peakRssMb.toFixed(0)} MB, grown by ${nights.at(-1).grownMb.toFixed(1)} MB`);
  }
  const [few, , many] = nights;
  report('night-10000-yards', (many.msPerYard * most) / 60_000, many.yards === most ? 'min' : `min, reckoned from ${many.yards}`, 'most', 240);
  report('night-time-per-yard-growth', many.cpuPerYard / few.cpuPerYard, 'ratio of processor time for four times the yards', 'most', 1.25);
  report('night-memory-growth', many.grownMb, 'MB from the first tenth to the end', 'most', 8);
}

const measurements = {
  javascript: { title: 'JavaScript of the first screen', run: javascript, needsServer: true },
  plan: { title: 'planning the reference yard', run: plan, needsServer: false },
  referee: { title: 'the planner before proven optima (some minutes)', run: refereeGap, needsServer: false },
  searches: { title: 'searches and forecasts', run: searches, needsServer: false },
  seasons: { title: 'whole seasons, and a night of 10,000 yards', run: seasons, needsServer: false },
  sums: { title: 'sums of the computation', run: sums, needsServer: false },
  api: { title: 'API under load, 64 connections', run: api, needsServer: true },
  lighthouse: { title: 'Lighthouse, three visits', run: lighthouse, needsServer: true },
  start: { title: 'second npm start', run: start, needsServer: false },
};

function chosenMeasurements(args) {
  const names = Object.keys(measurements);
  const chosen = args.filter((arg) => arg !== WRITE_SEASONS).flatMap((arg) => {
    const list = /^--only=(.+)$/.exec(arg)?.[1]?.split(',');
    if (!list?.every((name) => names.includes(name))) throw new Sentence(`"${arg}" is not known. Use: npm run bench -- --only=${names.join(',')} [${WRITE_SEASONS}]`);
    return list;
  });
  return chosen.length > 0 ? names.filter((name) => chosen.includes(name)) : names;
}

async function work() {
  // Standard output carries the figures alone.
  progressOnErrors();
  const chosen = chosenMeasurements(process.argv.slice(2));
  if (packagesAreMissing()) await step('installing packages (npm ci; a minute or more)', installPackages);
  const needed = ['postgres', 'chromium'];
  if (missingPrograms(needed).length > 0) await step('installing programs (apt-get)', () => installPrograms(needed));
  let place;
  if (chosen.some((name) => measurements[name].needsServer)) place = await demonstration();
  else {
    place = { folder: fs.mkdtempSync(path.join(os.tmpdir(), 'dapple-bench-')) };
    atTheEnd(() => fs.rmSync(place.folder, { recursive: true, force: true }));
  }
  for (const name of chosen) {
    try {
      await step(measurements[name].title, () => measurements[name].run(place));
    } catch (error) {
      if (!(error instanceof Sentence)) throw error;
      // One figure that cannot be had does not hide the others.
      say(`    ${error.message}`);
      report(name, NaN, 'not measured', 'most', 0);
    }
  }
  return allOk ? 0 : 1;
}

/** Measures everything, or what --only names. The exit code is 0 when every figure keeps its limit. */
export function benchDapple() {
  return runCommand(work, { onStop: () => say('\nStopping …') });
}
