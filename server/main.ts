import { inspect } from 'node:util';
import { pino } from 'pino';
import { startServer } from './server';
import { parseSettings, SettingsError } from './settings/settings';

/** The process cannot start as it was set up; whoever started it reads one sentence. */
const EXIT_SETUP = 78;

async function main(): Promise<void> {
  const settings = parseSettings(process.env);
  const log = pino({ level: settings.production ? 'info' : 'warn' }, pino.destination(2));
  const running = await startServer({ settings, log, now: () => new Date() });
  let stopping = false;
  const stop = () => {
    if (stopping) return;
    stopping = true;
    // Whatever hangs does not keep the process: it ends after 25 seconds.
    setTimeout(() => process.exit(1), 25_000).unref();
    running.stop().then(
      () => process.exit(0),
      (error: unknown) => {
        log.error({ error }, 'the server did not stop cleanly');
        process.exit(1);
      },
    );
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
  // The launcher was killed: whoever it started ends too.
  process.on('disconnect', stop);
  for (const line of running.notes) process.stdout.write(`${line}\n`);
  const ready = { ready: true, url: settings.publicUrl };
  if (process.send) process.send(ready);
  else process.stdout.write(`${JSON.stringify(ready)}\n`);
}

main().catch((error: unknown) => {
  if (error instanceof SettingsError) {
    process.stderr.write(`${error.message}\n`);
    process.exit(EXIT_SETUP);
  }
  // With its causes: a query that fails says only there why.
  process.stderr.write(`${inspect(error)}\n`);
  process.exit(1);
});
