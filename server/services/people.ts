import type { Me, Profile, Session } from '../../shared/contracts/session.js';
import { type Clock, instant, today } from '../clock.js';
import { DEMO_PEOPLE } from '../demo.js';
import type { User, UserTable } from '../db/users.js';
import { NotFound } from '../problem.js';

/** Who people are: to themselves and to others. */
export class PeopleService {
  constructor(
    private readonly users: UserTable,
    private readonly demo: boolean,
    private readonly clock: Clock,
  ) {}

  async session(userId: string | null): Promise<Session> {
    const user = userId === null ? null : await this.users.find(userId);
    return { user: user && toMe(user), demo: this.demo ? await this.demoPeople() : [] };
  }

  async saveProfile(userId: string, profile: Profile): Promise<Me> {
    await this.users.update(userId, profile);
    return this.me(userId);
  }

  /** Notes that somebody was here, once a day: looking at pages must not write at each request. */
  async seen(user: Pick<User, 'id' | 'lastSeenAt'>): Promise<void> {
    const day = today(this.clock);
    if (user.lastSeenAt !== null && user.lastSeenAt.slice(0, 10) >= day) return;
    await this.users.seen(user.id, instant(this.clock), day);
  }

  /** The demo is on by default, also over a data folder that people of its own have filled: it has none of these. */
  private async demoPeople(): Promise<Session['demo']> {
    const here = await this.users.emailsAmong(DEMO_PEOPLE.map(({ email }) => email));
    return DEMO_PEOPLE.filter(({ email }) => here.has(email));
  }

  private async me(userId: string): Promise<Me> {
    const user = await this.users.find(userId);
    if (!user) throw new NotFound('person');
    return toMe(user);
  }
}

export function toMe(user: User): Me {
  return {
    id: user.id,
    email: user.email,
    name: user.name,
    role: user.role,
    creditLine: user.creditLine,
    defaultLicence: user.defaultLicence,
    fingertipMm: user.fingertipMm,
    portraitUrl: user.portrait === null ? null : `/portraits/${user.portrait}`,
  };
}
