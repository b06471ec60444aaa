import type { Mulch, ZoneResponse } from '@/shared/contracts/zones';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatCivilDay, formatDepth, formatLength } from '@/shared/display';
import { compactionWords, grassWords, soilWords } from '@/shared/zoneWords';
import type { GuardedGround, PositionResponse } from '@/shared/contracts/equipment';

export const mulchWords: Record<Mulch, string> = { none: 'No cover', straw: 'Straw', peat: 'Peat', compost: 'Compost' };
export const rateSourceWords: Record<PositionResponse['rateSource'], string> = { catch_test: 'from a catch-cup test', flow_and_area: 'from flow and wetted area', default: 'a default' };

export const guardedGroundWords: Record<GuardedGround, string> = { drain_field: 'Over a drain field', well_head: 'Beside a well head' };
export const guardedGroundCautions: Record<GuardedGround, string> = {
  drain_field: 'Water on a drain field can stop it from working. The local health code and the septic installer decide what it bears, not Dapple.',
  well_head: 'Water that stands at a well head can carry dirt into the well. The local health code and the well contractor decide, not Dapple.',
};

/** What a position tells of its ground and its sets beside rate and mark. */
export function positionFacts(position: Pick<PositionResponse, 'heightM' | 'weeklyLimit' | 'alternateSets'>, units: UnitSystem): string[] {
  const { heightM, weeklyLimit, alternateSets } = position;
  return [
    ...(alternateSets ? ['alternate sets'] : []),
    ...(heightM === null ? [] : [heightM === 0 ? 'the lowest' : `${formatLength(heightM, units)} above the lowest`]),
    ...(weeklyLimit === null ? [] : [`${guardedGroundWords[weeklyLimit.over].toLowerCase()}: at most ${formatDepth(weeklyLimit.depthMm, units)} in seven days (${weeklyLimit.source.replace(/\.$/, '')})`]),
  ];
}

/** Shares of the ground in words. */
export const treeRootWords: Readonly<Record<string, string>> = { 0: 'No tree near', 0.25: 'Along an edge', 0.5: 'About half of it', 1: 'All of it' };
export const coverWords: Readonly<Record<string, string>> = { 1: 'All of the ground', 0.8: 'Most, thin in places', 0.6: 'Patches with bare ground between' };

/** A share in words, or in percent where it has none. */
export function shareWords(words: Readonly<Record<string, string>>, share: number): string {
  return words[String(share)] ?? `${Math.round(share * 100)} %`;
}

/** The choices in words, with the own share among them where it is none of those. */
export function ownOption(words: Readonly<Record<string, string>>, own: number | null): { value: string; label: string }[] {
  const values = Object.keys(words).map(Number);
  const all = own === null || values.includes(own) ? values : [...values, own];
  return all.sort((a, b) => a - b).map((value) => ({ value: String(value), label: shareWords(words, value) }));
}

/** ' on 10 June', the day on which hours of sun were seen; nothing for default hours. */
function seenOn({ sunHoursOn, sunHoursIsDefault }: ZoneResponse): string {
  return sunHoursOn === null || sunHoursIsDefault ? '' : ` on ${formatCivilDay(sunHoursOn, 'dated').replace(/ \d+$/, '')}`;
}

/** Words for the facts of a zone, each with its mark when it is a default. */
export function zoneFacts(zone: ZoneResponse): string[] {
  const mark = (isDefault: boolean) => (isDefault ? ' (default)' : '');
  return [
    `${grassWords[zone.grass]}${mark(zone.grassIsDefault)}`, `${soilWords[zone.soil].toLowerCase()}${mark(zone.soilIsDefault)}`,
    zone.hasSunDiary ? 'sun by its diary' : `${zone.sunHours.toFixed(zone.sunHours % 1 === 0 ? 0 : 1)} h of sun${seenOn(zone)}${mark(zone.sunHoursIsDefault)}`,
    `slope ${zone.slopePct.toFixed(0)} %${mark(zone.slopeIsDefault)}`, `${compactionWords[zone.compaction].toLowerCase()} ground${mark(zone.compactionIsDefault)}`,
    ...(zone.treeRootShare > 0 ? [`tree roots: ${shareWords(treeRootWords, zone.treeRootShare).toLowerCase()}`] : []),
    ...(zone.coverFraction < 1 && zone.seededOn === null ? [`grass covers ${shareWords(coverWords, zone.coverFraction).toLowerCase()}`] : []),
  ];
}
