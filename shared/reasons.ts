import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import type { Reason } from '@/scheduling/planning/types';
import { dayWord, formatArea, formatClock, formatDepth, formatFlow, formatLength, formatMinutes, formatNumber, formatRate, formatSpeed, formatTemperature, formatVolume, type DisplayUnits } from './display';

/** Names of the stages of a sowing, for headings and fields. */
export const stageNames: Record<EstablishmentStage, string> = { sown: 'Sown', coming_up: 'Coming up', rooting: 'Rooting', taper: 'Taper', established: 'Established' };

/** The stages within a sentence. */
export const stageWords: Record<EstablishmentStage, string> = {
  sown: 'not up yet', coming_up: 'coming up', rooting: 'rooting', taper: 'tapering', established: 'established',
};

/** What stands in the way of a fixed set. */
const lockObstacles: Record<string, string> = {
  position: 'its position cannot be used', past: 'its time is past', closed: 'a rule, a hold or the weather closes that time', home: 'nobody is at home then',
  taken: 'the hose or the person is busy then', volume: 'no water is left for it',
};

function stageWord(stage: string): string {
  return stage in stageWords ? stageWords[stage as EstablishmentStage] : stage;
}

/**
 * One plain sentence for a reason of a plan, in the yard's units.
 * @param todayOn - the reader's civil day, for 'today' and 'tomorrow'; left out, days are written in full
 */
