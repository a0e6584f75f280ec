import { createServer } from 'node:http';
import { pino } from 'pino';
import { createApp } from './app.js';
import { systemClock } from './clock.js';
import { openWithDemo } from '../seeds/demo.js';
import { readConfig } from './config.js';

/** How long requests under way may go on after the server was asked to stop. */
const GRACE_MS = 10_000;

/** Opens the data folder, then listens; closes in order when asked to stop. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  const log = pino({ level: config.logLevel });
  const db = await openWithDemo({ config, log });
  const app = createApp({ config, db, clock: systemClock, log });
  const server = createServer(app.express);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, resolve);
  });
  app.start();
  log.info(`Motebook is open at ${config.publicUrl}`);
  const link = await app.firstKeeperLink();
  if (link)
    process.stdout.write(`\nNobody is here yet. Whoever opens this link becomes the first keeper:\n  ${link}\n\n`);

  const stop = (): void => {
    server.close(() => {
      void app
        .stop()
        .then(() => db.close())
        .then(() => process.exit(0));
    });
    server.closeIdleConnections();
    // whoever is still sending goes on later: uploads resume
    setTimeout(() => server.closeAllConnections(), GRACE_MS).unref();
  };
  process.once('SIGINT', stop);
  process.once('SIGTERM', stop);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
