import * as z from 'zod/mini';
import { GROUNDS } from '../scale/scale.js';
import { VISIBILITIES } from '../permission/can.js';

/** Ids are UUIDv7 as text. */
export const Id = z.uuid();

/** One line of text, trimmed, not empty. */
export const line = (maxLength: number) => z.string().check(z.trim(), z.minLength(1), z.maxLength(maxLength));

/** Text that may be empty or run over several lines, trimmed. */
export const prose = (maxLength: number) => z.string().check(z.trim(), z.maxLength(maxLength));

/** A number greater than zero, so far from the ends of what a number can hold that no quotient of a few leaves it. */
export const positive = z.number().check(z.minimum(1e-9), z.maximum(1e9));

/** A calendar day, YYYY-MM-DD, that exists. */
export const Day = z.iso.date();

export const Email = z.string().check(z.trim(), z.toLowerCase(), z.email(), z.maxLength(254));
export const Password = z.string().check(z.minLength(10), z.maxLength(200));

export const Visibility = z.enum(VISIBILITIES);
export const Grounds = z.enum(GROUNDS);

/** A point in pixels of the upright original; edges at whole numbers. */
export const ImagePoint = z.strictObject({ x: z.number(), y: z.number() });

/** A person as others see them. */
export const PersonRef = z.strictObject({ id: Id, name: z.string() });
export type PersonRef = z.infer<typeof PersonRef>;

/** Licences a picture can carry: Creative Commons and the public domain mark, or all rights kept. */
export const LICENCES = [
  'cc0',
  'by',
  'by-sa',
  'by-nc',
  'by-nc-sa',
  'by-nd',
  'by-nc-nd',
  'all-rights-reserved',
] as const;
export const Licence = z.enum(LICENCES);
export type Licence = z.infer<typeof Licence>;

/** The machine-readable URI of a licence (always http, as the licences themselves state it); null where there is none. */
export function licenceUri(licence: Licence): string | null {
  if (licence === 'all-rights-reserved') return null;
  return licence === 'cc0'
    ? 'http://creativecommons.org/publicdomain/zero/1.0/'
    : `http://creativecommons.org/licenses/${licence}/4.0/`;
}

/** A scientific name as a determination or a taxon carries it; `shared/taxonomy/name.ts` sets it in type. */
export const NameView = z.strictObject({
  name: z.string(),
  authorship: z.string(),
  rank: z.string(),
  code: z.enum(['botanical', 'zoological']),
  qualifier: z.string(),
});
export type NameView = z.infer<typeof NameView>;
