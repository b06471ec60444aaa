import { QueryTypes } from 'sequelize';
import { remindersOfRound } from '@/server/commands/reminders/planRoundReminders';
import { loadRound, type StoredRound } from '@/server/commands/rounds/roundRows';
import { inOrder } from '@/server/commands/rounds/roundStates';
import { daylightMinutes } from '@/server/commands/wallClock';
import type { AppContext } from '@/server/context';
import { moveMail, morningMail, stillOnMail, waterOffMail } from '@/server/presenters/mail/reminderMails';
import { movesIn, plannedDaySets } from '@/server/readModels/plannedDay';
import type { PlanResult } from '@/scheduling/planning/types';
import type { UnitSystem } from '@/shared/contracts/common';
import type { ReminderKind } from '@/shared/contracts/messages';
import { minutesAt } from '@/shared/time';

/** A reminder that this server has claimed. */
export interface ClaimedReminder {
  id: string;
  yardId: string;
  userId: string;
  kind: ReminderKind;
  subjectKey: string;
  dueAt: Date;
  dropAfter: Date;
  messageId: string;
  attempts: number;
}

export interface ReminderMail {
  to: string;
  /** Name of the person who gets it. */
  name: string;
  subject: string;
  text: string;
  html: string;
}

interface Recipient {
  name: string;
  email: string;
  yardName: string;
  units: UnitSystem;
  timeZone: string;
  latitudeDeg: number;
  longitudeDeg: number;
  wantsMorningEmail: boolean;
  wantsMoveEmail: boolean;
}

/**
 * The mail of a reminder from the state of things now, not from when it was planned; null when nobody needs it any more: the round was started,
 * skipped, moved on or ended, or the person left or wants no mail.
 */
export async function reminderMail(context: AppContext, reminder: ClaimedReminder, lateMinutes: number | null): Promise<ReminderMail | null> {
  const [recipient] = await context.database.query<Recipient>(
    `SELECT u.name, u.email, y.name AS "yardName", y.units, y.time_zone AS "timeZone", y.latitude_deg AS "latitudeDeg", y.longitude_deg AS "longitudeDeg",
       m.wants_morning_email AS "wantsMorningEmail", m.wants_move_email AS "wantsMoveEmail"
     FROM memberships m JOIN users u ON u.id = m.user_id JOIN yards y ON y.id = m.yard_id WHERE m.yard_id = $1 AND m.user_id = $2`,
    { bind: [reminder.yardId, reminder.userId], type: QueryTypes.SELECT },
  );
  if (recipient === undefined || !(reminder.kind === 'morning' ? recipient.wantsMorningEmail : recipient.wantsMoveEmail)) {
    return null;
  }
  const mail = reminder.kind === 'morning'
    ? await morning(context, reminder, recipient, lateMinutes)
    : await ofRound(context, { ...reminder, kind: reminder.kind }, recipient, lateMinutes);
  return mail === null ? null : { to: recipient.email, name: recipient.name, ...mail };
}

