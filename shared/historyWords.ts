import type { HistoryResponse, YardResponse } from '@/shared/contracts/yards';
import { isCivilDay } from '@/scheduling/units/civilDay';
import { formatCivilDay, formatDepth, formatFlow, formatNumber, formatRate } from '@/shared/display';
import { capital, counted } from '@/shared/roundWords';
import { skipWords } from '@/shared/skipWords';

type Entry = HistoryResponse['entries'][number];
type Data = Entry['data'];

function text(value: unknown): string | null {
  return typeof value === 'string' && value !== '' ? value : null;
}

function number(value: unknown): number | null {
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

const named = (data: Data, or: string): string => text(data['name']) ?? or;
const quoted = (value: unknown): string => (text(value) === null ? '' : `: “${String(value)}”`);
const day = (data: Data): string => {
  const on = text(data['on']);
  return on !== null && isCivilDay(on) ? ` on ${formatCivilDay(on, 'short')}` : '';
};
const cause = (data: Data): string => {
  const word = text(data['cause']);
  return word !== null && word in skipWords ? `: ${skipWords[word as keyof typeof skipWords].toLowerCase()}` : '';
};
const role = (data: Data, field = 'role'): string => (text(data[field]) === null ? '' : ` as ${String(data[field])}`);

/** 'areaM2' as 'area', 'sunHours' as 'sun hours': the fields of a change in words, without the unit. */
function changedFields(data: Data): string {
  const { changes } = data;
  if (typeof changes !== 'object' || changes === null) {
    return '';
  }
  const words = Object.keys(changes).map((field) => field.replace(/(M2|Mm|M|L|Lpm|Pct|Deg|Kpa|MmPerHour|Minutes|Id|Ids|On)$/, '').replace(/([A-Z])/g, ' $1').trim().toLowerCase());
  return words.length === 0 ? '' : `: ${[...new Set(words)].join(', ')}`;
}

const feelSaid: Record<string, string> = { easy: 'screwdriver went in easily', firm: 'screwdriver went in hard', hard: 'screwdriver hardly went in' };
const stageSaid: Record<string, string> = { sown: 'bare still', coming_up: 'coming up', rooting: 'rooting', taper: 'ready for the taper', established: 'established' };

/** One sentence for each thing that the server writes down. Who did it and when stands below the sentence. */
const sentences: Record<string, (data: Data, yard: YardResponse) => string> = {
  'yard.created': (data) => `Yard ${named(data, '')} set up`,
  'yard.updated': (data) => `Settings of the yard changed${changedFields(data)}`,
  'hours.changed': () => 'Hours at home changed',
  'wishes.changed': (data) => `What counts most in the plan changed${changedFields(data)}`,
  'day.changed': (data) => `Said of the plan: ${data['dayOff'] === true ? `nobody waters${day(data)}` : Array.isArray(data['extraWindows']) && data['extraWindows'].length > 0 ? `somebody is there for longer${day(data)}` : `an ordinary day${day(data)}`}`,
  'set.locked': (data) => `Set at ${named(data, 'a position')}${day(data)} fixed${quoted(data['reason'])}`,
  'set.unlocked': (data) => `Fixed set at ${named(data, 'a position')}${day(data)} let go`,
  'positions.ordered': () => 'Order of the positions changed',
  'round.started': (data) => `Round started${number(data['sets']) === null ? '' : `: ${counted(number(data['sets']) ?? 0, 'set')}`}`,
  'round.moved': () => 'Hose moved to the next position',
  'round.minutes_added': (data) => `${formatNumber(number(data['minutes']) ?? 10, 0)} more minutes given to a set`,
  'round.cut_short': () => 'Set ended early',
  'round.set_skipped': (data) => `Set skipped${cause(data)}`,
  'round.skipped': (data) => `Round${day(data)} skipped${cause(data)}`,
  'round.ended': () => 'Water off, round ended',
  'member.joined': (data) => `${named(data, 'Somebody')} joined${role(data)}`,
  'member.left': (data) => `${named(data, 'Somebody')} left${data['accountDeleted'] === true ? ' and deleted the account' : ''}`,
  'member.removed': (data) => `${named(data, 'Somebody')} taken out of the yard`,
  'member.role_changed': (data) => `${named(data, 'Somebody')} now takes part${role(data, 'after')}`,
  'invitation.sent': (data) => `Invitation sent${role(data)}`,
  'invitation.withdrawn': () => 'Invitation withdrawn',
  'invitation.declined': () => 'Invitation declined',
  'proposal.sent': (data) => `Proposal for ${named(data, 'seeded ground')} sent${quoted(data['reason'])}`,
  'proposal.accepted': (data) => `Proposal for ${named(data, 'seeded ground')} accepted${quoted(data['answer'])}`,
  'proposal.declined': (data) => `Proposal for ${named(data, 'seeded ground')} declined${quoted(data['answer'])}`,
  'proposal.withdrawn': (data) => `Proposal for ${named(data, 'seeded ground')} withdrawn`,
  'rain.recorded': (data, yard) => `Rain gauge${day(data)}: ${formatDepth(number(data['depthMm']) ?? Number.NaN, yard.units)}`,
  'rain.deleted': (data) => `Rain gauge${day(data)}: entry taken out`,
  'observation.recorded': (data) => `Soil check in ${named(data, 'a zone')}${day(data)}: ${data['kind'] === 'probe' ? `probe read ${formatNumber((number(data['waterContent']) ?? 0) * 100, 0)} %` : feelSaid[text(data['feel']) ?? ''] ?? 'screwdriver'}`,
  'observation.deleted': (data) => `Soil check in ${named(data, 'a zone')}${day(data)} taken out`,
  'seen_stage.recorded': (data) => `${named(data, 'Seeded ground')}${day(data)} seen ${stageSaid[text(data['stage']) ?? ''] ?? 'changed'}`,
  'seen_stage.deleted': (data) => `${named(data, 'Seeded ground')}${day(data)}: what was seen taken out`,
  'sun_diary.recorded': (data) => `Sun diary of ${named(data, 'a zone')}${day(data)}: ${counted(number(data['hours']) ?? 0, 'hour')} of sun`,
  'sun_diary.deleted': (data) => `Sun diary of ${named(data, 'a zone')}${day(data)} taken out`,
  'bucket_test.recorded': (data, yard) => `Bucket test at ${text(data['tapName']) ?? 'a tap'}: ${formatFlow(number(data['flowLpm']) ?? Number.NaN, yard.units)}`,
  'bucket_test.deleted': (data) => `Bucket test at ${text(data['tapName']) ?? 'a tap'} taken out`,
  'catch_test.recorded': (data, yard) => `Catch-cup test at ${text(data['positionName']) ?? 'a position'}: ${formatRate(number(data['rateMmPerHour']) ?? Number.NaN, yard.units)}${number(data['lowQuarterUniformity']) === null ? '' : `, low-quarter uniformity ${formatNumber(number(data['lowQuarterUniformity']) ?? 0, 2)}`}`,
  'catch_test.deleted': (data) => `Catch-cup test at ${text(data['positionName']) ?? 'a position'} taken out`,
};

/** What happens to a fact of the yard, whatever fact it is. */
const factVerbs: Record<string, string> = { created: 'added', updated: 'changed', archived: 'taken out', deleted: 'taken out' };

/** One line of the history in words: 'Zone South lawn changed: area', 'Water off, round ended'. */
export function historySentence(entry: Entry, yard: YardResponse): string {
  const sentence = sentences[entry.verb];
  if (sentence) {
    return sentence(entry.data, yard);
  }
  const [noun = 'something', verb = 'changed'] = entry.verb.split('.');
  const name = text(entry.data['name']) ?? yard.zones.find((zone) => zone.id === entry.subjectId)?.name ?? yard.positions.find((position) => position.id === entry.subjectId)?.name;
  return `${capital(noun.replaceAll('_', ' '))}${name === undefined ? '' : ` ${name}`} ${factVerbs[verb] ?? verb.replaceAll('_', ' ')}${changedFields(entry.data)}`;
}
