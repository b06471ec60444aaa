import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { planMs, planNight } from './seasonNight';
import { seasonsPicture } from './seasonPicture';
import { seasonPlanner } from './seasonPlanner';
import { replayPart, type SeasonRow } from './seasonRows';
import { seasonFigures, yardResults } from './seasonResults';
import { seasonsText, withSeasons } from './seasonText';

const PICTURE = 'assets/pictures/seasons.svg';

/**
 * The program behind the bench's `seasons`, one JSON object on standard output:
 *   replay <part> <parts> <data folder>      seasons of one of several processes
 *   night <first variant> <yards>            a worker's night
 *   pace                                     time of one plan
 *   report <folder of the clone or -> <file> …  figures of the rows in the files; with a folder the README's section and picture are written there
 */
function main([mode, ...args]: string[]): unknown {
  switch (mode) {
    case 'replay': return replayPart(Number(args[0]), Number(args[1]), args[2]);
    case 'night': return planNight(Number(args[0]), Number(args[1]));
    case 'pace': return { planner: seasonPlanner.name, planMs: planMs() };
    case 'report': {
      const [root = '-', ...files] = args;
      const rows = files.flatMap((file) => JSON.parse(readFileSync(file, 'utf8')) as SeasonRow[]);
      const results = yardResults(rows);
      const text = seasonsText(results, PICTURE);
      if (root !== '-') {
        const readme = path.join(root, 'README.md');
        writeFileSync(readme, withSeasons(readFileSync(readme, 'utf8'), text));
        writeFileSync(path.join(root, PICTURE), seasonsPicture(results));
      }
      return { text, figures: seasonFigures(results), closingErrorMm: Math.max(...rows.map((row) => row.closingErrorMm)), seasons: rows.length };
    }
    default: throw new Error(`"${mode ?? ''}" is not known.`);
  }
}

console.log(JSON.stringify(main(process.argv.slice(2))));
