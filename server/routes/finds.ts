import { findRoutes } from '../../shared/contracts/finds.js';
import { userIdOf } from '../middleware/actor.js';
import type { DeterminationService } from '../services/determinations.js';
import type { FindViews } from '../services/find-views.js';
import type { FindService } from '../services/finds.js';
import type { Mount } from './mount.js';

/** Each change answers with the find as its maker now sees it. */
export function mountFinds(
  mount: Mount,
  { finds, views, determinations }: { finds: FindService; views: FindViews; determinations: DeterminationService },
): void {
  const idOf = (params: Readonly<Record<string, string>>): string => params['findId'] ?? '';

  mount.route(findRoutes.mine, ({ actor }) => views.ofOwner(userIdOf(actor)));

  mount.route(findRoutes.make, async ({ actor, body }) => views.read(actor, await finds.make(userIdOf(actor), body)));

  mount.route(findRoutes.read, ({ actor, params }) => views.read(actor, idOf(params)));

  mount.route(findRoutes.edit, async ({ actor, params, body }) => {
    await finds.edit(idOf(params), body);
    return views.read(actor, idOf(params));
  });

  mount.route(findRoutes.addObservation, async ({ actor, params, body }) => {
    await finds.addObservation(idOf(params), userIdOf(actor), body);
    return views.read(actor, idOf(params));
  });

  mount.route(findRoutes.editObservation, async ({ actor, params, body }) => {
    await finds.editObservation(idOf(params), params['observationId'] ?? '', body);
    return views.read(actor, idOf(params));
  });

  mount.route(findRoutes.addPreparation, async ({ actor, params, body }) => {
    await finds.addPreparation(idOf(params), userIdOf(actor), body);
    return views.read(actor, idOf(params));
  });

  mount.route(findRoutes.determine, async ({ actor, params, body }) => {
    await determinations.give(idOf(params), userIdOf(actor), body);
    return views.read(actor, idOf(params));
  });

  mount.route(findRoutes.decide, async ({ actor, params }) => {
    await determinations.decide(idOf(params), params['determinationId'] ?? '');
    return views.read(actor, idOf(params));
  });
}
