// npm start: from a fresh clone to a running Dapple. Only Node's own modules until the packages are there.
import { checkNodeVersion } from './nodeVersion.mjs';

checkNodeVersion();
import('./startDapple.mjs').then(({ startDapple }) => startDapple());
