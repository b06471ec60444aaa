import { Position, type Zone } from '@/server/models';

/**
 * Gives every position of a zone whose wetted area nobody told an even share of the zone. Called whenever the zone's size or the number
 * of its positions changes.
 */
export async function shareZoneArea(zone: Pick<Zone, 'id' | 'yardId' | 'areaM2'>): Promise<void> {
  const where = { yardId: zone.yardId, zoneId: zone.id, archivedAt: null };
  const count = await Position.count({ where });
  if (count > 0) {
    await Position.update({ wettedAreaM2: zone.areaM2 / count }, { where: { ...where, wettedAreaIsDefault: true } });
  }
}
