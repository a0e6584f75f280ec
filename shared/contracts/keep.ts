import * as z from 'zod/mini';
import { Email, Id } from './common.js';
import { defineRoutes } from './route.js';
import { Role } from './session.js';

/** The keeper's desk: people, outgoing mail, jobs, integrity of originals. */

export const PersonRow = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  role: Role,
  createdAt: z.string(),
  lastSeenAt: z.nullable(z.string()),
});
export type PersonRow = z.infer<typeof PersonRow>;
export const InvitationRow = z.strictObject({ id: Id, email: z.string(), role: Role, expiresAt: z.string() });
export type InvitationRow = z.infer<typeof InvitationRow>;
export const PeopleView = z.strictObject({ people: z.array(PersonRow), invitations: z.array(InvitationRow) });
export type PeopleView = z.infer<typeof PeopleView>;

export const Invite = z.strictObject({ email: Email, role: Role });
export type Invite = z.infer<typeof Invite>;
export const ChangeRole = z.strictObject({ role: Role });
export type ChangeRole = z.infer<typeof ChangeRole>;

export const MailRow = z.strictObject({
  id: Id,
  to: z.string(),
  subject: z.string(),
  createdAt: z.string(),
  sentAt: z.nullable(z.string()),
  lastError: z.nullable(z.string()),
});
export const MailView = z.strictObject({ ...MailRow.shape, text: z.string() });
export type MailRow = z.infer<typeof MailRow>;
export type MailView = z.infer<typeof MailView>;

export const JobRow = z.strictObject({
  id: Id,
  kind: z.string(),
  about: z.string(),
  state: z.enum(['waiting', 'working', 'done', 'failed']),
  attempts: z.number(),
  lastError: z.nullable(z.string()),
  createdAt: z.string(),
});
export type JobRow = z.infer<typeof JobRow>;

/** Every original is read and its SHA-256 compared; what differs or is missing is named. */
export const IntegrityView = z.strictObject({
  checkedAt: z.string(),
  originals: z.number(),
  bytes: z.number(),
  faults: z.array(z.strictObject({ imageId: Id, name: z.string(), fault: z.enum(['missing', 'changed']) })),
});
export type IntegrityView = z.infer<typeof IntegrityView>;

const keeper = { on: 'site', param: null, action: 'site.keep' } as const;
export const keepRoutes = defineRoutes({
  people: { method: 'get', path: '/api/keep/people', ...keeper, response: PeopleView },
  invite: { method: 'post', path: '/api/keep/invitations', ...keeper, body: Invite, response: InvitationRow },
  withdrawInvitation: { method: 'delete', path: '/api/keep/invitations/:invitationId', ...keeper },
  changeRole: { method: 'patch', path: '/api/keep/people/:personId', ...keeper, body: ChangeRole, response: PersonRow },
  mails: { method: 'get', path: '/api/keep/mails', ...keeper, response: z.array(MailRow) },
  mail: { method: 'get', path: '/api/keep/mails/:mailId', ...keeper, response: MailView },
  jobs: { method: 'get', path: '/api/keep/jobs', ...keeper, response: z.array(JobRow) },
  retryJob: { method: 'post', path: '/api/keep/jobs/:jobId/retry', ...keeper, response: JobRow },
  checkIntegrity: { method: 'post', path: '/api/keep/integrity', ...keeper, response: IntegrityView },
});
