import type { FindPicture, FindView } from '@shared/contracts/finds';
import type { ImageView } from '@shared/contracts/images';
import { pictureWords } from '../../core/picture-words';

/** What each picture of a find is called, by its id: its title, else what it shows, else its place in the find. */
export function pictureNames(find: FindView): ReadonlyMap<string, string> {
  const pictures = find.observations.flatMap((observation) => observation.pictures);
  return new Map(
    pictures.map((picture, i) => {
      const place = $localize`Picture ${i + 1}:place: of ${find.number}:find:`;
      return [picture.id, pictureWords(picture, place)];
    }),
  );
}

/** The find with what was just said of one of its pictures. */
export function withPicture(find: FindView, image: ImageView): FindView {
  const said: Partial<FindPicture> = {
    title: image.title,
    altText: image.altText,
    role: image.role,
    light: image.light,
    preparationId: image.preparation?.id ?? null,
    creditLine: image.creditLine,
    licence: image.licence,
  };
  return {
    ...find,
    observations: find.observations.map((observation) => ({
      ...observation,
      pictures: observation.pictures.map((picture) => (picture.id === image.id ? { ...picture, ...said } : picture)),
    })),
  };
}
