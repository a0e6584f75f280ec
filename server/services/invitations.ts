import type { Invite, InvitationRow } from '../../shared/contracts/keep.js';
import type { AcceptInvitation, InvitationView } from '../../shared/contracts/session.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { Invitation, TokenTable } from '../db/tokens.js';
import type { User, UserTable } from '../db/users.js';
import { newId } from '../ids.js';
import { invitation as invitationMail } from '../mail/messages.js';
import type { Postbox } from '../mail/postbox.js';
import type { Passwords } from '../passwords.js';
import { Conflict, Invalid, NotFound } from '../problem.js';
import { hashOf, newToken } from '../tokens.js';
import { linkLapsed } from './password-resets.js';

export const INVITATION_LASTS_MS = 7 * 24 * 60 * 60 * 1000;

export interface InvitationOptions {
  readonly db: Database;
  readonly users: UserTable;
  readonly tokens: TokenTable;
  readonly postbox: Postbox;
  readonly passwords: Passwords;
  readonly clock: Clock;
  readonly publicUrl: string;
}

/** How people come in: invited by the keeper, or, on an empty database, by whoever started the server. */
export class InvitationService {
  constructor(private readonly options: InvitationOptions) {}

  /**
   * Replaces an earlier invitation to the same address.
   *
   * @throws {Conflict} `email-taken`
   */
  async invite(keeperId: string, { email, role }: Invite): Promise<InvitationRow> {
    const { db, users, tokens, postbox } = this.options;
    const { invitation, hash, url } = this.prepare(email, role, keeperId);
    const by = (await users.find(keeperId))?.name ?? 'The keeper';
    await db.write.transaction(async (trx) => {
      if (await users.findByEmail(email, trx)) throw emailTaken();
      await tokens.dropInvitations(email, trx);
      await tokens.insertInvitation(invitation, hash, trx);
      await postbox.post(trx, email, invitationMail({ by, role, url, expiresAt: invitation.expiresAt }));
    });
    return { id: invitation.id, email, role, expiresAt: invitation.expiresAt };
  }

  async open(): Promise<InvitationRow[]> {
    const { tokens, clock } = this.options;
    return (await tokens.openInvitations(instant(clock))).map(({ id, email, role, expiresAt }) => ({
      id,
      email: email ?? '',
      role,
      expiresAt,
    }));
  }

  async withdraw(id: string): Promise<void> {
    if (!(await this.options.tokens.withdrawInvitation(id))) throw new NotFound('invitation');
  }

  /** @throws {HttpProblem} 404 `link-lapsed` */
  async read(token: string): Promise<InvitationView> {
    const { users } = this.options;
    const invitation = await this.known(token);
    const by = invitation.madeBy === null ? null : await users.find(invitation.madeBy);
    const { email, role, expiresAt } = invitation;
    return { email, role, expiresAt, invitedBy: by?.name ?? '' };
  }

  /**
   * Makes the person.
   *
   * @throws {HttpProblem} 404 `link-lapsed`
   * @throws {Conflict} `email-taken`, when an account was made for the address meanwhile
   */
  async accept({ token, name, password, email: stated }: AcceptInvitation): Promise<User> {
    const { db, users, tokens, passwords, clock } = this.options;
    const now = instant(clock);
    const invitation = await this.known(token);
    const email = invitation.email ?? stated;
    if (email === undefined) {
      throw new Invalid([{ pointer: '#/email', code: 'invalid_type', detail: 'This invitation names no address.' }]);
    }
    const person = newPerson({ name, email, role: invitation.role, createdAt: now });
    const passwordHash = await passwords.hash(password); // slow on purpose: not inside the transaction
    await db.write.transaction(async (trx) => {
      if (!(await tokens.use(invitation.id, now, trx))) throw linkLapsed();
      if (await users.findByEmail(email, trx)) throw emailTaken();
      await users.insert({ ...person, passwordHash }, trx);
    });
    return person;
  }

  /**
   * A server without people and without the demo would be shut for ever: nobody could sign in to invite anybody.
   * While that is so, each start makes one invitation to be its first keeper, for whoever can read what the
   * server prints. It replaces the one of an earlier start.
   *
   * @returns the link, or null when there are people
   */
  async forFirstKeeper(): Promise<string | null> {
    const { db, users, tokens } = this.options;
    if (!(await users.isEmpty())) return null;
    const { invitation, hash, url } = this.prepare(null, 'keeper', null);
    await db.write.transaction(async (trx) => {
      await tokens.dropInvitations(null, trx);
      await tokens.insertInvitation(invitation, hash, trx);
    });
    return url;
  }

  /** The first keeper's invitation ends as soon as there is anybody. */
  private async known(token: string): Promise<Invitation> {
    const { users, tokens, clock } = this.options;
    const invitation = await tokens.openInvitation(hashOf(token), instant(clock));
    if (!invitation || (invitation.email === null && !(await users.isEmpty()))) throw linkLapsed();
    return invitation;
  }

  private prepare(email: string | null, role: Invitation['role'], madeBy: string | null) {
    const { clock, publicUrl } = this.options;
    const { token, hash } = newToken();
    const expiresAt = new Date(clock.now().getTime() + INVITATION_LASTS_MS).toISOString();
    const invitation: Invitation = { id: newId(), email, role, madeBy, createdAt: instant(clock), expiresAt };
    return { invitation, hash, url: `${publicUrl}/invitation/${token}` };
  }
}

/** A new person gives nothing away until they say so: all rights kept, credited by name. */
function newPerson(given: Pick<User, 'name' | 'email' | 'role' | 'createdAt'>): User {
  return {
    ...given,
    id: newId(),
    creditLine: given.name,
    defaultLicence: 'all-rights-reserved',
    fingertipMm: null,
    portrait: null,
    lastSeenAt: null,
  };
}

function emailTaken(): Conflict {
  return new Conflict('email-taken', 'Somebody with this address has an account.');
}
