import { join } from 'node:path';
import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import { createFindRooms, type FindRooms, mountFindRooms } from './app-finds.js';
import { createPictureRooms, type PictureRooms } from './app-pictures.js';
import { type Clock, instant, today } from './clock.js';
import type { Config } from './config.js';
import { CalibrationTable } from './db/calibrations.js';
import { CounterTable } from './db/counters.js';
import type { Database } from './db/database.js';
import { ImageScaleTable } from './db/image-scales.js';
import { ImageTable } from './db/images.js';
import { JobTable } from './db/jobs.js';
import { MailTable } from './db/mails.js';
import { KeptOriginals } from './db/kept-originals.js';
import { MeasurementTable } from './db/measurements.js';
import { RigTable } from './db/rigs.js';
import { SessionTable } from './db/sessions.js';
import { ThingTable } from './db/things.js';
import { TokenTable } from './db/tokens.js';
import { UserTable } from './db/users.js';
import { JobRunner } from './jobs/job-runner.js';
import { Postbox } from './mail/postbox.js';
import { LocalMail, type MailTransport } from './mail/transport.js';
import { bodies } from './middleware/bodies.js';
import { limiters, LIMITS, type Limits } from './middleware/limits.js';
import { personal } from './middleware/personal.js';
import { problems, unknownPath } from './middleware/problems.js';
import { security } from './middleware/security.js';
import { seen } from './middleware/seen.js';
import { sessions } from './middleware/session.js';
import { xsrf as createXsrf } from './middleware/xsrf.js';
import { builtApplication, createPages, type PageOptions } from './pages.js';
import { Passwords } from './passwords.js';
import { mountKeep } from './routes/keep.js';
import { Mount } from './routes/mount.js';
import { mountPortraits } from './routes/portraits.js';
import { mountSession } from './routes/session.js';
import { sessionSecret } from './secret.js';
import { IntegrityService } from './services/integrity.js';
import { InvitationService } from './services/invitations.js';
import { KeepService } from './services/keep.js';
import { MeasurementService } from './services/measurements.js';
import { PasswordResetService } from './services/password-resets.js';
import { PeopleService } from './services/people.js';
import { PortraitService } from './services/portraits.js';
import type { ChildLimits } from './pictures/child-process.js';
import { ScaleService } from './services/scales.js';

export interface AppOptions {
  readonly config: Config;
  readonly db: Database;
  readonly clock: Clock;
  readonly log: Logger;
  /** in tests: cheap password hashes, answers held against their contracts */
  readonly forTests?: boolean;
  /** left out: what is generous to people and stops guessing machines */
  readonly limits?: Limits;
  /** left out: `.eml` files in the data folder */
  readonly mail?: MailTransport;
  /** left out: the built application and its own rendering */
  readonly pages?: Pick<PageOptions, 'folder' | 'load' | 'patienceMs'>;
  /** left out: what large pictures need */
  readonly intakeLimits?: ChildLimits;
}

export interface App {
  readonly express: Express;
  readonly jobs: JobRunner;
  /** brings in files that came by another way than an upload */
  readonly bringIn: PictureRooms['arrivals']['bringIn'];
  /** the services that the demo is told through */
  readonly rooms: FindRooms & { readonly scales: ScaleService; readonly images: PictureRooms['images'] };
  /** starts background work: jobs, outgoing mail */
  start(): void;
  /** the link by which the first keeper comes in; null when there are people */
  firstKeeperLink(): Promise<string | null>;
  /** ends background work and waits for what runs */
  stop(): Promise<void>;
}

