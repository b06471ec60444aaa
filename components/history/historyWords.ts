import type { HistoryResponse, YardResponse } from '@/shared/contracts/yards';
import { isCivilDay } from '@/scheduling/units/civilDay';
import { formatCivilDay, formatDepth, formatFlow, formatMinutes, formatRate } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { skipWords } from '@/shared/skipWords';

type Entry = HistoryResponse['entries'][number];

const verbs: Record<string, string> = {
  created: 'added', updated: 'changed', archived: 'removed', deleted: 'removed', removed: 'removed', recorded: 'written down', set: 'set', invited: 'invited', accepted: 'accepted',
  declined: 'declined', withdrawn: 'withdrawn', started: 'started', ended: 'ended', moved: 'moved', skipped: 'skipped', joined: 'joined', left: 'left', made: 'made', written: 'written',
  sent: 'sent', cut_short: 'cut short', minutes_added: 'given more minutes', changed: 'changed', role_changed: 'given another part',
};

function text(value: unknown): string | null {
  return typeof value === 'string' && value !== '' ? value : null;
}

function number(value: unknown): number | null {
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

/** The few numbers of an event that a reader wants to see, in the yard's units. */
function details(data: Entry['data'], yard: YardResponse): string[] {
  const found: string[] = [];
  const depth = number(data['appliedMm']) ?? number(data['depthMm']);
  const minutes = number(data['minutesRun']) ?? number(data['minutes']) ?? number(data['addedMinutes']);
  const flow = number(data['flowLpm']);
  const rate = number(data['rateMmPerHour']);
  const cause = text(data['cause']);
  const on = text(data['on']);
  const reason = text(data['reason']) ?? text(data['answer']);
  if (depth !== null) found.push(formatDepth(depth, yard.units));
  if (minutes !== null) found.push(formatMinutes(minutes));
  if (flow !== null) found.push(formatFlow(flow, yard.units));
  if (rate !== null) found.push(formatRate(rate, yard.units));
  if (on !== null && isCivilDay(on)) found.push(formatCivilDay(on, 'short'));
  if (cause !== null && cause in skipWords) found.push(skipWords[cause as keyof typeof skipWords].toLowerCase());
  if (reason !== null) found.push(`“${reason}”`);
  return found;
}

/** One line of the history in words: 'Zone South lawn changed', 'Round started: Sat 13 Jun'. */
export function historySentence(entry: Entry, yard: YardResponse): string {
  const [noun = 'something', verb = 'changed'] = entry.verb.split('.');
  const thing = noun.replaceAll('_', ' ');
  const named = text(entry.data['name'])
    ?? yard.zones.find((zone) => zone.id === entry.subjectId)?.name
    ?? yard.positions.find((position) => position.id === entry.subjectId)?.name
    ?? text(entry.data['email']);
  const shown = details(entry.data, yard);
  return `${capital(thing)}${named ? ` ${named}` : ''} ${verbs[verb] ?? verb.replaceAll('_', ' ')}${shown.length > 0 ? `: ${shown.join(', ')}` : ''}`;
}
