import { mkdirSync, rmSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import PQueue from 'p-queue';
import type { Me } from '../../shared/contracts/session.js';
import type { UserTable } from '../db/users.js';
import { newId } from '../ids.js';
import { makePortrait } from '../pictures/make-portrait.js';
import { Refused } from '../pictures/refusal.js';
import { HttpProblem, NotFound } from '../problem.js';
import { toMe } from './people.js';

/** Everybody's portrait, in the data folder's `portraits/`. */
export class PortraitService {
  readonly folder: string;
  /** where forms are received; emptied at each start */
  readonly incoming: string;
  /** decoding takes a process each: one at a time is enough for portraits */
  private readonly queue = new PQueue({ concurrency: 1 });

  constructor(
    dataDir: string,
    private readonly users: UserTable,
  ) {
    this.folder = join(dataDir, 'portraits');
    this.incoming = join(this.folder, 'incoming');
    rmSync(this.incoming, { recursive: true, force: true });
    mkdirSync(this.incoming, { recursive: true });
  }

  /**
   * Replaces a person's portrait by what is in this file, and takes the file away. The new one has a new name, so
   * that browsers may keep portraits for ever.
   *
   * @throws {HttpProblem} 415 or 422 with the refusal's code
   */
  async save(userId: string, received: string, signal: AbortSignal): Promise<Me> {
    const name = `${newId()}.webp`;
    const target = join(this.folder, name);
    try {
      await this.queue.add(() => makePortrait(received, target, signal), { signal });
      return await this.replace(userId, name);
    } catch (error) {
      await rm(target, { force: true });
      throw error instanceof Refused ? refusal(error) : error;
    } finally {
      await rm(received, { force: true });
    }
  }

  private async replace(userId: string, name: string): Promise<Me> {
    const user = await this.users.find(userId);
    if (!user) throw new NotFound('person');
    await this.users.update(userId, { portrait: name });
    if (user.portrait !== null) await rm(join(this.folder, user.portrait), { force: true });
    return toMe({ ...user, portrait: name });
  }
}

function refusal({ code, parameters, message }: Refused): HttpProblem {
  return new HttpProblem(code === 'type-not-accepted' ? 415 : 422, code, message, parameters);
}
