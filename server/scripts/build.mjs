// The two products: the server bundle and the web build. Made again only when what they are made of has changed.
import crypto from 'node:crypto';
import fs from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { promisify } from 'node:util';
import zlib from 'node:zlib';
import { buildFolder, dataFolder, root, serverBundle, tool, webFolder } from './paths.mjs';
import { mustRun, ownName, isAlive, readJson, Sentence, whileLocked, writeWhole } from './processes.mjs';

const webInputs = ['app', 'components', 'scheduling', 'shared', 'assets', 'fonts', 'package-lock.json', 'app.json', 'metro.config.js', 'tsconfig.json', 'server/scripts/build.mjs'];
const serverInputs = ['server', 'scheduling', 'shared', 'package-lock.json', 'tsconfig.json'];

/** Changes whenever a file of the list changes, appears, moves or goes. By content: a checkout renews dates without changing anything. */
function fingerprint(inputs) {
  const isOutside = (place) => path.basename(place).startsWith('.') || (place === 'server/scripts' && inputs.includes('server'));
  const hash = crypto.createHash('sha256').update(process.version);
  const walk = (place) => {
    const full = path.join(root, place);
    const stat = fs.statSync(full, { throwIfNoEntry: false });
    if (!stat) return;
    if (stat.isDirectory()) {
      for (const name of fs.readdirSync(full).sort()) if (!isOutside(path.join(place, name))) walk(path.join(place, name));
    } else {
      hash.update(`\n${place}\n${stat.size}\n`).update(fs.readFileSync(full));
    }
  };
  inputs.forEach(walk);
  return hash.digest('hex');
}

const stampOf = (product) => path.join(buildFolder, `${product}.stamp`);
const isFresh = (product, result, inputs) => fs.existsSync(result) && readJson(stampOf(product))?.fingerprint === fingerprint(inputs);

/** Whether the web build has to be made. */
export const webIsStale = () => !isFresh('web', path.join(webFolder, 'index.html'), webInputs);
/** Whether the server bundle has to be made. */
export const serverIsStale = () => !isFresh('server', serverBundle, serverInputs);

/** Two commands of one clone (a start and a test) do not build at the same time; drafts of killed builds are removed. */
const building = (work, onWait) => whileLocked(path.join(dataFolder, 'build.lock'), async () => {
  fs.mkdirSync(buildFolder, { recursive: true });
  for (const name of fs.readdirSync(buildFolder)) {
    if (name.startsWith('draft-') && !isAlive(readJson(path.join(buildFolder, name, 'owner.json')))) fs.rmSync(path.join(buildFolder, name), { recursive: true, force: true });
  }
  const draft = path.join(buildFolder, `draft-${process.pid}`);
  fs.rmSync(draft, { recursive: true, force: true });
  fs.mkdirSync(draft);
  fs.writeFileSync(path.join(draft, 'owner.json'), JSON.stringify(ownName()));
  try { return await work(draft); } finally { fs.rmSync(draft, { recursive: true, force: true }); }
}, onWait);

/**
 * Bundles server/main.ts with everything of our own; npm packages stay outside, because sequelize finds pg only as a package.
 * @returns {Promise<boolean>} whether it had to be made
 */
