import { rigRoutes } from '../../shared/contracts/rigs.js';
import { userIdOf } from '../middleware/actor.js';
import type { RigService } from '../services/rigs.js';
import type { Mount } from './mount.js';

export function mountRigs(mount: Mount, { rigs }: { rigs: RigService }): void {
  mount.route(rigRoutes.list, ({ actor }) => rigs.list(userIdOf(actor)));
  mount.route(rigRoutes.add, ({ actor, body }) => rigs.add(userIdOf(actor), body));
  mount.route(rigRoutes.read, ({ params }) => rigs.read(params['rigId'] ?? ''));
  mount.route(rigRoutes.addSetting, ({ params, body }) => rigs.addSetting(params['rigId'] ?? '', body));
  mount.route(rigRoutes.calibrate, ({ actor, params, body }) =>
    rigs.calibrate(userIdOf(actor), params['rigId'] ?? '', params['settingId'] ?? '', body),
  );
}
