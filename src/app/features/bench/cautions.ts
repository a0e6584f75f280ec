/** Reagents whose name in a preparation brings the caution up. */
const REAGENTS = /\bKOH\b|potassium hydroxide|ammonia|\bNH3\b|\bNH4OH\b|chloral|melzer/i;

/** One calm line where a reagent is in use; no recipe, and local rules come first. Null for none. */
export function reagentCaution(preparation: { readonly medium: string; readonly stain: string } | null): string | null {
  if (!preparation || !REAGENTS.test(`${preparation.medium} ${preparation.stain}`)) return null;
  return $localize`Potassium hydroxide, ammonia and reagents with chloral hydrate burn or poison, and some are controlled. Use, keep and get rid of them as your laboratory and local rules say.`;
}
