import type { Express } from 'express';
import type { Logger } from 'pino';
import type { Clock } from './clock.js';
import type { Config } from './config.js';
import type { Database } from './db/database.js';
import type { ImageScaleTable } from './db/image-scales.js';
import { ImageSurroundingsTable } from './db/image-surroundings.js';
import type { ImageTable } from './db/images.js';
import type { JobTable } from './db/jobs.js';
import { RigTable } from './db/rigs.js';
import { ThingTable } from './db/things.js';
import type { UserTable } from './db/users.js';
import { Arrivals } from './pictures/arrivals.js';
import { type ChildLimits, INTAKE_LIMITS } from './pictures/child-process.js';
import { forgetFiles } from './pictures/forget.js';
import { Intake } from './pictures/intake.js';
import { Originals } from './pictures/originals.js';
import { PictureFiles } from './pictures/picture-files.js';
import { PictureServer } from './pictures/picture-server.js';
import { Uploads } from './pictures/uploads.js';
import { mountIiif } from './routes/iiif.js';
import { mountImages } from './routes/images.js';
import type { Mount } from './routes/mount.js';
import { mountRenditions } from './routes/renditions.js';
import { mountUploads } from './routes/uploads.js';
import { CarryAwayService } from './services/carry-away.js';
import { ImageService } from './services/images.js';
import type { ScaleService } from './services/scales.js';
import { TrayService } from './services/tray.js';

const DAY_MS = 24 * 60 * 60_000;

export interface PictureRoomOptions {
  readonly config: Config;
  readonly db: Database;
  readonly clock: Clock;
  readonly log: Logger;
  readonly images: ImageTable;
  readonly imageScales: ImageScaleTable;
  readonly users: UserTable;
  readonly jobTable: JobTable;
  readonly scales: ScaleService;
  /** work was enqueued */
  readonly nudge: () => void;
  /** left out: what large pictures need */
  readonly intakeLimits?: ChildLimits;
}

export type PictureRooms = ReturnType<typeof createPictureRooms>;

/** Pictures in and out: uploads, intake, tray, renditions, IIIF, copies to carry away. */
export function createPictureRooms(options: PictureRoomOptions) {
  const { config, db, clock, log, images, imageScales, users, jobTable, scales, nudge } = options;
  const files = new PictureFiles(config.dataDir);
  const originals = new Originals(files);
  const things = new ThingTable(db.read);
  const surroundings = new ImageSurroundingsTable(db);
  const arrivals = new Arrivals({ db, images, users, jobTable, files, originals, clock, nudge });
  const uploads = new Uploads({ files, arrivals, images, maxBytes: config.maxUploadBytes, clock, log });
  const intake = new Intake(images, files, {
    maxPixels: config.maxPixels,
    limits: options.intakeLimits ?? INTAKE_LIMITS,
  });
  const pictures = new PictureServer(files);
  const imageService = new ImageService({
    images,
    scales: imageScales,
    surroundings,
    things,
    rigs: new RigTable(db),
    clock,
  });
  const tray = new TrayService({ db, images, scales: imageScales, jobTable, clock, nudge });
  const carryAway = new CarryAwayService({ scales: imageScales, surroundings, pictures, files });
  const jobs = {
    handlers: { intake: intake.run, 'forget-files': forgetFiles(images, files, originals) },
    givenUp: { intake: intake.givenUp },
  };
  let expiry: NodeJS.Timeout | null = null;

  return {
    jobs,
    files,
    arrivals,
    images: imageService,

    mount(app: Express, mount: Mount): void {
      mountUploads(app, { uploads, maxBytes: config.maxUploadBytes, clock });
      mountImages(mount, { images: imageService, table: images, tray, scales, carryAway, files });
      mountRenditions(mount, { images, files, things, clock });
      mountIiif(mount, { images: imageService, pictures, things, clock, publicUrl: config.publicUrl });
    },

    /** Before jobs run: clears what an earlier run left half-made and takes up what had arrived. */
    async start(): Promise<void> {
      await files.clearHalfMade();
      await uploads.recover();
      await uploads.expire();
      expiry = setInterval(() => {
        uploads.expire().catch((error: unknown) => {
          log.error({ err: error }, 'old uploads could not be cleared');
        });
      }, DAY_MS);
    },

    stop(): void {
      if (expiry) clearInterval(expiry);
    },
  };
}
