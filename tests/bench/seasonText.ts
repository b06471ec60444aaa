import type { MeanSeason, YardResult } from './seasonResults';

const whole = (value: number): string => String(Math.round(value));
const one = (value: number): string => (value > 0 && value < 0.05 ? 'under 0.1' : value.toFixed(1));

function row(label: string, mean: MeanSeason, dapple: MeanSeason): string {
  const ratio = mean === dapple ? '1' : (mean.waterM3 / dapple.waterM3).toFixed(2);
  return `| ${label} | ${whole(mean.waterM3)} | ${ratio} | ${one(mean.stressDays)} | ${whole(mean.drainageMm)} | ${whole(mean.runoffMm)} | ${whole(mean.outings)} | ${whole(mean.moves)} |`;
}

function sentenceOf({ yard, dapple }: YardResult): string {
  if (yard.fits) return '';
  const byPriority = Object.entries(dapple.stressDaysByPriority).sort(([a], [b]) => Number(a) - Number(b));
  const kept = (100 * dapple.dosesKept) / dapple.dosesWanted;
  return `\nWhat cannot be watered falls where the owner put it: ${byPriority.map(([priority, days]) => `priority ${priority} has ${one(days)} stress days`).join(', ')}; the new seed gets ${whole(kept)} % of its doses.\n`;
}

/** The README's section on the seasons, without its markers. */
export function seasonsText(results: readonly YardResult[], picture: string): string {
  const seasons = results[0]?.seasons ?? 0;
  const tables = results.map((result) => {
    const { yard, dapple, clairvoyant, thumbs } = result;
    return [
      `**${yard.title}.** ${yard.text}.`,
      '',
      '| who decides | water [m³] | over Dapple | stress [days] | drained [mm] | ran off [mm] | outings | moves |',
      '|---|---|---|---|---|---|---|---|',
      row('Dapple', dapple, dapple),
      row('knows the weather to come', clairvoyant, dapple),
      row('an inch a week less rain', thumbs.inch.mean, dapple),
      row('three times a week, 20 minutes', thumbs.fixed.mean, dapple),
      sentenceOf(result),
    ].join('\n');
  });
  return [
    `Eight seasons were lived through day by day (Seattle and New York, April to October 2012 to ${2011 + seasons / 2}, daily records of \`vega-datasets\`), on three yards. Every morning Dapple is told`,
    'yesterday\'s weather and a forecast that is wrong by more the further ahead it looks, plans ten days and does the first. The ground keeps its own balance: full FAO-56 with stress,',
    'drainage, and runoff by intake. Stress is the sum of 1 − Ks over the days, weighted by area; all figures are means of a season. Who knows the weather to come is the best of three: Dapple\'s planner',
    'told the truth, and two that water every patch on the last day it can wait with the least that carries it on; where the hours do not do, it is Dapple\'s planner alone.',
    '',
    `![Water against stress on three yards: Dapple lies below the curves of both rules of thumb](${picture})`,
    '',
    'The curves are the two rules of thumb, scaled from half to one and a half (dotted: to four times); the ring is the one who knows the weather.',
    '',
    ...tables,
    'Numbers of `npm run bench -- --only=seasons`; with `--write-seasons` it writes this section and the picture.',
  ].join('\n');
}

const BEGIN = '<!-- seasons: begin -->';
const END = '<!-- seasons: end -->';

/** Puts a text between the README's two markers. @throws Error when the markers are missing */
export function withSeasons(readme: string, text: string): string {
  const from = readme.indexOf(BEGIN);
  const to = readme.indexOf(END);
  if (from < 0 || to < from) throw new Error(`README.md lacks the markers ${BEGIN} and ${END}.`);
  return `${readme.slice(0, from + BEGIN.length)}\n${text}\n${readme.slice(to)}`;
}