/** The composition root: tables, services, routes. */
export function createApp(options: AppOptions): App {
  const { config, db, clock, log, forTests = false, limits = LIMITS } = options;
  const https = config.publicUrl.startsWith('https:');
  const secret = sessionSecret(config);
  const passwords = new Passwords(forTests);
  const users = new UserTable(db);
  const people = new PeopleService(users, config.demo, clock);

  const jobTable = new JobTable(db);
  // how a job of each kind is done; call `jobs.nudge()` after the transaction that enqueued one
  const jobs: JobRunner = new JobRunner({
    ...{ jobs: jobTable, clock, log },
    handlers: {
      mail: ({ about }) => postbox.deliver(about),
      intake: (job, signal) => pictureRooms.jobs.handlers.intake(job, signal),
      'forget-files': (job) => pictureRooms.jobs.handlers['forget-files'](job),
    },
    atOnce: { intake: 2 }, // one reads while the other writes
    attempts: { intake: 3 },
    givenUp: { intake: (trx, job) => pictureRooms.jobs.givenUp.intake(trx, job) },
  });

  const mails = new MailTable(db);
  const transport = options.mail ?? new LocalMail(join(config.dataDir, 'mail'), config.publicUrl);
  const postbox = new Postbox(mails, transport, clock, async (trx, mailId) => {
    await jobTable.enqueue(trx, { kind: 'mail', about: mailId, now: instant(clock) });
    trx.executionPromise.then(
      () => jobs.nudge(),
      () => undefined, // rolled back: there is no mail
    );
  });
  const sessionTable = new SessionTable(db, clock);
  const tokens = new TokenTable(db);
  const { publicUrl } = config;
  const invitations = new InvitationService({ db, users, tokens, postbox, passwords, clock, publicUrl });
  const resets = new PasswordResetService({
    ...{ db, users, tokens, sessions: sessionTable, postbox, passwords, clock, publicUrl },
    ...(forTests && { pause: () => Promise.resolve() }),
  });
  const keep = new KeepService({ db, users, invitations, mails, jobTable, runner: jobs, clock });

  const measurements = new MeasurementService(new MeasurementTable(), clock);
  const images = new ImageTable(db);
  const imageScales = new ImageScaleTable(db);
  const scales = new ScaleService({
    ...{ db, users, clock, images, scales: imageScales },
    ...{ rigs: new RigTable(db), calibrations: new CalibrationTable(db) },
    onNewScale: (trx, imageId) => measurements.recompute(imageId, trx),
  });
  const findRooms = createFindRooms({
    ...{ db, clock, measurements, findPrefix: config.findPrefix },
    applyCalibration: scales.applyCalibration,
  });

  const pictureRooms = createPictureRooms({
    ...{ config, db, clock, log, images, imageScales, users, jobTable, scales, nudge: () => jobs.nudge() },
    ...(options.intakeLimits && { intakeLimits: options.intakeLimits }),
  });
  const integrity = new IntegrityService(new KeptOriginals(db), pictureRooms.files, clock);

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', 'loopback');
  app.use(security({ https }), compression());
  app.get('/healthz', (_req, res) => {
    res.type('text').send('ok');
  });

  const { handlers, passport } = sessions({ store: sessionTable, users, passwords, secret, secure: https });
  const xsrf = createXsrf({ secret, secure: https });
  const pages = createPages({
    ...{ folder: builtApplication(), ...options.pages, publicUrl, port: config.port, xsrf, log },
    publicRevision: () => new CounterTable(db).read('public-revision'),
    day: () => today(clock),
  });
  app.use(pages.files, cookieParser(), handlers, seen(people));
  app.use('/api', personal, bodies, xsrf.protect);

  const mount = new Mount(app, new ThingTable(db.read), clock, forTests);
  const limit = limiters(limits);
  app.post('/api/session', limit.signIn);
  app.post('/api/password-resets', limit.askReset);
  app.put('/api/password-resets', limit.links);
  app.post('/api/invitations/accept', limit.links);
  mountSession(mount, { people, resets, invitations, passport, xsrf });
  mountPortraits(mount, app, new PortraitService(config.dataDir, users));
  mountKeep(mount, { keep, invitations, integrity });
  mountFindRooms(mount, findRooms);
  pictureRooms.mount(app, mount);

  app.use('/api', unknownPath);
  app.use(pages.pages);
  app.use(problems(log));

  let starting: Promise<void> = Promise.resolve();
  return {
    express: app,
    jobs,
    bringIn: (input) => pictureRooms.arrivals.bringIn(input),
    rooms: { ...findRooms, scales, images: pictureRooms.images },
    start() {
      starting = pictureRooms.start().then(
        () => jobs.start(),
        (error: unknown) => {
          log.error({ err: error }, 'the data folder could not be taken up');
        },
      );
    },
    firstKeeperLink: () => invitations.forFirstKeeper(),
    async stop() {
      await starting;
      pictureRooms.stop();
      await jobs.stop();
    },
  };
}
