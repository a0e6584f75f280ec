import * as z from 'zod/mini';
import { ROLES } from '../permission/can.js';
import { Email, Id, Licence, line, Password } from './common.js';
import { defineRoutes } from './route.js';

export const Role = z.enum(ROLES);

/** The person signed in, as they see themselves. */
export const Me = z.strictObject({
  id: Id,
  email: z.string(),
  name: z.string(),
  role: Role,
  creditLine: z.string(),
  defaultLicence: Licence,
  /** own fingertip breadth at the last joint, mm; null while not measured */
  fingertipMm: z.nullable(z.number()),
  portraitUrl: z.nullable(z.string()),
});
export type Me = z.infer<typeof Me>;

/** `demo` lists the demo's people and their sign-in, only while the demo is on. */
export const Session = z.strictObject({
  user: z.nullable(Me),
  demo: z.array(z.strictObject({ name: z.string(), role: Role, email: z.string(), password: z.string() })),
});
export type Session = z.infer<typeof Session>;

export const SignIn = z.strictObject({ email: Email, password: z.string().check(z.minLength(1), z.maxLength(200)) });
export type SignIn = z.infer<typeof SignIn>;

export const Profile = z.strictObject({
  name: line(80),
  creditLine: line(120),
  defaultLicence: Licence,
  /** between 8 and 35 mm, measured with a ruler; null to use the cautious default */
  fingertipMm: z.nullable(z.number().check(z.minimum(8), z.maximum(35))),
});
export type Profile = z.infer<typeof Profile>;

export const AskPasswordReset = z.strictObject({ email: Email });
export type AskPasswordReset = z.infer<typeof AskPasswordReset>;
export const ResetPassword = z.strictObject({ token: line(200), password: Password });
export type ResetPassword = z.infer<typeof ResetPassword>;

/** `email` null: the first keeper's invitation, printed where the server was started; whoever takes it says theirs. */
export const InvitationView = z.strictObject({
  email: z.nullable(z.string()),
  role: Role,
  invitedBy: z.string(),
  expiresAt: z.string(),
});
export type InvitationView = z.infer<typeof InvitationView>;
/** `email` only where the invitation names none; otherwise it is left out, and ignored. */
export const AcceptInvitation = z.strictObject({
  token: line(200),
  name: line(80),
  password: Password,
  email: z.optional(Email),
});
export type AcceptInvitation = z.infer<typeof AcceptInvitation>;

export const sessionRoutes = defineRoutes({
  read: { method: 'get', path: '/api/session', on: 'site', param: null, action: 'site.read', response: Session },
  signIn: {
    method: 'post',
    path: '/api/session',
    on: 'site',
    param: null,
    action: 'site.sign-in',
    body: SignIn,
    response: Session,
  },
  signOut: { method: 'delete', path: '/api/session', on: 'site', param: null, action: 'site.sign-in' },
  askReset: {
    method: 'post',
    path: '/api/password-resets',
    on: 'site',
    param: null,
    action: 'site.sign-in',
    body: AskPasswordReset,
  },
  reset: {
    method: 'put',
    path: '/api/password-resets',
    on: 'site',
    param: null,
    action: 'site.sign-in',
    body: ResetPassword,
  },
  readInvitation: {
    method: 'get',
    path: '/api/invitations/:token',
    on: 'site',
    param: null,
    action: 'site.sign-in',
    response: InvitationView,
  },
  accept: {
    method: 'post',
    path: '/api/invitations/accept',
    on: 'site',
    param: null,
    action: 'site.sign-in',
    body: AcceptInvitation,
    response: Session,
  },
  saveProfile: {
    method: 'put',
    path: '/api/me',
    on: 'site',
    param: null,
    action: 'site.contribute',
    body: Profile,
    response: Me,
  },
  /** multipart form with one file `portrait` */
  savePortrait: {
    method: 'put',
    path: '/api/me/portrait',
    on: 'site',
    param: null,
    action: 'site.contribute',
    response: Me,
  },
});
