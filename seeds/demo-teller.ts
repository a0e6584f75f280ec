import { join } from 'node:path';
import type { App } from '../server/app.js';
import type { Database } from '../server/db/database.js';
import { newId } from '../server/ids.js';
import type { Note } from '../shared/annotations/note.js';
import type { FindView, NewDetermination, NewFind, NewPreparation } from '../shared/contracts/finds.js';
import type { EditImage } from '../shared/contracts/images.js';
import type { OpenSeries } from '../shared/contracts/series.js';
import type { Actor, Role } from '../shared/permission/can.js';
import type { NoteGeometry } from '../shared/annotations/note.js';
import type { DemoClock } from './demo-clock.js';
import type { TruePicture } from './pictures/truth.js';

export interface DemoParts {
  readonly app: App;
  readonly db: Database;
  readonly clock: DemoClock;
  /** ids by role: the demo has one person of each */
  readonly people: Readonly<Record<Role, string>>;
  readonly truth: Readonly<Record<string, TruePicture>>;
  /** folder of the rendered pictures */
  readonly pictures: string;
}

/** Does what the demo's people do, in short words, through the services that the routes use. */
export class DemoTeller {
  readonly clock: DemoClock;
  readonly people: DemoParts['people'];
  readonly rooms: App['rooms'];

  constructor(private readonly parts: DemoParts) {
    this.clock = parts.clock;
    this.people = parts.people;
    this.rooms = parts.app.rooms;
  }

  /** @throws {Error} when there is no such rendered picture */
  truth(file: string): TruePicture {
    const picture = this.parts.truth[file];
    if (!picture) throw new Error(`seeds/pictures/truth.json says nothing of ${file}.`);
    return picture;
  }

  /**
   * Uploads pictures and waits until they are taken in.
   * @param files rendered file by the name that its camera gave it
   * @returns ids in the order of the files
   */
  async upload(ownerId: string, files: readonly (readonly [file: string, name: string])[]): Promise<string[]> {
    const ids: string[] = [];
    for (const [file, name] of files) {
      ids.push(await this.parts.app.bringIn({ file: join(this.parts.pictures, file), name, ownerId }));
    }
    await this.parts.app.jobs.drain();
    for (const id of ids) await this.rooms.images.ready(id); // says which one was not taken in, and why not
    return ids;
  }

  describe(imageId: string, said: EditImage): Promise<void> {
    return this.rooms.images.edit(imageId, said);
  }

  make(ownerId: string, find: NewFind): Promise<string> {
    return this.rooms.finds.make(ownerId, find);
  }

  find(role: Role, findId: string): Promise<FindView> {
    return this.rooms.views.read(this.actor(role), findId);
  }

  /** a preparation of the find's newest observation */
  async prepare(role: Role, findId: string, preparation: Omit<NewPreparation, 'observationId'>): Promise<void> {
    const observation = (await this.find(role, findId)).observations.at(-1);
    if (!observation) throw new Error('A preparation needs an observation.');
    await this.rooms.finds.addPreparation(findId, this.people[role], { ...preparation, observationId: observation.id });
  }

  /** @returns the determination's id */
  async name(role: Role, findId: string, taxon: string, given: Omit<NewDetermination, 'taxonId'>): Promise<string> {
    const row = (await this.parts.db.read('taxa').where({ name: taxon }).first('id')) as { id: string } | undefined;
    if (!row) throw new Error(`The demo's list holds no ${taxon}.`);
    await this.rooms.determinations.give(findId, this.people[role], { ...given, taxonId: row.id });
    return ((await this.find(role, findId)).determinations[0] as { id: string }).id;
  }

  /** one body after the other, each an edit of its own, as they are drawn at the bench */
  async measure(
    role: Role,
    imageId: string,
    series: OpenSeries,
    drawn: readonly (NoteGeometry | null)[],
  ): Promise<void> {
    const layer = this.people[role];
    const { id: seriesId } = await this.rooms.series.open(this.actor(role), layer, imageId, series);
    const bodies = drawn.filter((geometry) => geometry !== null);
    await this.push(
      layer,
      imageId,
      bodies.map((geometry) => ({ kind: 'measure', seriesId, geometry, text: '' })),
    );
  }

  async point(
    role: Role,
    imageId: string,
    at: { x: number; y: number },
    label: { x: number; y: number },
    text: string,
  ): Promise<void> {
    await this.push(this.people[role], imageId, [
      { kind: 'point', seriesId: null, geometry: { type: 'pointer', at, label }, text },
    ]);
  }

  actor(role: Role): Actor {
    return { kind: 'user', id: this.people[role], role };
  }

  private async push(
    layer: string,
    imageId: string,
    notes: readonly Pick<Note, 'kind' | 'seriesId' | 'geometry' | 'text'>[],
  ): Promise<void> {
    if (notes.length === 0) return;
    const edits = notes.map((said) => {
      const note = { ...said, id: newId(), imageId, layer };
      return { id: newId(), noteId: note.id, before: null, after: note };
    });
    await this.rooms.notes.push(layer, imageId, { edits } as Parameters<App['rooms']['notes']['push']>[2]);
  }
}
