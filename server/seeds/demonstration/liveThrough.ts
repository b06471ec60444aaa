import { randomUUID } from 'node:crypto';
import { addDays } from '@/scheduling/units/civilDay';
import { defaultSchedule } from '@/server/commands/ensureSchedule';
import { putObservation } from '@/server/commands/ground/changeObservations';
import { putSeenStage } from '@/server/commands/ground/changeSeenStages';
import { putSunDiaryPage } from '@/server/commands/ground/changeSunDiary';
import { putRain } from '@/server/commands/measuring/changeRain';
import { createProposal, type ProposalChange } from '@/server/commands/proposals/createProposal';
import { decideProposal } from '@/server/commands/proposals/decideProposal';
import { ensureFresh } from '@/server/commands/refreshYard';
import { changeRound } from '@/server/commands/rounds/changeRound';
import type { RoundAction } from '@/server/commands/rounds/roundStates';
import { skipPlannedRound } from '@/server/commands/rounds/skipPlannedRound';
import { startRound } from '@/server/commands/rounds/startRound';
import type { AppContext } from '@/server/context';
import { DAILY_RUN_MINUTES, remindersDue } from '@/server/jobs/dueWork';
import { runDaily } from '@/server/jobs/runDaily';
import { sendReminder } from '@/server/jobs/sendReminder';
import { Membership, RoundSet } from '@/server/models';
import { plannedDaySets, type PlannedDaySet } from '@/server/readModels/plannedDay';
import { establishmentScheduleSchema } from '@/shared/contracts/proposals';
import { instantAt } from '@/shared/time';
import { buildYard, type BuiltYard } from './buildYard';
import type { DemonstrationUsers } from './people';
import type { RoundFate, YardScript } from './yardScript';

const MINUTE_MS = 60_000;
/** When people look after their yard's facts: in the evening, with nothing running. */
const EVENING_MINUTES = 21 * 60;
/** Days before the end from which mail is wanted, so that the mail page shows the newest and nothing has to be sent for weeks. */
const MAIL_DAYS = 2;

interface Life {
  context: AppContext;
  users: DemonstrationUsers;
  script: YardScript;
  built: BuiltYard;
  /** Lets the clock stand at a time of the yard. */
  stand(instant: Date): void;
}

/**
 * Lets a yard live from its first evening to an instant, day by day, through the same jobs and commands as any yard: weather, budget and plan each
 * morning, rounds as the script tells, facts in the evening.
 */
export async function liveThrough(context: AppContext, users: DemonstrationUsers, script: YardScript, until: Date, wantsMail: boolean): Promise<void> {
  const { timeZone } = script.yard;
  const stand = (instant: Date) => context.settableClock?.standAt(instant);
  stand(instantAt(script.fromOn, EVENING_MINUTES, timeZone));
  const built = await buildYard(context, users, script);
  const life: Life = { context, users, script, built, stand };
  await evening(life, script.fromOn);
  const mailFrom = new Date(until.getTime() - MAIL_DAYS * 24 * 60 * MINUTE_MS);
  for (let on = addDays(script.fromOn, 1); instantAt(on, DAILY_RUN_MINUTES, timeZone) <= until; on = addDays(on, 1)) {
    stand(instantAt(on, DAILY_RUN_MINUTES, timeZone));
    if (wantsMail && context.clock.now() >= mailFrom) {
      await Membership.update({ wantsMorningEmail: true, wantsMoveEmail: true }, { where: { yardId: built.yardId, role: ['owner', 'helper'] } });
    }
    await runDaily(context, { yardId: built.yardId, on });
    await roundsOf(life, on, until);
    if (instantAt(on, EVENING_MINUTES, timeZone) < until) {
      await evening(life, on);
    }
  }
  stand(until);
  await ensureFresh(context, built.yardId);
}

async function roundsOf(life: Life, on: string, until: Date): Promise<void> {
  const { context, script, built } = life;
  const sets = await plannedDaySets(context.database, built.yardId, on);
  for (const roundIndex of [...new Set(sets.map((set) => set.roundIndex))]) {
    const own = sets.filter((set) => set.roundIndex === roundIndex);
    const [first] = own;
    if (first === undefined || Math.max(...own.map((set) => set.endAt.getTime())) >= until.getTime()) {
      return;
    }
    await sendDueBefore(life, first.startAt);
    const fate = script.fateOf(on, roundIndex, first.kind);
    if (fate !== 'forgotten') {
      await doRound(life, on, roundIndex, own, fate);
    }
  }
}

