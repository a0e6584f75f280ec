import type { NewDetermination } from '../../shared/contracts/finds.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { DeterminationTable } from '../db/determinations.js';
import type { FindTable } from '../db/finds.js';
import type { TaxonTable } from '../db/taxa.js';
import { newId } from '../ids.js';
import { Invalid, NotFound } from '../problem.js';

/** Names given to finds, and which of them stands. */
export class DeterminationService {
  constructor(
    private readonly db: Database,
    private readonly finds: FindTable,
    private readonly determinations: DeterminationTable,
    private readonly taxa: TaxonTable,
    private readonly clock: Clock,
  ) {}

  /**
   * Adds a name to the find's history. The finder's own stands at once where none does; one that stands is
   * replaced only by the finder's deciding so, whoever gave the new one.
   *
   * @throws {Invalid} `no-such-taxon`
   */
  async give(findId: string, byId: string, input: NewDetermination): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      const find = await this.finds.find(findId, trx);
      if (!find) throw new NotFound('find');
      const taxon = await this.taxa.find(input.taxonId, trx);
      if (!taxon) throw new Invalid([{ pointer: '#/taxonId', code: 'no-such-taxon', detail: 'No taxon has this id.' }]);
      const id = newId();
      await this.determinations.insert({ ...input, id, findId, byId, determinedAt: instant(this.clock), taxon }, trx);
      if (find.standingId === null && find.owner.id === byId) await this.finds.setStanding(findId, id, trx);
    });
  }

  /** @throws {NotFound} also for a determination of another find */
  async decide(findId: string, determinationId: string): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      if (!(await this.determinations.belongs(determinationId, findId, trx))) throw new NotFound('determination');
      await this.finds.setStanding(findId, determinationId, trx);
    });
  }
}
