#!/usr/bin/env node
// What one test run needs and must not leave behind: a folder .data/test-<pid> with a throw-away cluster, and the servers it started.
// As a command, for Jest's setup files: node server/scripts/testFolder.mjs up|down --owner <pid>
import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { dataFolder } from './paths.mjs';
import { destroyCluster, startCluster } from './postgres.mjs';
import { endProcess, isAlive, ownName, readJson, Sentence, writeWhole } from './processes.mjs';

/** The database that is migrated once and copied for every test file. */
export const templateDatabase = 'dapple_template';

const folderOf = (pid) => path.join(dataFolder, `test-${pid}`);
const clusterIn = (folder) => path.join(folder, 'postgres');

async function remove(folder) {
  for (const server of readJson(path.join(folder, 'servers.json')) ?? []) await endProcess(server);
  await destroyCluster({ directory: clusterIn(folder) });
  fs.rmSync(folder, { recursive: true, force: true });
}

/** Removes what killed test runs of this clone left: their servers, clusters and folders. */
export async function sweepTestFolders() {
  if (!fs.existsSync(dataFolder)) return;
  for (const name of fs.readdirSync(dataFolder).filter((each) => /^test-\d+$/.test(each))) {
    const folder = path.join(dataFolder, name);
    if (!isAlive(readJson(path.join(folder, 'owner.json')))) await remove(folder);
  }
}

/**
 * Opens the folder of a test run and starts its cluster with an empty template database.
 * @param {number} owner pid of the process whose end makes the folder rubbish
 * @returns {Promise<{folder: string, url: string, urlOf: (database: string) => string, sql: (statement: string) => Promise<string>}>} `url` is the template's
 */
export async function openTestFolder(owner = process.pid) {
  await sweepTestFolders();
  const folder = folderOf(owner);
  fs.mkdirSync(folder, { recursive: true });
  writeWhole(path.join(folder, 'owner.json'), JSON.stringify(ownName(owner)));
  const { url, urlOf, sql } = await startCluster({ directory: clusterIn(folder), throwAway: true, database: templateDatabase });
  return { folder, url, urlOf, sql };
}

/** Notes a server of the run, so that a later sweep finds it when this run is killed. @param {string} folder @param {number} pid */
export function noteServer(folder, pid) {
  const file = path.join(folder, 'servers.json');
  writeWhole(file, JSON.stringify([...(readJson(file) ?? []), ownName(pid)]));
}

export const closeTestFolder = (owner = process.pid) => remove(folderOf(owner));

async function command([verb, flag, owner]) {
  if (flag !== '--owner' || !/^\d+$/.test(owner ?? '')) throw new Sentence('Say: up|down --owner <pid>');
  if (verb === 'up') console.log((await openTestFolder(Number(owner))).url);
  else if (verb === 'down') await closeTestFolder(Number(owner));
  else throw new Sentence('Say: up|down --owner <pid>');
}

if (process.argv[1] && fs.realpathSync(process.argv[1]) === fileURLToPath(import.meta.url)) {
  command(process.argv.slice(2)).catch((error) => {
    console.error(error instanceof Sentence ? error.message : error);
    process.exitCode = 1;
  });
}
