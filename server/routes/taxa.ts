import { taxonRoutes } from '../../shared/contracts/taxa.js';
import { userIdOf } from '../middleware/actor.js';
import type { TaxonService } from '../services/taxa.js';
import type { Mount } from './mount.js';

export function mountTaxa(mount: Mount, { taxa }: { taxa: TaxonService }): void {
  mount.route(taxonRoutes.names, () => taxa.names());
  mount.route(taxonRoutes.read, ({ params }) => taxa.read(params['taxonId'] ?? ''));
  mount.route(taxonRoutes.add, ({ actor, body }) => taxa.add(userIdOf(actor), body));
}