export async function buildServer() {
  if (!serverIsStale()) return false;
  return building(async (draft) => {
    if (!serverIsStale()) return false;
    const made = fingerprint(serverInputs);
    if (!fs.existsSync(path.join(root, 'server/main.ts'))) throw new Sentence('server/main.ts is missing: this clone is not complete.');
    await mustRun('Bundling the server', process.execPath, [tool.esbuild, 'server/main.ts', '--bundle', '--platform=node', '--target=node20', '--packages=external',
      '--sourcemap', '--log-level=warning', `--outfile=${path.join(draft, 'server.cjs')}`]);
    // esbuild takes an alias that leads nowhere for a package and stays silent.
    const lost = new Set([...fs.readFileSync(path.join(draft, 'server.cjs'), 'utf8').matchAll(/\brequire\("(@\/[^"]+)"\)/g)].map(([, name]) => name));
    if (lost.size > 0) throw new Sentence(`The server imports files that are not there: ${[...lost].join(', ')}`);
    fs.rmSync(stampOf('server'), { force: true });
    fs.renameSync(path.join(draft, 'server.cjs.map'), `${serverBundle}.map`);
    fs.renameSync(path.join(draft, 'server.cjs'), serverBundle);
    writeWhole(stampOf('server'), JSON.stringify({ fingerprint: made }));
    return true;
  });
}

const worthCompressing = /\.(js|mjs|css|html|json|svg|txt|xml|webmanifest|map|ttf|ico)$/;
const brotli = promisify(zlib.brotliCompress);
const gzip = promisify(zlib.gzip);

/** Puts .br and .gz beside every text file: compressing at the highest quality is too slow to do for each answer. */
async function precompress(folder) {
  const files = fs.readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && worthCompressing.test(entry.name))
    .map((entry) => path.join(entry.parentPath ?? entry.path, entry.name));
  await Promise.all(files.map(async (file) => {
    const content = fs.readFileSync(file);
    if (content.length < 512) return;
    const [small, smaller] = await Promise.all([
      gzip(content, { level: 9 }),
      brotli(content, { params: { [zlib.constants.BROTLI_PARAM_QUALITY]: 11, [zlib.constants.BROTLI_PARAM_SIZE_HINT]: content.length } }),
    ]);
    fs.writeFileSync(`${file}.gz`, small);
    fs.writeFileSync(`${file}.br`, smaller);
  }));
}

/** Writes the route `/` as HTML, so that a visitor reads it and follows its links without waiting for any script. */
async function frontPage(draft) {
  const bundle = path.join(draft, 'frontPage.cjs');
  await mustRun('Bundling the front page', process.execPath, [tool.esbuild, 'app/index.tsx', '--bundle', '--platform=node', '--target=node20', '--jsx=automatic', '--log-level=error', '--external:react', '--external:react-dom',
    '--main-fields=browser,module,main', '--resolve-extensions=.web.tsx,.web.ts,.web.js,.tsx,.ts,.mjs,.js,.json', '--define:process.env.NODE_ENV="production"', '--define:__DEV__=false',
    '--alias:expo-router=./server/scripts/staticRouter.mjs', '--alias:react-native=react-native-web', `--outfile=${bundle}`]);
  const require = createRequire(import.meta.url);
  const { renderToStaticMarkup } = require('react-dom/server');
  const html = renderToStaticMarkup(require('react').createElement(require(bundle).default));
  if (!html.includes('<h1')) throw new Sentence('The front page came out without a headline.');
  return html;
}

/** Puts the front page into index.html, hands the list of scripts to boot.js, and makes one file of the style sheets: a phone on a slow line waits for each. */
async function finishPage(folder, draft) {
  const file = path.join(folder, 'index.html');
  let page = fs.readFileSync(file, 'utf8');
  const taken = (pattern) => {
    const found = [...page.matchAll(pattern)].map(([, address]) => address);
    if (found.length === 0) throw new Sentence(`index.html has nothing like ${pattern}: the export has changed its form.`);
    page = page.replaceAll(pattern, '');
    return found;
  };
  const scripts = taken(/<script src="([^"]+)" defer><\/script>/g);
  const styles = taken(/<link rel="stylesheet" href="([^"]+)">/g);
  taken(/<link rel="preload" href="([^"]+)" as="style">\s*/g);
  const css = styles.map((address) => fs.readFileSync(path.join(folder, address), 'utf8')).join('\n');
  for (const address of styles) fs.rmSync(path.join(folder, address));
  const style = `/_expo/static/css/app-${crypto.createHash('sha256').update(css).digest('hex').slice(0, 32)}.css`;
  fs.writeFileSync(path.join(folder, style), css);
  const put = (mark, text) => {
    if (page.split(mark).length !== 2) throw new Sentence(`index.html must have one ${mark}.`);
    page = page.replace(mark, () => text);
  };
  // boot.js first: a script behind a style sheet waits for it.
  put('<script src="/boot.js"></script>', `<script src="/boot.js" data-scripts='${JSON.stringify(scripts)}'></script>\n    <link rel="stylesheet" href="${style}">`);
  put('<!-- front page -->', await frontPage(draft));
  fs.writeFileSync(file, page);
}

/**
 * Exports the screens for the browser.
 * @param {() => void} [onWait] told when another command of this clone is building
 * @returns {Promise<boolean>} whether it had to be made
 */
export async function buildWeb(onWait) {
  if (!webIsStale()) return false;
  return building(async (draft) => {
    if (!webIsStale()) return false;
    const made = fingerprint(webInputs);
    const fresh = path.join(draft, 'web');
    const env = { ...process.env, EXPO_PUBLIC_FOLDER: 'assets/web', EXPO_NO_TELEMETRY: '1', CI: '1' };
    // NODE_ENV decides which bundle Metro makes; an inherited one (test runners set it) would make another.
    delete env.NODE_ENV;
    await mustRun('Building the screens', process.execPath, [tool.expo, 'export', '-p', 'web', '--output-dir', fresh], { env });
    if (!fs.existsSync(path.join(fresh, 'index.html'))) throw new Sentence('Building the screens gave no index.html.');
    await finishPage(fresh, draft);
    await precompress(fresh);
    // The stamp goes first and comes last, so that a kill in between leaves a build without one, which is made again.
    fs.rmSync(stampOf('web'), { force: true });
    if (fs.existsSync(webFolder)) fs.renameSync(webFolder, path.join(draft, 'before'));
    fs.renameSync(fresh, webFolder);
    writeWhole(stampOf('web'), JSON.stringify({ fingerprint: made }));
    return true;
  }, onWait);
}
