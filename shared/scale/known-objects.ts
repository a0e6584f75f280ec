/**
 * Things of known size that lie about, to be marked in a picture as its reference.
 *
 * To add one, add an entry with the publication of its size beside it.
 */

export interface KnownObject {
  readonly id: string;
  readonly label: string;
  /** the length to mark, mm; null: as much of it as one likes, stated by the person */
  readonly lengthMm: number | null;
  /** limit of that length, mm, half-width, rectangular */
  readonly toleranceMm: number;
}

/** New and worn, and an edge that is rounded: common practice, no source. */
const COIN_TOLERANCE_MM = 0.1;

function coin(id: string, label: string, lengthMm: number): KnownObject {
  return { id, label, lengthMm, toleranceMm: COIN_TOLERANCE_MM };
}

export const KNOWN_OBJECTS: readonly KnownObject[] = [
  // Class II, ±(0.3 + 0.2·L) mm, L in whole metres rounded up: EU Directive 2014/32/EU, Annex X (MI-008); from memory
  { id: 'ruler-class-2', label: 'Ruler, class II', lengthMm: null, toleranceMm: 0.5 },
  // limit of reading and print: common practice, no source
  { id: 'ruler-plastic', label: 'Plain plastic ruler', lengthMm: null, toleranceMm: 0.5 },

  // Council Regulation (EC) 975/98, Annex I. The 20 cent coin is notched: its greatest breadth.
  coin('euro-0.01', '1 cent (euro)', 16.25),
  coin('euro-0.02', '2 cent (euro)', 18.75),
  coin('euro-0.05', '5 cent (euro)', 21.25),
  coin('euro-0.10', '10 cent (euro)', 19.75),
  coin('euro-0.20', '20 cent (euro)', 22.25),
  coin('euro-0.50', '50 cent (euro)', 24.25),
  coin('euro-1', '1 euro', 23.25),
  coin('euro-2', '2 euro', 25.75),

  // United States Mint, Coin Specifications
  coin('us-cent', 'Cent (US)', 19.05),
  coin('us-nickel', 'Nickel (US)', 21.21),
  coin('us-dime', 'Dime (US)', 17.91),
  coin('us-quarter', 'Quarter (US)', 24.26),
  coin('us-half', 'Half dollar (US)', 30.61),
  coin('us-dollar', 'Dollar (US)', 26.49),

  // Royal Mint figures as quoted by others; the Mint's own page was not seen.
  // The 20p and 50p are of constant width: the same across whichever way they lie (from memory).
  coin('uk-1p', '1p (UK)', 20.3),
  coin('uk-2p', '2p (UK)', 25.9),
  coin('uk-5p', '5p (UK)', 18.0),
  coin('uk-10p', '10p (UK)', 24.5),
  coin('uk-20p', '20p (UK)', 21.4),
  coin('uk-50p', '50p (UK)', 27.3),
  coin('uk-1-pound', '£1 (UK), point to point', 23.43),
  coin('uk-2-pounds', '£2 (UK)', 28.4),

  // ISO/IEC 7810:2003, ID-1: 85.60 × 53.98 mm; limits 85.47–85.72 and 53.92–54.03 mm from memory
  { id: 'card-long', label: 'Bank card, long side', lengthMm: 85.6, toleranceMm: 0.13 },
  { id: 'card-short', label: 'Bank card, short side', lengthMm: 53.98, toleranceMm: 0.06 },

  // ISO 216: ±2 mm from 150 to 600 mm; from memory
  { id: 'a4-short', label: 'A4 sheet, short side', lengthMm: 210, toleranceMm: 2 },
  { id: 'a4-long', label: 'A4 sheet, long side', lengthMm: 297, toleranceMm: 2 },
];

/** The object with this id, or null. */
export function knownObject(id: string): KnownObject | null {
  return KNOWN_OBJECTS.find((object) => object.id === id) ?? null;
}

/**
 * Maximum permissible error of a ruler or tape, ±(a + b·L) mm, L in whole metres rounded up.
 *
 * @param lengthMm the length that is used, mm, positive
 * @see EU Directive 2014/32/EU, Annex X (MI-008); from memory
 */
export function rulerLimitMm(accuracy: 'I' | 'II' | 'III', lengthMm: number): number {
  const [a, b] = { I: [0.1, 0.1], II: [0.3, 0.2], III: [0.6, 0.4] }[accuracy] as [number, number];
  return a + b * Math.max(1, Math.ceil(lengthMm / 1000));
}
