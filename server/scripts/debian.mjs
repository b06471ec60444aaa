// Programs that come from the operating system: found, or installed when run by root, or asked for in one sentence.
import fs from 'node:fs';
import { mustRun, run, Sentence } from './processes.mjs';

export const isRoot = process.getuid?.() === 0;
export const chromium = '/usr/bin/chromium';

const serverFolder = '/usr/lib/postgresql';

/** Major versions of PostgreSQL whose server is installed, newest first. Debian puts initdb and postgres in no folder on the PATH. */
export function installedPostgres() {
  const versions = fs.existsSync(serverFolder) ? fs.readdirSync(serverFolder) : [];
  const found = versions
    .filter((version) => ['initdb', 'postgres', 'pg_ctl', 'psql'].every((name) => fs.existsSync(`${serverFolder}/${version}/bin/${name}`)))
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => ({ version, bin: `${serverFolder}/${version}/bin` }));
  if (found.length > 0) return found;
  const onPath = (process.env.PATH ?? '').split(':').find((folder) => ['initdb', 'postgres', 'pg_ctl', 'psql'].every((name) => fs.existsSync(`${folder}/${name}`)));
  return onPath ? [{ version: null, bin: onPath }] : [];
}

const programs = {
  postgres: { title: "PostgreSQL's server", packages: ['postgresql'], isThere: () => installedPostgres().length > 0 },
  // Chromium without a single font draws nothing where a page falls back to one.
  chromium: { title: 'Chromium', packages: ['chromium', 'fonts-liberation'], isThere: () => fs.existsSync(chromium) },
};

/** The programs of a list that are missing. @param {('postgres' | 'chromium')[]} names */
export const missingPrograms = (names) => names.filter((name) => !programs[name].isThere());

/**
 * Installs missing programs with Debian's apt-get.
 * @param {('postgres' | 'chromium')[]} names
 * @throws {Sentence} with the one command to run, when this is not root or not Debian
 */
export async function installPrograms(names) {
  const missing = missingPrograms(names);
  if (missing.length === 0) return;
  const titlesOf = (list) => `${list.map((name) => programs[name].title).join(' and ')} ${list.length > 1 ? 'are' : 'is'}`;
  const titles = titlesOf(missing);
  const packages = missing.flatMap((name) => programs[name].packages);
  const command = `apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  if (!fs.existsSync('/usr/bin/apt-get')) throw new Sentence(`${titles} missing, and this system has no apt-get. Install it with the system's own package manager, then run the same command again.`);
  if (!isRoot) throw new Sentence(`${titles} missing. Run this one command, then the same command again:\n\n  sudo ${command}\n`);
  if (missing.includes('postgres') && !fs.existsSync('/etc/postgresql-common/createcluster.conf')) {
    // Otherwise Debian would make and start a cluster of its own on 5432.
    fs.mkdirSync('/etc/postgresql-common/createcluster.d', { recursive: true });
    fs.writeFileSync('/etc/postgresql-common/createcluster.d/no-main.conf', 'create_main_cluster = false\n');
  }
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  // A failed update is no failure yet: the lists may be good enough.
  await run('apt-get', ['update', '-q'], { env });
  // Sheltered: a package manager cut in half leaves the system broken.
  await mustRun(command, 'apt-get', command.split(' ').slice(1), { env, sheltered: true });
  const still = missingPrograms(missing);
  if (still.length > 0) throw new Sentence(`${titlesOf(still)} still missing after ${command}.`);
}
