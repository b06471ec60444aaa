// npm test: everything that can be proved, on a throw-away database, ending with one line of counts.
import { checkNodeVersion } from './nodeVersion.mjs';

checkNodeVersion();
import('./testDapple.mjs').then(({ testDapple }) => testDapple());
