import type { Mulch, ZoneResponse } from '@/shared/contracts/zones';
import { grassWords, soilWords } from '@/shared/zoneWords';
import type { PositionResponse } from '@/shared/contracts/equipment';

export const mulchWords: Record<Mulch, string> = { none: 'No cover', straw: 'Straw', peat: 'Peat', compost: 'Compost' };
export const rateSourceWords: Record<PositionResponse['rateSource'], string> = { catch_test: 'from a catch-cup test', flow_and_area: 'from flow and wetted area', default: 'a default' };

/** Words for the facts of a zone, each with its mark when it is a default. */
export function zoneFacts(zone: ZoneResponse): string[] {
  const mark = (isDefault: boolean) => (isDefault ? ' (default)' : '');
  return [
    `${grassWords[zone.grass]}${mark(zone.grassIsDefault)}`, `${soilWords[zone.soil].toLowerCase()}${mark(zone.soilIsDefault)}`,
    `${zone.sunHours.toFixed(zone.sunHours % 1 === 0 ? 0 : 1)} h of sun${mark(zone.sunHoursIsDefault)}`, `slope ${zone.slopePct.toFixed(0)} %${mark(zone.slopeIsDefault)}`,
  ];
}
