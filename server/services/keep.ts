import type { JobRow, MailRow, MailView, PeopleView, PersonRow } from '../../shared/contracts/keep.js';
import type { Role } from '../../shared/permission/can.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { Job, JobTable } from '../db/jobs.js';
import type { MailTable } from '../db/mails.js';
import type { User, UserTable } from '../db/users.js';
import type { JobRunner } from '../jobs/job-runner.js';
import { Conflict, NotFound } from '../problem.js';
import type { InvitationService } from './invitations.js';

/** How many jobs the desk lists. */
const LISTED_JOBS = 200;

export interface KeepOptions {
  readonly db: Database;
  readonly users: UserTable;
  readonly invitations: InvitationService;
  readonly mails: MailTable;
  readonly jobTable: JobTable;
  readonly runner: Pick<JobRunner, 'nudge'>;
  readonly clock: Clock;
}

/** The keeper's desk: people and their roles, outgoing mail, jobs. */
export class KeepService {
  constructor(private readonly options: KeepOptions) {}

  async people(): Promise<PeopleView> {
    const [people, invitations] = await Promise.all([this.options.users.list(), this.options.invitations.open()]);
    return { people: people.map(toPersonRow), invitations };
  }

  /** @throws {Conflict} `last-keeper`: somebody must be left who can give roles */
  async changeRole(personId: string, role: Role): Promise<PersonRow> {
    const { db, users } = this.options;
    return db.write.transaction(async (trx) => {
      const person = await users.find(personId, trx);
      if (!person) throw new NotFound('person');
      if (person.role === 'keeper' && role !== 'keeper' && (await users.countOf('keeper', trx)) === 1) {
        throw new Conflict('last-keeper', 'There is no other keeper.');
      }
      await users.update(personId, { role }, trx);
      return toPersonRow({ ...person, role });
    });
  }

  mails(): Promise<MailRow[]> {
    return this.options.mails.list();
  }

  async mail(id: string): Promise<MailView> {
    const mail = await this.options.mails.view(id);
    if (!mail) throw new NotFound('mail');
    return mail;
  }

  async jobs(): Promise<JobRow[]> {
    return (await this.options.jobTable.list(LISTED_JOBS)).map(toJobRow);
  }

  /** Only what was given up can be tried again; everything else is on its way by itself. */
  async retryJob(id: string): Promise<JobRow> {
    const { jobTable, runner, clock } = this.options;
    const job = await jobTable.retry(id, instant(clock));
    if (!job) throw new NotFound('failed job');
    runner.nudge();
    return toJobRow(job);
  }
}

function toPersonRow({ id, name, email, role, createdAt, lastSeenAt }: User): PersonRow {
  return { id, name, email, role, createdAt, lastSeenAt };
}

function toJobRow({ id, kind, about, state, attempts, lastError, createdAt }: Job): JobRow {
  return { id, kind, about, state, attempts, lastError, createdAt };
}
