import type { Clock } from './clock.js';
import { CalibrationTable } from './db/calibrations.js';
import type { Database } from './db/database.js';
import { DeterminationTable } from './db/determinations.js';
import { EvidenceTable } from './db/evidence.js';
import { FindTable } from './db/finds.js';
import { GalleryTable } from './db/gallery.js';
import { NoteTable } from './db/notes.js';
import { ObservationTable } from './db/observations.js';
import { PublishedSizeTable } from './db/published-sizes.js';
import { RigTable } from './db/rigs.js';
import { SqliteGallerySearch } from './db/search.js';
import { SeriesTable } from './db/series.js';
import { TaxonTable } from './db/taxa.js';
import { ThingTable } from './db/things.js';
import { mountFinds } from './routes/finds.js';
import { mountGallery } from './routes/gallery.js';
import type { Mount } from './routes/mount.js';
import { mountNotes } from './routes/notes.js';
import { mountRigs } from './routes/rigs.js';
import { mountSeries } from './routes/series.js';
import { mountTaxa } from './routes/taxa.js';
import { DeterminationService } from './services/determinations.js';
import { FindViews } from './services/find-views.js';
import { FindService } from './services/finds.js';
import { GalleryService } from './services/gallery.js';
import type { MeasurementService } from './services/measurements.js';
import { NoteService } from './services/notes.js';
import { type ApplyCalibration, RigService } from './services/rigs.js';
import { SeriesService } from './services/series.js';
import { TaxonService } from './services/taxa.js';

export interface FindRooms {
  readonly rigs: RigService;
  readonly finds: FindService;
  readonly views: FindViews;
  readonly determinations: DeterminationService;
  readonly taxa: TaxonService;
  readonly notes: NoteService;
  readonly series: SeriesService;
  readonly gallery: GalleryService;
}

/** The part of the composition root that is about finds: their names, what is measured on them, the gallery. */
export function createFindRooms(parts: {
  readonly db: Database;
  readonly clock: Clock;
  readonly findPrefix: string;
  readonly measurements: MeasurementService;
  readonly applyCalibration: ApplyCalibration;
}): FindRooms {
  const { db, clock, findPrefix, measurements, applyCalibration } = parts;
  const findTable = new FindTable(db);
  const observations = new ObservationTable(db);
  const determinationTable = new DeterminationTable(db);
  const taxonTable = new TaxonTable(db);
  const sizes = new PublishedSizeTable(db);
  const seriesTable = new SeriesTable(db);

  const gallery = new GalleryService(new SqliteGallerySearch(db), new GalleryTable(db), clock);
  const series = new SeriesService(db, seriesTable, findTable, determinationTable, new ThingTable(db.read), clock);
  return {
    gallery,
    series,
    rigs: new RigService(db, new RigTable(db), new CalibrationTable(db), new EvidenceTable(), applyCalibration, clock),
    finds: new FindService(db, findTable, observations, findPrefix, clock),
    views: new FindViews(findTable, observations, determinationTable, sizes, series, clock),
    determinations: new DeterminationService(db, findTable, determinationTable, taxonTable, clock),
    taxa: new TaxonService(db, taxonTable, sizes, gallery, clock),
    notes: new NoteService(db, new NoteTable(db), seriesTable, measurements, clock),
  };
}

export function mountFindRooms(mount: Mount, rooms: FindRooms): void {
  mountFinds(mount, rooms);
  mountTaxa(mount, rooms);
  mountGallery(mount, rooms);
  mountRigs(mount, rooms);
  mountNotes(mount, rooms);
  mountSeries(mount, rooms);
}
