import type { Knex } from 'knex';
import type {
  AddObservation,
  EditFind,
  EditObservation,
  NewFind,
  NewPreparation,
  PlaceInput,
} from '../../shared/contracts/finds.js';
import type { Visibility } from '../../shared/permission/can.js';
import { generalise } from '../../shared/place/generalise.js';
import { type Clock, instant, today } from '../clock.js';
import type { Database } from '../db/database.js';
import type { Find, FindChange, FindTable } from '../db/finds.js';
import type { ObservationTable } from '../db/observations.js';
import { newId } from '../ids.js';
import { Invalid, NotFound } from '../problem.js';

/** Making finds of the tray's pictures, and what is said of them. */
export class FindService {
  constructor(
    private readonly db: Database,
    private readonly finds: FindTable,
    private readonly observations: ObservationTable,
    private readonly prefix: string,
    private readonly clock: Clock,
  ) {}

  /**
   * @returns the new find's id
   * @throws {Invalid} pictures that are not the person's own, not ready, or in a find already; half of a pair of
   *   coordinates; a hold without a day to come
   */
  async make(ownerId: string, input: NewFind): Promise<string> {
    const id = newId();
    await this.db.write.transaction(async (trx) => {
      await this.finds.insert(
        {
          id,
          ownerId,
          prefix: this.prefix,
          number: await this.finds.nextNumber(trx),
          fruitBodies: 1,
          createdAt: instant(this.clock),
          ...placeOf(input.place),
          ...this.visibilityOf(input.visibility, input.heldUntil),
        },
        trx,
      );
      await this.insertObservation(id, ownerId, { ...input.observation, imageIds: input.imageIds }, trx);
    });
    return id;
  }

  /** @throws {Invalid} as `make` does for place and visibility */
  async edit(findId: string, change: EditFind): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      const find = await this.one(findId, trx);
      const says = change.visibility !== undefined || change.heldUntil !== undefined;
      await this.finds.update(
        findId,
        {
          ...(change.place !== undefined && placeOf(change.place)),
          ...(says &&
            this.visibilityOf(
              change.visibility ?? find.visibility,
              change.heldUntil === undefined ? find.heldUntil : change.heldUntil,
            )),
          ...(change.fruitBodies !== undefined && { fruitBodies: change.fruitBodies }),
        },
        trx,
      );
    });
  }

  /** @throws {Invalid} pictures that can't be put into it, as `make` does */
  async addObservation(findId: string, observerId: string, input: AddObservation): Promise<void> {
    await this.db.write.transaction((trx) => this.insertObservation(findId, observerId, input, trx));
  }

  /** @throws {NotFound} also for an observation of another find */
  async editObservation(findId: string, observationId: string, change: EditObservation): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      if ((await this.observations.findOf(observationId, trx)) !== findId) throw new NotFound('observation');
      await this.observations.update(observationId, change, trx);
    });
  }

  /** @throws {Invalid} an observation of another find; pictures that are not of that observation */
  async addPreparation(findId: string, ownerId: string, input: NewPreparation): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      if ((await this.observations.findOf(input.observationId, trx)) !== findId) {
        throw new Invalid([
          { pointer: '#/observationId', code: 'not-of-this-find', detail: 'The find has no such observation.' },
        ]);
      }
      const id = newId();
      await this.observations.insertPreparation({ ...input, id, createdAt: instant(this.clock) }, trx);
      const imageIds = [...new Set(input.imageIds)];
      const put = await this.observations.putUnder(imageIds, ownerId, { id, observationId: input.observationId }, trx);
      if (put !== imageIds.length) throw pictures('not-of-this-observation', 'Takes pictures of its observation.');
    });
  }

  private async one(findId: string, trx: Knex.Transaction): Promise<Find> {
    const find = await this.finds.find(findId, trx);
    if (!find) throw new NotFound('find');
    return find;
  }

  private async insertObservation(
    findId: string,
    observerId: string,
    input: AddObservation,
    trx: Knex.Transaction,
  ): Promise<void> {
    const { imageIds, ...observation } = input;
    const id = newId();
    await this.observations.insert({ ...observation, id, findId, observerId, createdAt: instant(this.clock) }, trx);
    const wanted = [...new Set(imageIds)];
    const taken = await this.observations.takeFromTray(wanted, observerId, id, trx);
    if (taken !== wanted.length)
      throw pictures('not-in-your-tray', 'Takes own pictures that are ready and in no find.');
  }

  /** @throws {Invalid} a hold without a day to come */
  private visibilityOf(
    visibility: Visibility,
    heldUntil: string | null,
  ): Required<Pick<FindChange, 'visibility' | 'heldUntil'>> {
    if (visibility !== 'held') return { visibility, heldUntil: null };
    if (heldUntil === null || heldUntil <= today(this.clock)) {
      throw new Invalid([
        { pointer: '#/heldUntil', code: 'not-in-the-future', detail: 'Held until a day that is to come.' },
      ]);
    }
    return { visibility, heldUntil };
  }
}

function pictures(code: string, detail: string): Invalid {
  return new Invalid([{ pointer: '#/imageIds', code, detail }]);
}

/** @throws {Invalid} half of a pair of coordinates */
function placeOf({
  exact,
  publicWords,
  sensitivity,
}: PlaceInput): Required<Pick<FindChange, 'exactPlace' | 'publicPlace' | 'sensitivity'>> {
  if ((exact.latitude === null) !== (exact.longitude === null)) {
    const missing = exact.latitude === null ? 'latitude' : 'longitude';
    throw new Invalid([
      { pointer: `#/place/exact/${missing}`, code: 'half-a-coordinate', detail: 'Give both coordinates or none.' },
    ]);
  }
  return { exactPlace: exact, sensitivity, publicPlace: { words: publicWords, ...generalise(exact, sensitivity) } };
}
