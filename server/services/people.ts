import type { Me, Session } from '../../shared/contracts/session.js';
import { DEMO_PEOPLE } from '../demo.js';
import type { User, UserTable } from '../db/users.js';

/** Who people are: to themselves and to others. */
export class PeopleService {
  constructor(
    private readonly users: UserTable,
    private readonly demo: boolean,
  ) {}

  async session(userId: string | null): Promise<Session> {
    const user = userId === null ? null : await this.users.find(userId);
    return { user: user && toMe(user), demo: this.demo ? [...DEMO_PEOPLE] : [] };
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