async function doRound(life: Life, on: string, roundIndex: number, sets: PlannedDaySet[], fate: Exclude<RoundFate, 'forgotten'>): Promise<void> {
  const { context, users, built, stand } = life;
  const { database, clock } = context;
  const change = () => ({ app: context, yardId: built.yardId, userId: users[fate.by].id, now: clock.now() });
  const [first] = sets;
  if (first === undefined) {
    return;
  }
  stand(first.startAt);
  if ('skip' in fate) {
    await database.transaction(() => skipPlannedRound(change(), { on, roundIndex, cause: fate.skip }));
    return;
  }
  const roundId = await database.transaction(() => startRound(change(), { id: randomUUID(), on, roundIndex }));
  const rows = await RoundSet.findAll({ where: { yardId: built.yardId, roundId } });
  const idOf = (set: PlannedDaySet) => rows.find((row) => row.sortOrder === set.sortOrder && row.positionId === set.positionId)?.id ?? '';
  const steps: { at: Date; action: RoundAction }[] = sets.flatMap((set, index) => [
    ...(index === 0 ? [] : [{ at: set.startAt, action: { action: 'moved' as const, setId: idOf(set) } }]),
    { at: set.endAt, action: { action: 'cut_short' as const, setId: idOf(set) } },
  ]).sort((a, b) => a.at.getTime() - b.at.getTime());
  const last = steps[steps.length - 1]?.at ?? first.endAt;
  const ending = { at: fate.cutShortTo === undefined ? last : new Date(first.startAt.getTime() + fate.cutShortTo * MINUTE_MS), action: { action: 'water_off' as const } };
  for (const { at, action } of [...steps.filter((step) => step.at < ending.at), ending]) {
    await sendDueBefore(life, at);
    stand(at);
    await database.transaction(() => changeRound(change(), roundId, action));
  }
}

/** Sends what falls due up to an instant, each at its own time. */
async function sendDueBefore({ context, built, stand }: Life, instant: Date): Promise<void> {
  stand(instant);
  for (const { reminderId, yardId, dueAt } of await remindersDue(context)) {
    if (yardId === built.yardId) {
      stand(dueAt);
      await sendReminder(context, reminderId);
    }
  }
  stand(instant);
}

async function evening(life: Life, on: string): Promise<void> {
  const { context, users, script, built, stand } = life;
  const { database, clock } = context;
  stand(instantAt(on, EVENING_MINUTES, script.yard.timeZone));
  const isNew = on === script.fromOn;
  const added = !isNew && await built.addZonesOf(on);
  const tested = await built.testOn(on);
  const gauge = script.rainGauge?.[on];
  if (gauge !== undefined) {
    await database.transaction(() => putRain({ database, yardId: built.yardId, userId: users[script.owner].id, now: clock.now() }, on, gauge));
  }
  const seen = (script.seen ?? []).filter((one) => one.on === on);
  for (const one of seen) {
    await database.transaction(() => tellSeen(life, one));
  }
  const proposals = (script.proposals ?? []).filter((proposal) => proposal.on === on);
  for (const proposal of proposals) {
    await propose(life, proposal);
  }
  // What the rounds of the day changed is taken up in the morning.
  if (isNew || tested || added || seen.length > 0 || proposals.length > 0) {
    await ensureFresh(context, built.yardId);
  }
}

/** Writes down what somebody saw on the ground. */
async function tellSeen({ context, users, built }: Life, seen: NonNullable<YardScript['seen']>[number]): Promise<void> {
  const change = { database: context.database, yardId: built.yardId, userId: users[seen.by].id, now: context.clock.now() };
  const zoneId = built.zoneIds.get(seen.zone) ?? '';
  if ('soil' in seen) {
    await putObservation(change, zoneId, seen.on, seen.soil);
  } else if ('stage' in seen) {
    await putSeenStage(change, zoneId, seen.on, seen.stage);
  } else {
    await putSunDiaryPage(change, zoneId, seen.on, seen.sunnyHours);
  }
}

async function propose({ context, users, script, built }: Life, proposal: NonNullable<YardScript['proposals']>[number]): Promise<void> {
  const effects: (() => Promise<void>)[] = [];
  const as = (userId: string): ProposalChange => ({
    app: context, now: context.clock.now(), yardId: built.yardId, user: { id: userId }, afterCommit: (effect) => void effects.push(effect),
  });
  const schedule = establishmentScheduleSchema.parse({
    stages: defaultSchedule.stages.map((stage, index) => ({ ...stage, depthMm: proposal.depthsMm[index], dosesPerDay: proposal.dosesPerDay[index] })),
  });
  await context.database.transaction(async () => {
    const id = await createProposal(as(users.inez.id), { zoneId: built.zoneIds.get(proposal.zone) ?? '', schedule, reason: proposal.reason });
    if (proposal.answer !== undefined) {
      await decideProposal(as(users[script.owner].id), id, { decision: 'accept', answer: proposal.answer });
    }
  });
  for (const effect of effects) {
    await effect();
  }
}
