import { keepRoutes } from '../../shared/contracts/keep.js';
import { userIdOf } from '../middleware/actor.js';
import type { IntegrityService } from '../services/integrity.js';
import type { InvitationService } from '../services/invitations.js';
import type { KeepService } from '../services/keep.js';
import type { Mount } from './mount.js';

export function mountKeep(
  mount: Mount,
  services: { keep: KeepService; invitations: InvitationService; integrity: IntegrityService },
): void {
  const { keep, invitations, integrity } = services;
  mount.route(keepRoutes.people, () => keep.people());
  mount.route(keepRoutes.invite, ({ actor, body }) => invitations.invite(userIdOf(actor), body));
  mount.route(keepRoutes.withdrawInvitation, ({ params }) => invitations.withdraw(params['invitationId'] ?? ''));
  mount.route(keepRoutes.changeRole, ({ params, body }) => keep.changeRole(params['personId'] ?? '', body.role));
  mount.route(keepRoutes.mails, () => keep.mails());
  mount.route(keepRoutes.mail, ({ params }) => keep.mail(params['mailId'] ?? ''));
  mount.route(keepRoutes.jobs, () => keep.jobs());
  mount.route(keepRoutes.retryJob, ({ params }) => keep.retryJob(params['jobId'] ?? ''));
  mount.route(keepRoutes.checkIntegrity, () => integrity.check());
}
