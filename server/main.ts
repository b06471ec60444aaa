import { buildContext } from '@/server/buildContext';
import { createApp } from '@/server/app';
import { readEnv } from '@/server/env';
import { startJobs } from '@/server/jobs/startJobs';
import { migrate } from '@/server/migrate';
import { seedDemonstration } from '@/server/seeds/demonstration';

/** Lines on standard output are for the program that started this one; the log goes to standard error. */
function tell(message: unknown): void {
  process.stdout.write(`${JSON.stringify(message)}\n`);
}

async function serve(): Promise<void> {
  const env = readEnv();
  const context = await buildContext(env);
  const app = createApp(context);
  let stopTicks = (): Promise<void> => Promise.resolve();
  const listener = app.listen(env.PORT, env.HOST, (error?: Error) => {
    if (error) {
      const busy = (error as NodeJS.ErrnoException).code === 'EADDRINUSE';
      process.stderr.write(busy ? `Port ${env.PORT} is in use. Give another one with PORT=….\n` : `${error.message}\n`);
      process.exit(1);
    }
    void startJobs(context).then((stopJobs) => {
      stopTicks = stopJobs;
      const address = listener.address();
      tell({ ready: true, port: typeof address === 'object' && address !== null ? address.port : env.PORT });
      // Unpacks the places now, so that the first person who looks for one does not wait for it.
      void context.places.find('a', 1);
    });
  });
  let stopping = false;
  const stop = async (): Promise<void> => {
    if (stopping) {
      return;
    }
    stopping = true;
    // What was accepted is answered; what idles is closed; nothing may hold the process for long.
    setTimeout(() => process.exit(0), 4_500).unref();
    listener.close();
    listener.closeIdleConnections();
    await stopTicks();
    await context.close();
    process.exit(0);
  };
  process.on('SIGTERM', () => void stop());
  process.on('SIGINT', () => void stop());
}

async function main(): Promise<void> {
  const command = process.argv[2] ?? 'serve';
  if (command === 'migrate') {
    tell({ migrated: await migrate(readEnv().DATABASE_URL) });
  } else if (command === 'seed') {
    const env = readEnv();
    if (env.DAPPLE_MODE === 'production') {
      throw new Error('The demonstration is never seeded in production.');
    }
    const context = await buildContext(env);
    tell({ accounts: await seedDemonstration(context) });
    await context.close();
  } else if (command === 'serve') {
    await serve();
  } else {
    throw new Error(`Unknown command '${command}': use serve, migrate or seed.`);
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
