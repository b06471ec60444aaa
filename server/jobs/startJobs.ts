import cron from 'node-cron';
import { ensureFresh } from '@/server/commands/refreshYard';
import { sendWaitingMail } from '@/server/commands/outbox';
import type { AppContext } from '@/server/context';
import { runDaily } from './runDaily';
import { sendReminder } from './sendReminder';
import { tick } from './tick';

/**
 * Starts the periodic work of this server: ticks that enqueue what is due, and workers that take it from the queue, here or on any other server.
 * @returns a function that stops the ticks; the queue is stopped with the context
 */
export async function startJobs(context: AppContext): Promise<() => Promise<void>> {
  const { queue } = context;
  await queue.work('daily_run', async (payload) => void await runDaily(context, payload));
  await queue.work('refresh', async ({ yardId }) => void await ensureFresh(context, yardId));
  await queue.work('reminder', async ({ reminderId }) => void await sendReminder(context, reminderId));
  await queue.work('mail', ({ mailId }) => sendWaitingMail(context, mailId));
  const look = async (): Promise<void> => {
    try {
      await tick(context);
    } catch (error) {
      context.log.error({ err: error }, 'looking for due work failed');
    }
  };
  // In the demonstration people watch and wait; elsewhere a reminder is told to the minute.
  const task = cron.schedule(context.clock.isDemonstration ? '*/3 * * * * *' : '* * * * *', look, { noOverlap: true });
  await look();
  return async () => {
    await task.destroy();
  };
}
