import { structureOf } from '../../shared/annotations/structures.js';
import type { EditSeries, OpenSeries, SeriesView } from '../../shared/contracts/series.js';
import { type Actor, can, type FindThing } from '../../shared/permission/can.js';
import { plainName } from '../../shared/taxonomy/name.js';
import { type Clock, instant, today } from '../clock.js';
import type { Database } from '../db/database.js';
import type { DeterminationTable } from '../db/determinations.js';
import type { FindTable } from '../db/finds.js';
import type { Series, SeriesTable } from '../db/series.js';
import type { ThingTable } from '../db/things.js';
import type { SeriesFile } from '../exports/series-csv.js';
import { newId } from '../ids.js';
import { Conflict, Invalid, NotFound } from '../problem.js';

/** Repeated measurements of one structure. */
export class SeriesService {
  constructor(
    private readonly db: Database,
    private readonly series: SeriesTable,
    private readonly finds: FindTable,
    private readonly determinations: DeterminationTable,
    private readonly things: ThingTable,
    private readonly clock: Clock,
  ) {}

  /** all observers' series on the picture's preparation; none while the picture is in no find */
  async ofImage(actor: Actor, imageId: string): Promise<SeriesView[]> {
    const place = await this.series.placeOfImage(imageId);
    if (!place) return [];
    return this.views(actor, place.findId, await this.series.ofPreparation(place.findId, place.preparationId));
  }

  async ofFind(actor: Actor, findId: string): Promise<SeriesView[]> {
    return this.views(actor, findId, await this.series.ofFind(findId));
  }

  async read(actor: Actor, id: string): Promise<SeriesView> {
    return this.view(actor, await this.one(id));
  }

  /**
   * Opens the observer's series of a structure on the picture's preparation. Where it exists it is answered
   * as it is: its rules were kept with the values that are in it.
   *
   * @throws {Conflict} `no-find` while the picture is in none
   * @throws {Invalid} for a structure that is neither of the list nor named by the observer
   */
  async open(actor: Actor, observerId: string, imageId: string, input: OpenSeries): Promise<SeriesView> {
    if (!structureOf(input.structure)) {
      throw new Invalid([
        { pointer: '#/structure', code: 'no-such-structure', detail: `No structure is ${input.structure}.` },
      ]);
    }
    const series = await this.db.write.transaction(async (trx) => {
      const place = await this.series.placeOfImage(imageId, trx);
      if (!place) throw new Conflict('no-find', 'A series belongs to a find, and the picture is in none.');
      const key = { ...place, observerId, structure: input.structure };
      const existing = await this.series.withKey(key, trx);
      if (existing) return existing;
      const id = newId();
      const { edgeRule, ornamentIncluded } = input;
      await this.series.insert({ ...key, id, edgeRule, ornamentIncluded, createdAt: instant(this.clock) }, trx);
      return this.series.find(id, trx);
    });
    return this.view(actor, series as Series);
  }

  async edit(actor: Actor, id: string, change: EditSeries): Promise<SeriesView> {
    await this.series.update(id, change);
    return this.read(actor, id);
  }

  /** the series with what a file of its values says of it */
  async file(actor: Actor, id: string): Promise<SeriesFile> {
    const series = await this.one(id);
    const find = await this.finds.find(series.findId);
    if (!find) throw new NotFound('find');
    const standing = (await this.determinations.ofFind(find.id)).find(({ id: given }) => given === find.standingId);
    return {
      series: await this.view(actor, series),
      findNumber: find.number,
      name: standing ? plainName(standing.name) : null,
      medium: series.preparation?.medium ?? '',
      stain: series.preparation?.stain ?? '',
    };
  }

  private async one(id: string): Promise<Series> {
    const series = await this.series.find(id);
    if (!series) throw new NotFound('series');
    return series;
  }

  private async view(actor: Actor, series: Series): Promise<SeriesView> {
    return (await this.views(actor, series.findId, [series]))[0] as SeriesView;
  }

  private async views(actor: Actor, findId: string, all: readonly Series[]): Promise<SeriesView[]> {
    const find = await this.things.find(findId);
    if (!find) throw new NotFound('find');
    const bodies = await this.series.bodies(all.map(({ id }) => id));
    return all.map((series) => ({
      id: series.id,
      findId,
      structure: series.structure,
      preparation: series.preparation && { id: series.preparation.id, title: series.preparation.title },
      edgeRule: series.edgeRule,
      ornamentIncluded: series.ornamentIncluded,
      observer: series.observer,
      bodies: bodies.get(series.id) ?? [],
      createdAt: series.createdAt,
      mayMeasure: this.mayMeasure(actor, series, find),
    }));
  }

  private mayMeasure(actor: Actor, series: Series, find: FindThing): boolean {
    return can(actor, 'series.measure', { kind: 'series', observerId: series.observer.id, find }, today(this.clock));
  }
}
