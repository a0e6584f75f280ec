import type { Knex } from 'knex';
import type { Actor } from '../../shared/permission/can.js';
import { visibleTo } from './visible-to.js';

/** What is said of one picture where anybody may read it. */
export interface GalleryText {
  readonly imageId: string;
  readonly findId: string;
  readonly uploadedAt: string;
  /** the accepted taxon of the name that stands; null without one */
  readonly taxonId: string | null;
  /** the name as given, the accepted one, its synonyms, the names above it */
  readonly names: string;
  /** the public words alone */
  readonly place: string;
  /** who found and who looked */
  readonly people: string;
  readonly structures: string;
  /** substrate and light */
  readonly surroundings: string;
}

interface Row {
  image_id: string;
  find_id: string;
  uploaded_at: string;
  light: string;
  substrate: string;
  public_words: string;
  owner: string;
  observer: string;
  taxon_id: string | null;
  given_name: string | null;
}

interface Name {
  readonly id: string;
  readonly name: string;
  readonly parent_id: string | null;
  readonly accepted_id: string | null;
}

/** Texts of the pictures of these finds that the actor may see, in the gallery's sense: ready, and of a subject. */
export async function galleryTexts(
  findIds: readonly string[],
  actor: Actor,
  day: string,
  trx: Knex.Transaction,
): Promise<GalleryText[]> {
  const rows = (await trx('images')
    .join('observations', 'observations.id', 'images.observation_id')
    .join('finds', 'finds.id', 'observations.find_id')
    .join('users as owner', 'owner.id', 'finds.owner_id')
    .join('users as observer', 'observer.id', 'observations.observer_id')
    .leftJoin('determinations', 'determinations.id', 'finds.standing_id')
    .whereIn('finds.id', findIds)
    .where({ 'images.state': 'ready', 'images.role': 'subject' })
    .where(visibleTo(actor, day))
    .select({
      image_id: 'images.id',
      find_id: 'finds.id',
      uploaded_at: 'images.uploaded_at',
      light: 'images.light',
      substrate: 'observations.substrate',
      public_words: 'finds.public_words',
      owner: 'owner.name',
      observer: 'observer.name',
      taxon_id: 'determinations.taxon_id',
      given_name: 'determinations.name',
    })) as Row[];
  const structures = await structuresOf(findIds, trx);
  const names = rows.some((row) => row.taxon_id !== null)
    ? ((await trx('taxa').select('id', 'name', 'parent_id', 'accepted_id')) as Name[])
    : [];
  const tree = new Map(names.map((name) => [name.id, name]));
  const words = new Map<string, string>();
  const wordsFor = (accepted: string): string => {
    const known = words.get(accepted) ?? wordsOf(accepted, tree).join(' ');
    words.set(accepted, known);
    return known;
  };
  return rows.map((row) => {
    const accepted = row.taxon_id === null ? null : acceptedOf(row.taxon_id, tree);
    return {
      imageId: row.image_id,
      findId: row.find_id,
      uploadedAt: row.uploaded_at,
      taxonId: accepted,
      names: `${row.given_name ?? ''} ${accepted === null ? '' : wordsFor(accepted)}`,
      place: row.public_words,
      people: `${row.owner} ${row.observer}`,
      structures: (structures.get(row.find_id) ?? []).join(' '),
      surroundings: `${row.substrate} ${row.light}`,
    };
  });
}

async function structuresOf(findIds: readonly string[], trx: Knex.Transaction): Promise<Map<string, string[]>> {
  const rows = (await trx('series').whereIn('find_id', findIds).distinct('find_id', 'structure')) as {
    find_id: string;
    structure: string;
  }[];
  return rows.reduce(
    (all, row) => all.set(row.find_id, [...(all.get(row.find_id) ?? []), row.structure]),
    new Map<string, string[]>(),
  );
}

function acceptedOf(id: string, tree: ReadonlyMap<string, Name>): string {
  return tree.get(id)?.accepted_id ?? id;
}

/** The accepted name, its synonyms, and the names above it. */
function wordsOf(accepted: string, tree: ReadonlyMap<string, Name>): string[] {
  const synonyms = [...tree.values()].filter((name) => name.accepted_id === accepted).map((name) => name.name);
  const above: string[] = [];
  const seen = new Set<string>();
  for (
    let at = tree.get(accepted);
    at && !seen.has(at.id);
    at = at.parent_id === null ? undefined : tree.get(at.parent_id)
  ) {
    seen.add(at.id);
    above.push(at.name);
  }
  return [...above, ...synonyms];
}
