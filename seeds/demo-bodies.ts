import type { NoteGeometry } from '../shared/annotations/note.js';
import type { ImagePoint } from '../shared/geometry/points.js';
import type { NewCalibration } from '../shared/contracts/rigs.js';
import type { Random } from './pictures/random.js';
import type { TrueBody, TruePicture, TruePoint } from './pictures/truth.js';

/** A person at the bench: how far each placed end lies from where it should, standard deviation, px. */
const POINTING_PX = 0.5;

/** The most bodies that anybody measures in one series. */
export const ENOUGH = 30;

/** Where a body's ends would be marked, with the small error of a hand. */
export class Hand {
  constructor(private readonly random: Random) {}

  /** along the long axis, then across it, through the middle */
  cross(body: TrueBody, picture: TruePicture): NoteGeometry {
    const turn = (body.angle * Math.PI) / 180;
    const end = (lengthUm: number, direction: number, sign: 1 | -1): ImagePoint =>
      this.at({
        x: body.center.x + (sign * lengthUm * Math.cos(direction)) / 2 / picture.umPerPxX,
        y: body.center.y + (sign * lengthUm * Math.sin(direction)) / 2 / picture.umPerPxY,
      });
    const line = (lengthUm: number, direction: number) => ({
      a: end(lengthUm, direction, -1),
      b: end(lengthUm, direction, 1),
    });
    return {
      type: 'cross',
      along: line(body.axesUm.length, turn),
      across: line(body.axesUm.width, turn + Math.PI / 2),
    };
  }

  /** across a thread, at a place of its middle line where there is room on both sides */
  acrossThread(body: TrueBody, picture: TruePicture): NoteGeometry | null {
    const path = body.points?.['middleLine'];
    if (!Array.isArray(path)) return null;
    const line = path as readonly TruePoint[];
    const margin = body.axesUm.width / picture.umPerPxX;
    const inside = ({ x, y }: TruePoint): boolean =>
      x > margin && y > margin && x < picture.width - margin && y < picture.height - margin;
    const places = line
      .slice(1, -1)
      .map((point, i) => ({ point, before: line[i] as TruePoint, after: line[i + 2] as TruePoint }));
    const seen = places.filter(({ point }) => inside(point));
    const place = seen[Math.floor(this.random.next() * seen.length)];
    if (!place) return null;
    const direction = Math.atan2(place.after.y - place.before.y, place.after.x - place.before.x) + Math.PI / 2;
    const half = body.axesUm.width / 2 / picture.umPerPxX;
    const end = (sign: 1 | -1): ImagePoint =>
      this.at({
        x: place.point.x + sign * half * Math.cos(direction),
        y: place.point.y + sign * half * Math.sin(direction),
      });
    return { type: 'line', a: end(-1), b: end(1) };
  }

  /** from the foot of the stalk to the tip; null where the truth doesn't say */
  upright(body: TrueBody): NoteGeometry | null {
    const { base, tip } = (body.points ?? {}) as { base?: TruePoint; tip?: TruePoint };
    return base && tip ? { type: 'line', a: this.at(base), b: this.at(tip) } : null;
  }

  /** from rim to rim; null where the truth doesn't say */
  acrossCap(body: TrueBody): NoteGeometry | null {
    const { left, right } = (body.points ?? {}) as { left?: TruePoint; right?: TruePoint };
    return left && right ? { type: 'line', a: this.at(left), b: this.at(right) } : null;
  }

  /**
   * From side to side of a finger. Where it reaches a little over the border it is marked at the border: that
   * takes off about a hundredth, far less than a finger leaves open.
   * @throws {Error} where the truth doesn't say
   */
  acrossFinger(body: TrueBody, { width, height }: TruePicture): { a: ImagePoint; b: ImagePoint } {
    const [a, b] = (body.points?.['across'] ?? []) as readonly TruePoint[];
    if (!a || !b) throw new Error('The truth does not say where the sides of the finger are.');
    const inside = ({ x, y }: TruePoint): ImagePoint => ({
      x: Math.min(Math.max(x, 0), width),
      y: Math.min(Math.max(y, 0), height),
    });
    return { a: inside(this.at(a)), b: inside(this.at(b)) };
  }

  /** every graduation that is in the picture, marked along the ruling a little inside its lower ends */
  graduations(picture: TruePicture, spacingUm: number): NewCalibration['marks'] {
    return (picture.graduations ?? []).flatMap(({ a, b, positionUm }) => {
      const length = Math.hypot(b.x - a.x, b.y - a.y);
      const inward = { x: a.x + (60 * (b.x - a.x)) / length, y: a.y + (60 * (b.y - a.y)) / length };
      const at = this.at(inward);
      const inside = at.x >= 0 && at.y >= 0 && at.x <= picture.width && at.y <= picture.height;
      return inside ? [{ at: { x: at.x, y: at.y }, index: Math.round(positionUm / spacingUm) }] : [];
    });
  }

  private at({ x, y }: TruePoint): ImagePoint {
    return {
      x: hundredth(x + POINTING_PX * this.random.normal()),
      y: hundredth(y + POINTING_PX * this.random.normal()),
    };
  }
}

/** Bodies that a careful person would measure: whole, uncovered, in focus. */
export function measurable(picture: TruePicture, kind: TrueBody['kind'], focusUm: number): TrueBody[] {
  return picture.bodies.filter(
    (body) =>
      body.kind === kind &&
      !body.cut &&
      (body.coveredBy ?? []).length === 0 &&
      Math.abs(body.focus) <= focusUm &&
      inFrame(body, picture),
  );
}

function inFrame({ center }: TrueBody, { width, height }: TruePicture): boolean {
  return center.x > 0 && center.y > 0 && center.x < width && center.y < height;
}

function hundredth(px: number): number {
  return Math.round(px * 100) / 100;
}