async function morning(context: AppContext, reminder: ClaimedReminder, recipient: Recipient, lateMinutes: number | null) {
  const { database } = context;
  const { yardId, subjectKey: on } = reminder;
  const now = context.clock.now();
  const sets = (await plannedDaySets(database, yardId, on)).filter((set) => !set.begun && set.endAt > now);
  const last = sets.reduce<Date | null>((latest, set) => (latest === null || set.endAt > latest ? set.endAt : latest), null);
  if (last === null) {
    return null;
  }
  const [day] = await database.query<{ result: PlanResult; tminC: number | null; tmaxC: number | null; rainMm: number | null; sample: boolean | null }>(
    `SELECT p.result, w.tmin_c AS "tminC", w.tmax_c AS "tmaxC", w.precipitation_mm AS "rainMm", f.sample
     FROM (SELECT result FROM plans WHERE yard_id = $1 ORDER BY version DESC LIMIT 1) p
     LEFT JOIN weather_days w ON w.yard_id = $1 AND w."on" = $2::date LEFT JOIN weather_fetches f ON f.yard_id = $1`,
    { bind: [yardId, on], type: QueryTypes.SELECT },
  );
  const zones = await database.query<{ id: string; name: string }>('SELECT id, name FROM zones WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  const names = new Map(zones.map((zone) => [zone.id, zone.name]));
  const without = day?.result.days.find((planned) => planned.on === on)?.zonesWithout ?? [];
  return morningMail({
    yardName: recipient.yardName, units: recipient.units, url: `${context.publicUrl}/yards/${yardId}/today`, lateMinutes, on,
    sets, moves: movesIn(sets), endMinutes: minutesAt(last, recipient.timeZone),
    notWatered: without.flatMap((zone) => {
      const zoneName = names.get(zone.zoneId);
      return zoneName === undefined ? [] : [{ zoneName, reasons: zone.reasons }];
    }),
    weather: day === undefined || day.tminC === null || day.tmaxC === null ? null : { tminC: day.tminC, tmaxC: day.tmaxC, rainMm: day.rainMm, sample: day.sample ?? false },
    sunriseMinutes: daylightMinutes(recipient, on).sunriseMinutes,
  });
}

async function ofRound(context: AppContext, reminder: ClaimedReminder & { kind: 'move' | 'water_off' | 'still_on' }, recipient: Recipient, lateMinutes: number | null) {
  const { database } = context;
  const [roundId = '', setId = '', endedMs = ''] = reminder.subjectKey.split('/');
  const stored = await loadRound(database, reminder.yardId, roundId);
  const isWanted = stored !== null && remindersOfRound(roundId, stored.state).some((wanted) => wanted.kind === reminder.kind && wanted.subjectKey === reminder.subjectKey);
  if (!isWanted) {
    return null;
  }
  const places = await database.query<{ positionId: string; positionName: string; mark: string; zoneName: string }>(
    `SELECT p.id AS "positionId", p.name AS "positionName", p.mark, z.name AS "zoneName" FROM positions p JOIN zones z ON z.yard_id = p.yard_id AND z.id = p.zone_id WHERE p.yard_id = $1`,
    { bind: [reminder.yardId], type: QueryTypes.SELECT },
  );
  const placeOf = (id: string) => places.find((place) => place.positionId === stored.setRows.find((row) => row.id === id)?.positionId);
  const set = stored.state.sets.find((candidate) => candidate.id === setId) ?? lastEnded(stored);
  const place = set === undefined ? undefined : placeOf(set.id);
  if (set === undefined || place === undefined) {
    return null;
  }
  const facts = {
    yardName: recipient.yardName, units: recipient.units, url: `${context.publicUrl}/yards/${reminder.yardId}/rounds/${roundId}`, lateMinutes,
    positionName: place.positionName, zoneName: place.zoneName, minutes: set.plannedMinutes + set.addedMinutes, endedMinutes: minutesAt(new Date(Number(endedMs)), recipient.timeZone),
  };
  if (reminder.kind !== 'move') {
    return reminder.kind === 'water_off' ? waterOffMail(facts) : stillOnMail(facts);
  }
  const next = inOrder(stored.state.sets).find((candidate) => candidate.tapId === set.tapId && candidate.status === 'waiting');
  const nextPlace = next === undefined ? undefined : placeOf(next.id);
  return next === undefined || nextPlace === undefined ? null : moveMail({ ...facts, next: { positionName: nextPlace.positionName, mark: nextPlace.mark, minutes: next.plannedMinutes } });
}

function lastEnded({ state }: StoredRound) {
  return [...state.sets].filter((set) => set.endedAt !== null).sort((a, b) => (b.endedAt?.getTime() ?? 0) - (a.endedAt?.getTime() ?? 0))[0];
}
