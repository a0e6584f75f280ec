import type { Note, NoteGeometry } from '@shared/annotations/note';
import { px, type ImagePoint } from '@shared/geometry/points';
import { distanceToSegment } from '@shared/geometry/segment';
import { linesOf } from '../tools/handles';
import { bodyEllipse } from './body-ellipse';

/**
 * The note that a point means: the one whose line is nearest within reach, else the smallest body that
 * the point lies in.
 *
 * @param reach image px
 */
export function noteAt(notes: readonly Note[], at: ImagePoint, reach: number): Note | null {
  let near: Note | null = null;
  let least = reach;
  let inside: Note | null = null;
  let smallest = Infinity;
  for (const note of notes) {
    const far = distanceToShape(note.geometry, at);
    if (far <= least) [near, least] = [note, far];
    const ellipse = bodyEllipse(note.geometry);
    if (!ellipse) continue;
    const [x, y] = [at.x - ellipse.centre.x, at.y - ellipse.centre.y];
    const [cos, sin] = [Math.cos(ellipse.angle), Math.sin(ellipse.angle)];
    const off = Math.hypot((x * cos + y * sin) / ellipse.along, (y * cos - x * sin) / ellipse.across);
    if (off <= 1 && ellipse.along * ellipse.across < smallest)
      [inside, smallest] = [note, ellipse.along * ellipse.across];
  }
  return near ?? inside;
}

/** Image px from a point to the nearest line of a shape. */
export function distanceToShape(geometry: NoteGeometry, at: ImagePoint): number {
  let least = Infinity;
  for (const line of linesOf(geometry)) {
    for (let i = 1; i < line.length; i++) {
      least = Math.min(least, distanceToSegment(at, { a: line[i - 1] as ImagePoint, b: line[i] as ImagePoint }));
    }
  }
  return least;
}

/** The box around a shape, image px. */
export function boundsOf(geometry: NoteGeometry): { readonly low: ImagePoint; readonly high: ImagePoint } {
  let [lowX, lowY, highX, highY] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const line of linesOf(geometry)) {
    for (const { x, y } of line) {
      [lowX, lowY] = [Math.min(lowX, x), Math.min(lowY, y)];
      [highX, highY] = [Math.max(highX, x), Math.max(highY, y)];
    }
  }
  return { low: px(lowX, lowY), high: px(highX, highY) };
}
