// Where things lie in a clone. Everything that is made, and could be made again, is under .data/.
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', '..');
export const dataFolder = path.join(root, '.data');
export const buildFolder = path.join(dataFolder, 'build');
export const webFolder = path.join(buildFolder, 'web');
export const serverBundle = path.join(buildFolder, 'server.cjs');

/** The JavaScript file behind a package's command, to be run by this same Node (no npx, no shell). */
export const tool = {
  expo: path.join(root, 'node_modules/expo/bin/cli'),
  esbuild: path.join(root, 'node_modules/esbuild/bin/esbuild'),
  eslint: path.join(root, 'node_modules/eslint/bin/eslint.js'),
  tsc: path.join(root, 'node_modules/typescript/bin/tsc'),
  jest: path.join(root, 'node_modules/jest/bin/jest.js'),
  playwright: path.join(root, 'node_modules/@playwright/test/cli.js'),
  lighthouse: path.join(root, 'node_modules/lighthouse/cli/index.js'),
};
