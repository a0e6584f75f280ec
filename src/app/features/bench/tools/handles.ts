import type { NoteGeometry } from '@shared/annotations/note';
import { px, type ImagePoint } from '@shared/geometry/points';

/** The points of a shape that a hand can take, in a fixed order. */
export function handlesOf(geometry: NoteGeometry): readonly ImagePoint[] {
  switch (geometry.type) {
    case 'line':
      return [geometry.a, geometry.b];
    case 'cross': {
      const { along, across } = geometry;
      return across ? [along.a, along.b, across.a, across.b] : [along.a, along.b];
    }
    case 'pointer':
      return [geometry.at, geometry.label];
    case 'path':
    case 'outline':
      return geometry.points;
  }
}

/** The shape with one of its points elsewhere. */
export function withHandle(geometry: NoteGeometry, index: number, to: ImagePoint): NoteGeometry {
  return mapPoints(geometry, (point, i) => (i === index ? to : point));
}

/** The whole shape, shifted. */
export function shifted(geometry: NoteGeometry, dx: number, dy: number): NoteGeometry {
  return mapPoints(geometry, (point) => px(point.x + dx, point.y + dy));
}

/** The lines that a shape consists of, closed ones with their first point again at the end. */
export function linesOf(geometry: NoteGeometry): readonly (readonly ImagePoint[])[] {
  switch (geometry.type) {
    case 'line':
      return [[geometry.a, geometry.b]];
    case 'cross': {
      const { along, across } = geometry;
      return across
        ? [
            [along.a, along.b],
            [across.a, across.b],
          ]
        : [[along.a, along.b]];
    }
    case 'pointer':
      return [[geometry.at, geometry.label]];
    case 'path':
      return [geometry.points];
    case 'outline':
      return [[...geometry.points, ...geometry.points.slice(0, 1)]];
  }
}

function mapPoints(geometry: NoteGeometry, move: (point: ImagePoint, index: number) => ImagePoint): NoteGeometry {
  switch (geometry.type) {
    case 'line':
      return { type: 'line', a: move(geometry.a, 0), b: move(geometry.b, 1) };
    case 'cross': {
      const { along, across } = geometry;
      return {
        type: 'cross',
        along: { a: move(along.a, 0), b: move(along.b, 1) },
        across: across && { a: move(across.a, 2), b: move(across.b, 3) },
      };
    }
    case 'pointer':
      return { type: 'pointer', at: move(geometry.at, 0), label: move(geometry.label, 1) };
    case 'path':
      return { type: 'path', points: geometry.points.map(move) };
    case 'outline':
      return { type: 'outline', points: geometry.points.map(move) };
  }
}