export function reasonText(reason: Reason, units: DisplayUnits, todayOn: string | null = null): string {
  const { values } = reason;
  const number = (name: string): number => {
    const value = values[name];
    return typeof value === 'number' ? value : Number.NaN;
  };
  const text = (name: string): string => String(values[name] ?? '');
  const has = (name: string): boolean => values[name] !== undefined && values[name] !== '';
  const depth = (name: string): string => formatDepth(number(name), units);
  const minutes = (name: string): string => formatMinutes(number(name));
  const clock = (name: string): string => formatClock(number(name), units);
  const rate = (name: string): string => formatRate(number(name), units);
  const day = (name: string): string => dayWord(text(name), todayOn);
  const onDay = (name: string): string => (/^(today|tomorrow|yesterday)$/.test(day(name)) ? day(name) : `on ${day(name)}`);
  const chance = (): string => (has('probabilityPct') ? ` (${formatNumber(number('probabilityPct'), 0)} %)` : '');
  const source = (): string => (has('source') ? ` (${text('source')})` : '');

  switch (reason.code) {
    case 'due':
      return has('crossesOn')
        ? `${depth('depletionMm')} short, reaches its refill line of ${depth('refillLineMm')} ${onDay('crossesOn')}.`
        : `${depth('depletionMm')} short, and its refill line of ${depth('refillLineMm')} comes before the next chance to water.`;
    case 'past_line':
      return `${depth('depletionMm')} short, past its refill line of ${depth('refillLineMm')}.`;
    case 'brought_forward':
      return `${depth('depletionMm')} short and could wait, but until ${day('untilOn')} ${minutes('neededMinutes')} are needed and ${minutes('hadMinutes')} are there.`;
    case 'no_rain_before':
      return has('rainOn') ? `No rain to count on before ${day('rainOn')}.` : `No rain to count on through ${day('lastOn')}.`;
    case 'room_for_rain':
      return `Leaves room for ${depth('roomMm')} of the rain expected ${onDay('rainOn')}.`;
    case 'cut_by_time':
      return `${depth('givenMm')} of the ${depth('wantedMm')} wanted: ${minutes('givenMinutes')} of ${minutes('wantedMinutes')} fit.`;
    case 'cut_by_intake':
      return `The sprinkler gives ${rate('rateMmPerHour')} and the soil takes ${rate('intakeMmPerHour')}: ${minutes('minutes')} at a time${has('soakMinutes') ? `, then ${minutes('soakMinutes')} to soak` : ''}.`;
    case 'second_cycle':
      return `Cycle ${formatNumber(number('number'), 0)}, after at least ${minutes('soakMinutes')} of soaking.`;
    case 'uneven': {
      const uniformity = has('lowQuarterUniformity') ? ` (low-quarter uniformity ${formatNumber(number('lowQuarterUniformity'), 2)})` : '';
      return `Runs ${formatNumber((number('runTimeMultiplier') - 1) * 100, 0)} % longer because the pattern is uneven${uniformity}.`;
    }
    case 'rate_default':
      return `No catch-cup test for ${text('position')} yet: reckoned with a default of ${rate('rateMmPerHour')}.`;
    case 'dose':
      return `Day ${formatNumber(number('dayNumber'), 0)} from sowing (${stageWord(text('stage'))}): dose ${formatNumber(number('number'), 0)} of ${formatNumber(number('of'), 0)}, ${depth('depthMm')}.`;
    case 'dose_moved':
      return `Wanted at ${clock('wantedMinutes')}, fits at ${clock('startMinutes')}.`;
    case 'same_outing':
      return `${depth('depletionMm')} short and could wait until ${day('untilOn')}: watered with the others, which saves an outing.`;
    case 'ahead_of_dry':
      return `${depth('depletionMm')} short, its refill line of ${depth('refillLineMm')} ${has('crossesOn') ? `comes ${onDay('crossesOn')}` : 'is near'}: watered ahead, because that costs least over the days of this plan.`;
    case 'locked':
      return `Fixed by a person: ${minutes('minutes')} from ${clock('startMinutes')}.`;
    case 'half_way':
      return 'Stands half-way between its marks this time, so that the pattern evens out.';
    case 'water_in':
      return `${text('name')} has to be watered in by ${day('byOn')}: ${depth('depthMm')}.`;
    case 'above_line':
      return `${depth('depletionMm')} short of full, above its refill line of ${depth('refillLineMm')}: ${has('nextOn') ? `not before ${day('nextOn')}` : 'not within this plan'}.`;
    case 'held_for_rain':
      return `Held for rain: ${depth('rainMm')}${chance()} expected ${onDay('rainOn')}. If none comes it is ${depth('worstMm')} short, against a refill line of ${depth('refillLineMm')}.`;
    case 'resting':
      return `Resting by choice, ${depth('depletionMm')} short: nothing is planned.`;
    case 'already_watered':
      return 'Already watered today.';
    case 'left_out':
      return 'Skipped on this day.';
    case 'closed_by_rule':
      return `${text('rule')} closes this day${source()}.`;
    case 'nobody_home':
      return has('fromMinutes') ? `Nobody is at home between ${clock('fromMinutes')} and ${clock('toMinutes')}.` : 'Nobody is at home on this day.';
    case 'rule_and_home_apart':
      return has('rule') ? `${text('rule')} leaves no minute when somebody is at home${source()}.` : 'Water may not run while somebody is at home.';
    case 'past_for_today':
      return `Too late for today: it is past ${clock('nowMinutes')}.`;
    case 'windy':
      return `Wind of ${formatSpeed(number('windMps'), units)} is above the limit of ${formatSpeed(number('limitMps'), units)}.`;
    case 'frost':
      return `Down to ${formatTemperature(number('tminC'), units)}: no water into frost.`;
    case 'waits_on_priority':
      return `${depth('depletionMm')} short, against a refill line of ${depth('refillLineMm')}: left so on this day, because the stress to expect costs less than water and work do by this plan's priority. Another priority would water it.`;
    case 'on_hold':
      return `${text('name')} has to stay dry until ${clock('toMinutes')} ${onDay('toOn')}.`;
    case 'day_off':
      return 'A day off: nothing is planned.';
    case 'month_cap':
      return `This month's limit of ${formatVolume(number('capLitres'), units)} holds it back: ${formatVolume(number('leftLitres'), units)} were left.`;
    case 'weekly_limit':
      return `${text('name')} takes at most ${depth('limitMm')} in seven days${source()}: ${depth('leftMm')} are left.`;
    case 'water_in_missed':
      return `${text('name')} cannot be watered in by ${day('byOn')}: ${depth('shortMm')} of ${depth('depthMm')} are lacking.`;
    case 'rain_or_wind_hours':
      return 'Rain or wind is expected in all the hours that are open.';
    case 'supply_rest':
      return `${text('name')} must rest ${minutes('restMinutes')} between draws.`;
    case 'no_time_left':
      return `No time left: ${minutes('wantedMinutes')} wanted, the day's hours hold ${minutes('hadMinutes')} in all.`;
    case 'no_dose_today':
      return `No dose on this day while ${stageWord(text('stage'))}${has('nextOn') ? `; the next is ${onDay('nextOn')}` : ''}.`;
    case 'doses_left_to_rain':
      return `Left to the rain: ${depth('rainMm')}${chance()} expected, more than twice the ${depth('wantedMm')} of its doses.`;
    case 'dose_not_kept':
      return `The ${clock('atMinutes')} dose of ${depth('depthMm')} cannot be kept.`;
    case 'no_zones':
      return 'No zone yet: add the part of the lawn to be watered.';
    case 'no_taps':
      return 'No tap yet: add one and time a bucket at it.';
    case 'no_positions':
      return 'No position yet: say where the sprinkler stands.';
    case 'no_home_hours':
      return 'No hours at home yet: say when somebody can start and move the hose.';
    case 'rules_exclude_all':
      return `These water rules together leave no minute open in ${formatNumber(number('days'), 0)} days: ${text('rules')}.`;
    case 'zone_without_position':
      return `${text('zone')} has no position yet, so nothing can be planned for it.`;
    case 'position_without_tap':
      return `${text('position')} has no tap yet, so it cannot be planned.`;
    case 'position_without_rate':
      return `${text('position')} has no application rate yet: a catch-cup test or a bucket test gives one.`;
    case 'zone_part_unserved':
      return `${formatArea(number('areaM2'), units)} of ${text('zone')} lie outside every position.`;
    case 'no_weather':
      return 'No weather is known for this place yet, so no plan can be made. Dapple asks again by itself.';
    case 'out_of_reach':
      return `${text('position')} is ${formatLength(number('distanceM'), units)} from its tap and the hose is ${formatLength(number('hoseLengthM'), units)} long: it cannot be planned.`;
    case 'no_address_digit':
      return `${text('rule')} goes by the house number, and none is known: planned as if it did not hold${source()}.`;
    case 'lock_impossible':
      return `The set fixed for ${text('position')} ${onDay('on')} at ${clock('startMinutes')} cannot be kept: ${lockObstacles[text('limit')] ?? 'something is in its way'}.`;
    case 'flow_default':
      return `No bucket test for ${text('tap')} yet: reckoned with a default of ${formatFlow(number('flowLpm'), units)}.`;
  }
}
