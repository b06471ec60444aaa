// npm packages: installed exactly as the lock file says, and only when they are not.
import fs from 'node:fs';
import path from 'node:path';
import { root } from './paths.mjs';
import { mustRun, readJson } from './processes.mjs';

const lockFile = path.join(root, 'package-lock.json');
const installedFile = path.join(root, 'node_modules/.package-lock.json');

/** Whether what npm wrote at the end of its last install is what the lock file asks for. */
function isInstalledAsLocked() {
  const wanted = readJson(lockFile)?.packages;
  const installed = readJson(installedFile)?.packages;
  if (!wanted || !installed) return false;
  const same = (place) => wanted[place]?.version === installed[place]?.version && wanted[place]?.integrity === installed[place]?.integrity;
  if (!Object.keys(installed).every(same)) return false;
  // npm leaves out optional packages that are made for other systems.
  return Object.entries(wanted).every(([place, entry]) => place === '' || place in installed || entry.optional === true);
}

/** Whether `npm ci` has to run: nothing finished installing, or the lock file changed since. */
export function packagesAreMissing() {
  if (!fs.existsSync(installedFile)) return true;
  // A checkout renews the date of a file that did not change, so a newer lock file is compared before it counts.
  return fs.statSync(lockFile).mtimeMs > fs.statSync(installedFile).mtimeMs && !isInstalledAsLocked();
}

export async function installPackages() {
  const env = { ...process.env };
  // NODE_ENV=production would leave out what builds the screens.
  delete env.NODE_ENV;
  await mustRun('npm ci', 'npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--prefer-offline'], { env });
}
