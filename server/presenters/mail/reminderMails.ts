import type { MailContent } from './layout';
import { mailLayout } from './layout';
import type { Reason } from '@/scheduling/planning/types';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatClock, formatDepth, formatMinutes, formatTemperature } from '@/shared/display';
import { reasonText } from '@/shared/reasons';
import { capital, counted, roundHeadline } from '@/shared/roundWords';

interface Mail {
  subject: string;
  text: string;
  html: string;
}

interface ReminderFacts {
  yardName: string;
  units: UnitSystem;
  url: string;
  /** Minutes after its time, when that is worth telling [min]; null when it is on time. */
  lateMinutes: number | null;
}

export interface MorningFacts extends ReminderFacts {
  /** Civil day of the yard. */
  on: string;
  sets: { startMinutes: number; minutes: number; depthMm: number; kind: 'set' | 'dose'; positionName: string; mark: string; zoneName: string; reasons: Reason[] }[];
  moves: number;
  /** End of the last set, minutes after local midnight [min]. */
  endMinutes: number;
  notWatered: { zoneName: string; reasons: Reason[] }[];
  weather: { tminC: number; tmaxC: number; rainMm: number | null; sample: boolean } | null;
  /** Minutes after local midnight; null where the sun does not rise or set. */
  sunriseMinutes: number | null;
}

/** From here on the water that stands in a hose in the sun can scald [°C]. Common practice: let it run out first on hot days. */
const HOT_DAY_C = 30;

/** The morning's mail: what to do today, where, for how long and why, what is left alone, and the way to the round. */
export function morningMail(facts: MorningFacts): Mail {
  const { units, on } = facts;
  const headline = headlineOf(facts);
  const first = facts.sets[0];
  const because = (reasons: Reason[]) => reasons.map((reason) => reasonText(reason, units, on));
  const caution = cautionFor(facts);
  return {
    subject: withLate(facts, `${facts.yardName}: ${workOf(facts).join(' and ')} from ${formatClock(first?.startMinutes ?? 0, units)}`),
    ...mailLayout({
      title: headline,
      paragraphs: [...lateParagraph(facts), ...weatherParagraph(facts)],
      items: [
        ...facts.sets.map((set) => ({
          heading: `${formatClock(set.startMinutes, units)}  ${set.positionName}${set.mark === '' ? '' : ` (${set.mark})`}`,
          lines: [`${formatMinutes(set.minutes)}, ${formatDepth(set.depthMm, units)} for ${set.zoneName}`, ...because(set.reasons)],
        })),
        ...(facts.notWatered.length === 0 ? [] : [{
          heading: 'Not watered today',
          lines: facts.notWatered.map((zone) => [`${zone.zoneName}:`, ...because(zone.reasons)].join(' ')),
        }]),
      ],
      action: { label: 'Open today’s round', url: facts.url },
      notes: [...(caution === null ? [] : [caution]), whyYou(facts)],
    }),
  };
}

const wordFor = ({ sets }: MorningFacts): 'set' | 'dose' => (sets.every((set) => set.kind === 'dose') ? 'dose' : 'set');

/** 'two sets', 'three doses': what there is to do. */
function workOf({ sets }: MorningFacts): string[] {
  const doses = sets.filter((set) => set.kind === 'dose').length;
  const others = sets.length - doses;
  return [...(others > 0 ? [counted(others, 'set')] : []), ...(doses > 0 ? [counted(doses, 'dose')] : [])];
}

function headlineOf(facts: MorningFacts): string {
  const work = workOf(facts);
  if (work.length === 1) {
    return roundHeadline(facts.sets.length, facts.moves, facts.endMinutes, facts.units, wordFor(facts));
  }
  const what = [...work, ...(facts.moves > 0 ? [counted(facts.moves, 'move')] : [])].join(', ');
  return `${capital(what)}. Done by ${formatClock(facts.endMinutes, facts.units)}.`;
}

function weatherParagraph({ weather, units }: MorningFacts): string[] {
  if (weather === null) {
    return [];
  }
  const rain = weather.rainMm === null ? '' : weather.rainMm < 0.1 ? ', no rain expected' : `, ${formatDepth(weather.rainMm, units)} of rain expected`;
  return [`Today ${formatTemperature(weather.tminC, units)} to ${formatTemperature(weather.tmaxC, units)}${rain}${weather.sample ? ' (sample weather)' : ''}.`];
}

function cautionFor(facts: MorningFacts): string | null {
  const first = facts.sets[0]?.startMinutes ?? 0;
  if (facts.sunriseMinutes !== null && first < facts.sunriseMinutes) {
    return `It is dark until ${formatClock(facts.sunriseMinutes, facts.units)}: lay the hose where nobody trips over it.`;
  }
  const last = facts.sets[facts.sets.length - 1]?.startMinutes ?? 0;
  if (facts.weather !== null && facts.weather.tmaxC >= HOT_DAY_C && last >= 11 * 60) {
    return 'Water that stood in the hose in the sun can scald: let it run out onto bare ground first, away from children and pets.';
  }
  return null;
}

export interface RoundReminderFacts extends ReminderFacts {
  positionName: string;
  zoneName: string;
  minutes: number;
  /** When the set's time was over, minutes after local midnight [min]. */
  endedMinutes: number;
}

/** At the end of a set that another one follows. */
export function moveMail(facts: RoundReminderFacts & { next: { positionName: string; mark: string; minutes: number } }): Mail {
  const { next } = facts;
  return shortMail(facts, `Move the hose to ${next.positionName}`, [
    `${facts.positionName} on ${facts.zoneName} has had its ${formatMinutes(facts.minutes)}. Move the hose to ${next.positionName}${next.mark === '' ? '' : ` (${next.mark})`}, then say so in the round: its ${formatMinutes(next.minutes)} start there.`,
  ], 'Say that it is moved');
}

/** At the end of a tap's last set. */
export function waterOffMail(facts: RoundReminderFacts): Mail {
  return shortMail(facts, 'Turn the water off', [
    `${facts.positionName} on ${facts.zoneName} has had its ${formatMinutes(facts.minutes)}, and it is the last set of its tap. Turn the water off, then say so in the round.`,
  ], 'Say that the water is off');
}

/** Some time after the end of a set, when nobody said what became of the water. */
export function stillOnMail(facts: RoundReminderFacts): Mail {
  return shortMail(facts, 'Is the water still on?', [
    `${facts.positionName} on ${facts.zoneName} was over at ${formatClock(facts.endedMinutes, facts.units)}, and nobody has said since that the hose was moved or the water is off.`,
    'A hose that runs on floods the ground and the bill. Look after the tap, or ask somebody who is there.',
  ], 'Open the round');
}

function shortMail(facts: ReminderFacts, title: string, paragraphs: string[], label: string): Mail {
  const content: MailContent = { title, paragraphs: [...lateParagraph(facts), ...paragraphs], action: { label, url: facts.url }, notes: [whyYou(facts)] };
  return { subject: withLate(facts, `${facts.yardName}: ${title.charAt(0).toLowerCase()}${title.slice(1)}`), ...mailLayout(content) };
}

const withLate = ({ lateMinutes }: ReminderFacts, subject: string): string => (lateMinutes === null ? subject : `Late: ${subject}`);

function lateParagraph({ lateMinutes }: ReminderFacts): string[] {
  return lateMinutes === null ? [] : [`This reminder is ${formatMinutes(lateMinutes)} late: it could not be sent at its time.`];
}

const whyYou = ({ yardName }: ReminderFacts): string => `You get this because you take part in ${yardName} and its reminders are on. You can turn them off under People in the yard.`;
