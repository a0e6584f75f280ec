/**
 * Who may do what. The one place that decides; SQL lists follow it through
 * `server/db/visible-to.ts`, and the table route × role × ownership in the tests
 * is generated from it.
 */

export const ROLES = ['photographer', 'identifier', 'editor', 'keeper'] as const;
export type Role = (typeof ROLES)[number];

export type Actor = { readonly kind: 'visitor' } | { readonly kind: 'user'; readonly id: string; readonly role: Role };

export const VISITOR: Actor = { kind: 'visitor' };

export const VISIBILITIES = ['private', 'group', 'public', 'held'] as const;
export type Visibility = (typeof VISIBILITIES)[number];

/** A find, or something that is seen exactly when its find is seen (an observation, a series, a determination). */
export interface FindThing {
  readonly kind: 'find';
  readonly ownerId: string;
  readonly visibility: Visibility;
  /** for `held`: the first day (UTC, YYYY-MM-DD) on which everybody sees it */
  readonly heldUntil: string | null;
  /** those besides the finder who see the exact place */
  readonly placeReaders: readonly string[];
}

/** A picture; in the sorting tray it has no find yet and is its owner's alone. */
export interface ImageThing {
  readonly kind: 'image';
  readonly ownerId: string;
  readonly find: FindThing | null;
}

/** A series: measured by one observer on a find. */
export interface SeriesThing {
  readonly kind: 'series';
  readonly observerId: string;
  readonly find: FindThing;
}

/** A rig with its settings and calibrations; private to its owner. */
export interface RigThing {
  readonly kind: 'rig';
  readonly ownerId: string;
}

export interface SiteThing {
  readonly kind: 'site';
}

export type Thing = FindThing | ImageThing | SeriesThing | RigThing | SiteThing;

/** Actions by the thing they are done to. `site` stands for the whole of Motebook. */
export interface ActionsOn {
  find: 'find.read' | 'find.edit' | 'find.determine' | 'find.decide' | 'find.read-exact-place';
  image: 'image.read' | 'image.edit' | 'image.annotate' | 'image.read-original';
  series: 'series.read' | 'series.measure';
  rig: 'rig.read' | 'rig.edit';
  site: 'site.read' | 'site.sign-in' | 'site.contribute' | 'taxa.add' | 'site.keep';
}
export type Action = ActionsOn[keyof ActionsOn];

/**
 * @param today  UTC date YYYY-MM-DD, for finds held until a date
 * @returns whether this actor may do this to this thing
 */
export function can<K extends Thing['kind']>(
  actor: Actor,
  action: ActionsOn[K],
  thing: Thing & { readonly kind: K },
  today: string,
): boolean;
export function can(actor: Actor, action: Action, thing: Thing, today: string): boolean {
  switch (thing.kind) {
    case 'find':
      return canFind(actor, action as ActionsOn['find'], thing, today);
    case 'image':
      return canImage(actor, action as ActionsOn['image'], thing, today);
    case 'series':
      return canSeries(actor, action as ActionsOn['series'], thing, today);
    case 'rig':
      return isUser(actor, thing.ownerId);
    case 'site':
      return canSite(actor, action as ActionsOn['site']);
  }
}

function canFind(actor: Actor, action: ActionsOn['find'], find: FindThing, today: string): boolean {
  const owns = isUser(actor, find.ownerId);
  switch (action) {
    case 'find.read':
      return owns || isPublic(find, today) || (find.visibility === 'group' && actor.kind === 'user');
    case 'find.edit':
    case 'find.decide':
      return owns;
    case 'find.determine':
      return owns || (actor.kind === 'user' && actor.role === 'identifier' && canFind(actor, 'find.read', find, today));
    case 'find.read-exact-place':
      return (
        owns ||
        (actor.kind === 'user' && find.placeReaders.includes(actor.id) && canFind(actor, 'find.read', find, today))
      );
  }
}

function canImage(actor: Actor, action: ActionsOn['image'], image: ImageThing, today: string): boolean {
  const owns = isUser(actor, image.ownerId);
  const reads = owns || (image.find !== null && canFind(actor, 'find.read', image.find, today));
  switch (action) {
    case 'image.read':
      return reads;
    case 'image.annotate':
      return reads && actor.kind === 'user';
    case 'image.edit':
    case 'image.read-original': // it carries the camera's place and serial number
      return owns;
  }
}

function canSeries(actor: Actor, action: ActionsOn['series'], series: SeriesThing, today: string): boolean {
  const reads = canFind(actor, 'find.read', series.find, today);
  return action === 'series.read' ? reads : reads && isUser(actor, series.observerId);
}

function canSite(actor: Actor, action: ActionsOn['site']): boolean {
  switch (action) {
    case 'site.read':
    case 'site.sign-in':
      return true;
    case 'site.contribute':
    case 'taxa.add':
      return actor.kind === 'user';
    case 'site.keep':
      return actor.kind === 'user' && actor.role === 'keeper';
  }
}

/** Whether everybody, signed in or not, sees this find. */
export function isPublic(find: Pick<FindThing, 'visibility' | 'heldUntil'>, today: string): boolean {
  return (
    find.visibility === 'public' || (find.visibility === 'held' && find.heldUntil !== null && find.heldUntil <= today)
  );
}

function isUser(actor: Actor, id: string): boolean {
  return actor.kind === 'user' && actor.id === id;
}
