/**
 * What a picture is called where it stands in a link or has a menu. Nobody has to title or describe a picture,
 * yet it must be told from others by ear.
 *
 * @param otherwise its place, in words, for a picture that nobody has titled or described
 */
export function pictureWords(picture: { readonly title: string; readonly altText: string }, otherwise: string): string {
  return picture.title.trim() || picture.altText.trim() || otherwise;
}
