import type { Database } from './database.js';

/** A picture and the original that it must have. */
export interface KeptOriginal {
  readonly imageId: string;
  /** as the file was called when it came in */
  readonly name: string;
  /** SHA-256 of the bytes as they came in, hexadecimal */
  readonly sha256: string;
}

/** Which originals must be there: those of all pictures, refused ones too until they are taken out of the tray. */
export class KeptOriginals {
  constructor(private readonly db: Database) {}

  async list(): Promise<KeptOriginal[]> {
    const rows = await this.db
      .read<{ id: string; original_name: string; sha256: string }>('images')
      .select('id', 'original_name', 'sha256')
      .orderBy('id');
    return rows.map((row) => ({ imageId: row.id, name: row.original_name, sha256: row.sha256 }));
  }
}
