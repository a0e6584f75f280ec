import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import type { Clock } from './clock.js';
import type { Config } from './config.js';
import type { Database } from './db/database.js';
import { JobTable } from './db/jobs.js';
import { ThingTable } from './db/things.js';
import { UserTable } from './db/users.js';
import { JobRunner } from './jobs/job-runner.js';
import { problems, unknownPath } from './middleware/problems.js';
import { security } from './middleware/security.js';
import { sessions } from './middleware/session.js';
import { xsrf as createXsrf } from './middleware/xsrf.js';
import { Passwords } from './passwords.js';
import { Mount } from './routes/mount.js';
import { mountSession } from './routes/session.js';
import { sessionSecret } from './secret.js';
import { PeopleService } from './services/people.js';

export interface AppOptions {
  readonly config: Config;
  readonly db: Database;
  readonly clock: Clock;
  readonly log: Logger;
  /** in tests: cheap password hashes, answers held against their contracts */
  readonly forTests?: boolean;
}

export interface App {
  readonly express: Express;
  readonly jobs: JobRunner;
  /** starts background work: jobs, outgoing mail */
  start(): void;
  /** ends background work and waits for what runs */
  stop(): Promise<void>;
}

/** The composition root: tables, services, routes. */
export function createApp({ config, db, clock, log, forTests = false }: AppOptions): App {
  const https = config.publicUrl.startsWith('https:');
  const secret = sessionSecret(config);
  const passwords = new Passwords(forTests);
  const users = new UserTable(db);
  const people = new PeopleService(users, config.demo);

  const jobTable = new JobTable(db);
  // how a job of each kind is done; call `jobs.nudge()` after the transaction that enqueued one
  const jobs = new JobRunner({ jobs: jobTable, clock, log, handlers: {} });

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', 'loopback');
  app.use(security({ https }), compression());
  app.get('/healthz', (_req, res) => {
    res.type('text').send('ok');
  });

  const { handlers, passport } = sessions({ db, users, passwords, clock, secret, secure: https });
  const xsrf = createXsrf({ secret, secure: https });
  app.use(cookieParser(), handlers);
  app.use('/api', express.json({ limit: '2mb' }), xsrf.protect);

  const mount = new Mount(app, new ThingTable(db.read), clock, forTests);
  mountSession(mount, { people, passport, xsrf });

  app.use('/api', unknownPath);
  app.use(problems(log));

  return {
    express: app,
    jobs,
    start() {
      jobs.start();
    },
    async stop() {
      await jobs.stop();
    },
  };
}
