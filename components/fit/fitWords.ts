import type { FitHelp } from '@/scheduling/sprinkler/fitHelp';
import type { FitAnswer } from '@/scheduling/sprinkler/hoseHours';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatArea, formatDepth, formatFlow, formatNumber } from '@/shared/display';
import { hoseBoreLabel } from '@/shared/hoseBores';
import { capital } from '@/shared/roundWords';
import type { FitQuestionAsked } from './fitDraft';

/** Hours with one decimal, a lone '.0' left out: '10.4', '6'. */
export function hoursText(hours: number): string {
  return formatNumber(hours, 1).replace(/\.0$/, '');
}

const hoursWord = (hours: number): string => `${hoursText(hours)} hour${hoursText(hours) === '1' ? '' : 's'}`;

/** The answer in words: 'It does not fit: 10.4 hours needed, 6 had.' */
export function fitHeadline(answer: FitAnswer): string {
  return `${answer.fits ? 'It fits' : 'It does not fit'}: ${hoursWord(answer.neededHours)} needed, ${hoursText(answer.hadHours)} had.`;
}

/** What the hours are made of, or what they allow. */
export function fitDetail(answer: FitAnswer, units: UnitSystem): string {
  const parts = answer.moveHours > 0 ? `${hoursWord(answer.waterHours)} of water and ${hoursText(answer.moveHours)} of moves. ` : '';
  if (answer.fits) {
    return `${parts}${hoursWord(answer.hadHours - answer.neededHours)} to spare: the hours carry up to ${formatDepth(answer.affordableDepthMm, units)} a week here.`;
  }
  if (answer.hadHours <= answer.moveHours) {
    return `${parts}The moves alone take all the hours there are.`;
  }
  return `${parts}The hours you have carry ${formatDepth(answer.affordableDepthMm, units)} a week here.`;
}

/** One way to make it fit: what to do, and what it comes to. */
export function helpWords(help: FitHelp, asked: FitQuestionAsked, units: UnitSystem): { title: string; text: string } {
  const gain = `saves ${hoursWord(help.gainHours)}`;
  const now = `${hoursWord(help.neededHours)} needed`;
  const enough = help.fits ? 'It fits then.' : 'Not enough by itself.';
  const { request, hose } = asked;
  switch (help.kind) {
    case 'fatter_hose':
      return {
        title: `A fatter hose: ${hoseBoreLabel(help.boreMm, units)} instead of ${hoseBoreLabel(hose.boreMm, units)}`,
        text: `Gives ${formatFlow(help.flowLpm, units)} instead of ${formatFlow(request.flowLpm, units)}: ${now}, ${gain}. ${enough} Reckoned for 50 psi (345 kPa) at the tap, a default.`,
      };
    case 'second_tap':
      return { title: 'A second tap at the same time', text: `At best ${now}, ${gain}. ${enough} The house pipe often gives less: time a bucket with both taps open.` };
    case 'less_area':
      return { title: `Less area: ${formatArea(help.areaM2, units)} instead of ${formatArea(request.areaM2, units)}`, text: `${capital(gain)}. ${enough} Deep shade and beds under trees are the first to leave out.` };
    case 'less_depth':
      return { title: `Less depth: ${formatDepth(help.depthMmPerWeek, units)} a week instead of ${formatDepth(request.depthMmPerWeek, units)}`, text: `${capital(gain)}. ${enough} Rain counts toward the depth; in spring and autumn less is needed anyway.` };
    case 'resting_part':
      return {
        title: `Let ${formatArea(help.areaM2, units)} rest (${formatNumber(help.share * 100, 0)} %)`,
        text: `${capital(gain)}. ${enough} A resting part goes brown and lives on ${formatDepth(12.7, units)} every two weeks. Not for grass sown within the last year.`,
      };
  }
}

