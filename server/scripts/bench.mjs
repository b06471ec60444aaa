// npm run bench: the figures that the project holds itself to, one JSON object a line.
import { checkNodeVersion } from './nodeVersion.mjs';

checkNodeVersion();
import('./benchDapple.mjs').then(({ benchDapple }) => benchDapple());
