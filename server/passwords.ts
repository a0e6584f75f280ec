import { hash, verify } from '@node-rs/argon2';

/** argon2id (the library's default algorithm) at the costs of OWASP's password storage cheat sheet (19 MiB, 2 passes, 1 lane). */
const COSTS = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };
/** tests sign in hundreds of times */
const CHEAP = { ...COSTS, memoryCost: 1024, timeCost: 1 };

export class Passwords {
  constructor(private readonly cheap = false) {}

  hash(password: string): Promise<string> {
    return hash(password, this.cheap ? CHEAP : COSTS);
  }

  /** Takes as long for a person who does not exist (`passwordHash` null) as for one who does. */
  async matches(password: string, passwordHash: string | null): Promise<boolean> {
    const known = await verify(passwordHash ?? (await this.decoy()), password);
    return known && passwordHash !== null;
  }

  private decoyHash: Promise<string> | null = null;

  private decoy(): Promise<string> {
    this.decoyHash ??= this.hash('nobody has this password');
    return this.decoyHash;
  }
}
