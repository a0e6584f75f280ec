import type { Thing, Visibility } from '../../shared/permission/can.js';
import type { TestApp } from './app.js';
import type { Ids } from './route-examples.js';
import { World } from './world.js';

/** A thing as the permission sees it, beside the ids under which it lies in the database. */
export interface NamedThing {
  readonly name: string;
  readonly thing: Thing;
  readonly ids: Ids;
}

interface Seen {
  readonly name: string;
  readonly visibility: Visibility;
  readonly heldUntil: string | null;
}

/** A well-formed id of nothing. */
const NOTHING = '01980000-0000-7000-8000-000000000000';

/** small, for a hundred of them are made */
const PICTURE_PX = { width: 600, height: 400 };

type Owner = { readonly id: string };

/** Makes one of every kind of thing in everything that matters to a permission: ownership, visibility, tray. */
export class Things {
  readonly today: string;
  private readonly world: World;
  private readonly seen: readonly Seen[];

  constructor(
    private readonly server: TestApp,
    private readonly owner: Owner,
    /** measures the series, and brings a picture into the owner's find */
    private readonly observer: Owner,
  ) {
    this.world = new World(server);
    this.today = server.clock.now().toISOString().slice(0, 10);
    const day = (offset: number): string =>
      new Date(server.clock.now().getTime() + offset * 24 * 60 * 60 * 1000).toISOString().slice(0, 10);
    this.seen = [
      { name: 'private', visibility: 'private', heldUntil: null },
      { name: 'for the group', visibility: 'group', heldUntil: null },
      { name: 'public', visibility: 'public', heldUntil: null },
      { name: 'held until yesterday', visibility: 'held', heldUntil: day(-1) },
      { name: 'held until today', visibility: 'held', heldUntil: day(0) },
      { name: 'held until tomorrow', visibility: 'held', heldUntil: day(1) },
    ];
  }

  async every(kind: Thing['kind']): Promise<NamedThing[]> {
    switch (kind) {
      case 'site':
        return [{ name: 'the site', thing: { kind: 'site' }, ids: await this.ids(await this.filled(this.publicly())) }];
      case 'rig': {
        const ids = await this.ids(await this.filled(this.publicly()));
        return [{ name: 'a rig', thing: { kind: 'rig', ownerId: this.owner.id }, ids }];
      }
      case 'find':
        return this.each((seen) => ({ name: `a find ${seen.name}`, thing: this.findThing(seen) }));
      case 'series':
        return this.each((seen) => ({
          name: `a series in a find ${seen.name}`,
          thing: { kind: 'series', observerId: this.observer.id, find: this.findThing(seen) },
        }));
      case 'image':
        return [await this.inTray(), ...(await this.own()), ...(await this.brought())];
    }
  }

  private async inTray(): Promise<NamedThing> {
    const ids = await this.ids(await this.filled(this.publicly()));
    const imageId = await this.world.image(this.owner, PICTURE_PX);
    await this.world.files(imageId);
    return {
      name: 'a picture in the tray',
      thing: { kind: 'image', ownerId: this.owner.id, find: null },
      ids: { ...ids, imageId },
    };
  }

  private own(): Promise<NamedThing[]> {
    return this.each((seen) => ({
      name: `a picture in a find ${seen.name}`,
      thing: { kind: 'image', ownerId: this.owner.id, find: this.findThing(seen) },
    }));
  }

  /** A picture that the observer brought into the owner's find. */
  private async brought(): Promise<NamedThing[]> {
    const things = await this.each((seen) => ({
      name: `another’s picture in a find ${seen.name}`,
      thing: { kind: 'image', ownerId: this.observer.id, find: this.findThing(seen) },
    }));
    for (const { ids } of things) {
      await this.server.db.write('images').where({ id: ids.imageId }).update({ owner_id: this.observer.id });
    }
    return things;
  }

  private async each(toNamed: (seen: Seen) => Omit<NamedThing, 'ids'>): Promise<NamedThing[]> {
    const things: NamedThing[] = [];
    for (const seen of this.seen) things.push({ ...toNamed(seen), ids: await this.ids(await this.filled(seen)) });
    return things;
  }

  private findThing({ visibility, heldUntil }: Seen): Thing & { kind: 'find' } {
    return { kind: 'find', ownerId: this.owner.id, visibility, heldUntil, placeReaders: [] };
  }

  private publicly(): Seen {
    return { name: 'public', visibility: 'public', heldUntil: null };
  }

  /** A find with everything in it. */
  private async filled({ visibility, heldUntil }: Seen) {
    const { world, owner, observer } = this;
    const findId = await world.find(owner, { visibility, heldUntil });
    const observationId = await world.observation(findId, owner);
    const preparationId = await world.preparation(observationId);
    const imageId = await world.image(owner, { observationId, preparationId, ...PICTURE_PX });
    await world.files(imageId);
    await world.scale(imageId, owner, 0.25);
    const seriesId = await world.series(findId, observer, 'spore', preparationId);
    return { findId, observationId, preparationId, imageId, seriesId };
  }

  private async ids(find: Awaited<ReturnType<Things['filled']>>): Promise<Ids> {
    const { world, owner } = this;
    const rigId = await world.rig(owner);
    const taxonId = await world.taxon(`Exempla ${rigId}`);
    const determinationId = await world.determination(find.findId, taxonId, owner);
    const bystander = await this.server.addPerson('photographer', 'A bystander');
    return {
      ...find,
      rigId,
      settingId: await world.setting(rigId),
      taxonId,
      determinationId,
      personId: bystander.id,
      // well-formed, and nothing
      token: 'no-such-token',
      invitationId: NOTHING,
      mailId: NOTHING,
      jobId: NOTHING,
      actorId: NOTHING,
    };
  }
}
