import type { NoteGeometry } from '@shared/annotations/note';
import { midpoint, px, type ImagePoint } from '@shared/geometry/points';

export interface Ellipse {
  readonly centre: ImagePoint;
  /** half axes, image px, along and across */
  readonly along: number;
  readonly across: number;
  /** of the long line, radians from +x towards +y */
  readonly angle: number;
}

/**
 * The ellipse that a body measured along and across would have. It is not measured: it shows at a glance
 * whether the four ends sit on the body's edge. Null while the width is missing.
 */
export function bodyEllipse(geometry: NoteGeometry): Ellipse | null {
  if (geometry.type !== 'cross' || !geometry.across) return null;
  const { along, across } = geometry;
  const [dx, dy] = [along.b.x - along.a.x, along.b.y - along.a.y];
  const length = Math.hypot(dx, dy);
  if (length === 0) return null;
  const middle = midpoint(along.a, along.b);
  const other = midpoint(across.a, across.b);
  // where the width was taken beside the long line, the ellipse lies there
  const aside = (-dy * (other.x - middle.x) + dx * (other.y - middle.y)) / length;
  return {
    centre: px(middle.x - (aside * dy) / length, middle.y + (aside * dx) / length),
    along: length / 2,
    across: Math.hypot(across.b.x - across.a.x, across.b.y - across.a.y) / 2,
    angle: Math.atan2(dy, dx),
  };
}
