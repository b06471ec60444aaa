import type { ObservationRow, SeenStageTold } from '@/server/readModels/readGround';
import type { ZoneSun } from '@/server/readModels/zoneSun';
import type { ObservationResponse, ZoneSunResponse } from '@/shared/contracts/ground';
import type { SeenStageResponse } from '@/shared/contracts/proposals';
import { civilDayAt } from '@/shared/time';

function presentTeller({ personId, personName }: { personId: string | null; personName: string | null }): { id: string; name: string } | null {
  return personId === null || personName === null ? null : { id: personId, name: personName };
}

export function presentObservation(row: ObservationRow): ObservationResponse {
  return { zoneId: row.zoneId, on: row.on, kind: row.kind, feel: row.feel, waterContent: row.waterContent, weight: row.weight, person: presentTeller(row) };
}

export function presentSeenStage(row: SeenStageTold): SeenStageResponse {
  return { on: row.on, stage: row.stage, person: presentTeller(row) };
}

/** Sun of a zone: its diary and its light by month. */
export function presentZoneSun({ row, months }: ZoneSun, now: Date): ZoneSunResponse {
  return {
    zoneId: row.zoneId, zoneName: row.zoneName, sunFrom: row.horizonDeg === null ? 'hours' : 'diary', today: civilDayAt(now, row.timeZone),
    pages: row.pages.map((page) => ({ on: page.on, sunnyHours: page.sunnyHours, person: presentTeller(page) })),
    months: months.map(({ month, directSunHours, openSunHours, radiationShare }) => ({ month, directSunHours, openSunHours, radiationShare })),
  };
}
