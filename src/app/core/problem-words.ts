import type { ApiProblem, FieldError } from './api-problem';

type Figures = Readonly<Record<string, string | number>>;
type Words = (figures: Figures) => string;

const say = (figure: string | number | undefined): string => (figure === undefined ? '' : String(figure));

/**
 * What a problem's code means to the person who met it, and what to do.
 * To add one: the code as the server sends it, and one or two short sentences.
 */
const WORDS: Readonly<Record<string, Words>> = {
  // the way there
  offline: () => $localize`No answer from Motebook. Check the connection; nothing you wrote is gone.`,
  unexpected: () => $localize`Something broke on our side. Try again; if it stays, tell the keeper.`,
  'internal-error': () => $localize`Something broke on our side. Try again; if it stays, tell the keeper.`,
  'too-many-requests': () => $localize`That was too often in a short time. Wait a minute and try again.`,
  'too-many-tries': (f) => $localize`That was too often. Try again in ${say(f['seconds'])} seconds.`,
  'stale-page': () => $localize`This page has been open too long. Reload it and try again.`,
  // permission
  'not-signed-in': () => $localize`Sign in to do this.`,
  forbidden: () => $localize`This is not yours to change.`,
  'not-found': () => $localize`This is not here, or not shown to you.`,
  'wrong-sign-in': () => $localize`E-mail and password do not match.`,
  'link-lapsed': () => $localize`This link has lapsed or was used already. Ask for a new one.`,
  'email-taken': () => $localize`Somebody with this e-mail is already here.`,
  'last-keeper': () => $localize`Somebody must stay keeper. Give another person the role first.`,
  // fields
  'invalid-request': () => $localize`Something in the form needs mending.`,
  'not-positive': () => $localize`This must be more than zero.`,
  'not-finite': () => $localize`This must be a number.`,
  'no-such-taxon': () => $localize`The list of taxa does not hold this name.`,
  'taxon-exists': () => $localize`The list of taxa holds this name already.`,
  'held-needs-date': () => $localize`Say until when it is held.`,
  // pictures
  'type-not-accepted': (f) => notTaken(f['found']),
  'file-not-opened': () => $localize`The file could not be opened. Was it moved, or its card taken out?`,
  'too-many-pixels': (f) => $localize`The picture has more pixels than fit here (${say(f['most'])} at most).`,
  'too-large': () => $localize`The file is larger than what is taken here.`,
  'not-readable': () => $localize`The file could not be read as a picture. It may be damaged.`,
  'took-too-long': () => $localize`Reading the picture took too long. Try it again.`,
  'intake-failed': () => $localize`The picture could not be taken in. Try it again.`,
  'picture-in-find': () => $localize`The picture belongs to a find already.`,
  'picture-not-ready': () => $localize`The picture is still being taken in.`,
  // scale
  'no-scale': () => $localize`The picture has no scale, so it has no lengths.`,
  'no-calibration': () => $localize`This setting has no calibration that holds now.`,
  'calibration-lapsed': () => $localize`The calibration held for one sitting, which is over. Calibrate again.`,
  'reduced-or-cropped': () => $localize`The picture's size is not the calibrated frame's. Was it reduced or cropped?`,
  'reference-too-short': (f) =>
    $localize`The marked reference is too short: ${say(f['spanPx'])} px, and ${say(f['neededPx'])} are needed. Mark a longer part.`,
  'too-few-graduations': () => $localize`Too few graduations. Mark at least two, better many.`,
  'too-few-rulings': () => $localize`No ruling was found. Mark the graduations by hand.`,
  'too-many-rulings': () => $localize`More than two rulings were found. Mark the graduations by hand.`,
  'rulings-diagonal': () => $localize`The ruling lies aslant. Turn it along the frame's edge and photograph it again.`,
  'rulings-not-perpendicular': () => $localize`The two rulings do not cross at a right angle. Mark them again.`,
  'no-spread': () => $localize`All marks lie on one spot.`,
  'not-pairs': () => $localize`Each mark needs its graduation.`,
  'too-few-values': () => $localize`Too few values for this.`,
  'error-too-small': () => $localize`The wanted error is too small to be reached.`,
  'not-a-count': () => $localize`This must be a whole number.`,
  'not-a-probability': () => $localize`This must lie between 0 and 1.`,
};

/** @param found what the file is, as far as its first bytes tell */
function notTaken(found: string | number | undefined): string {
  if (found === 'HEIC') {
    return $localize`This is HEIC, which is not taken. Let the phone save or send it as JPEG; JPEG, PNG, TIFF (8 or 16 bit) and WebP are taken.`;
  }
  return found === undefined || found === 'unknown' || found === 'nothing'
    ? $localize`This is not a picture of a kind that is taken: JPEG, PNG, TIFF (8 or 16 bit) and WebP are.`
    : $localize`This is ${say(found)}:kind:, which is not taken. JPEG, PNG, TIFF (8 or 16 bit) and WebP are.`;
}

const FIELD_WORDS: Readonly<Record<string, string>> = {
  too_small: $localize`Too short or too small.`,
  too_big: $localize`Too long or too large.`,
  invalid_type: $localize`This is needed.`,
  invalid_format: $localize`This is not written as it should be.`,
  invalid_value: $localize`Choose one of the list.`,
  unrecognized_keys: $localize`There is something here that does not belong.`,
};

/** A problem as its reader needs it. An unknown code is worded by its status, never shown. */
export function problemWords(problem: ApiProblem): string {
  const words = WORDS[problem.code] ?? WORDS[byStatus(problem.status)] ?? WORDS['unexpected'];
  const sentence = words ? words(problem.parameters) : '';
  return problem.status >= 500 && problem.instance
    ? $localize`${sentence} (${problem.instance.replace(/^.*\//, '')}:requestNumber:)`
    : sentence;
}

/** What stands beside a field: by pointer, `#/place/publicWords`. Null where the server has nothing against it. */
export function fieldWords(fields: readonly FieldError[], pointer: string): string | null {
  const error = fields.find((field) => field.pointer === pointer || field.pointer.startsWith(`${pointer}/`));
  if (!error) return null;
  return FIELD_WORDS[error.code] ?? WORDS[error.code]?.({}) ?? error.detail;
}

/** Whether words of our own exist for this code; the specs ask it of every code that the domain throws. */
export function hasWords(code: string): boolean {
  return code in WORDS;
}

function byStatus(status: number): string {
  if (status === 401) return 'not-signed-in';
  if (status === 403) return 'forbidden';
  if (status === 404) return 'not-found';
  if (status === 429) return 'too-many-requests';
  return status >= 400 && status < 500 ? 'invalid-request' : 'unexpected';
}
