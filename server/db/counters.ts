import type { Database } from './database.js';

/** Small named numbers that count upwards. */
export class CounterTable {
  constructor(private readonly db: Database) {}

  async read(name: 'public-revision'): Promise<number> {
    const row = await this.db.read<{ name: string; value: number }>('counters').where({ name }).first();
    return row?.value ?? 0;
  }
}
