import { mailsDue } from '@/server/commands/outbox';
import type { AppContext } from '@/server/context';
import { dailyRunsDue, remindersDue, yardsBehind } from './dueWork';

/** Looks what is due and hands it to the queue; does none of it. Several servers may tick at the same moment. */
export async function tick(context: AppContext): Promise<void> {
  const { queue, settableClock } = context;
  if (settableClock !== null) {
    await settableClock.beat();
    if (await settableClock.isBeingSet()) {
      return;
    }
  }
  for (const run of await dailyRunsDue(context)) {
    await queue.enqueue('daily_run', run, `${run.yardId} ${run.on}`);
  }
  for (const { yardId } of await yardsBehind(context)) {
    await queue.enqueue('refresh', { yardId }, yardId);
  }
  for (const { reminderId } of await remindersDue(context)) {
    await queue.enqueue('reminder', { reminderId }, reminderId);
  }
  for (const { mailId } of await mailsDue(context)) {
    await queue.enqueue('mail', { mailId }, mailId);
  }
}
