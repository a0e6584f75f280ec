import type { FindRow, FindView } from '../../shared/contracts/finds.js';
import { type Actor, can, type FindThing } from '../../shared/permission/can.js';
import { type Clock, today } from '../clock.js';
import type { DeterminationTable } from '../db/determinations.js';
import type { Find, FindTable } from '../db/finds.js';
import type { ObservationTable } from '../db/observations.js';
import type { PublishedSizeTable } from '../db/published-sizes.js';
import { NotFound } from '../problem.js';
import type { SeriesService } from './series.js';

/** A find as one person sees it. */
export class FindViews {
  constructor(
    private readonly finds: FindTable,
    private readonly observations: ObservationTable,
    private readonly determinations: DeterminationTable,
    private readonly sizes: PublishedSizeTable,
    private readonly series: SeriesService,
    private readonly clock: Clock,
  ) {}

  async ofOwner(ownerId: string): Promise<FindRow[]> {
    return this.finds.ofOwner(ownerId);
  }

  /** The exact place, and who else reads it, are answered to those alone who may read it. */
  async read(actor: Actor, findId: string): Promise<FindView> {
    const find = await this.finds.find(findId);
    if (!find) throw new NotFound('find');
    const thing = toThing(find);
    const day = today(this.clock);
    const exact = can(actor, 'find.read-exact-place', thing, day);
    const determinations = (await this.determinations.ofFind(findId)).map((determination) => ({
      ...determination,
      stands: determination.id === find.standingId,
    }));
    return {
      id: find.id,
      number: find.number,
      owner: find.owner,
      visibility: find.visibility,
      heldUntil: find.heldUntil,
      fruitBodies: find.fruitBodies,
      publicPlace: find.publicPlace,
      exactPlace: exact ? find.exactPlace : null,
      sensitivity: find.sensitivity,
      placeReaders: exact ? [...find.placeReaders] : [],
      observations: await this.observations.ofFind(findId),
      determinations,
      standing: determinations.find((determination) => determination.stands) ?? null,
      series: await this.series.ofFind(actor, findId),
      publishedSizes: await this.sizes.ofTaxa([...new Set(determinations.map(({ taxonId }) => taxonId))]),
      may: {
        edit: can(actor, 'find.edit', thing, day),
        determine: can(actor, 'find.determine', thing, day),
        decide: can(actor, 'find.decide', thing, day),
      },
    };
  }
}

function toThing(find: Find): FindThing {
  return {
    kind: 'find',
    ownerId: find.owner.id,
    visibility: find.visibility,
    heldUntil: find.heldUntil,
    placeReaders: find.placeReaders.map((reader) => reader.id),
  };
}
