/** A thin lens that looks at a point: sharp there, blurred by its aperture before and behind. */
import { add, aside, cross, dot, length, sub, times, unit, vec, type Vector } from './vector.js';

export interface View {
  readonly from: Vector;
  readonly at: Vector;
  /** Width of the plane in focus that the picture shows, mm. */
  readonly fieldWidth: number;
  readonly width: number;
  readonly height: number;
  /** Radius of the aperture, mm. */
  readonly aperture: number;
  /** Distance from `from` to the plane in focus; where `at` is, when left out. */
  readonly focus?: number;
}

export class Camera {
  readonly umPerPx: number;
  readonly forward: Vector;
  readonly right: Vector;
  readonly up: Vector;
  private readonly focus: number;

  constructor(readonly view: View) {
    this.forward = unit(sub(view.at, view.from));
    const level = cross(this.forward, vec(0, 0, 1));
    this.right = length(level) < 1e-6 ? aside(this.forward)[0] : unit(level);
    this.up = cross(this.right, this.forward);
    this.focus = view.focus ?? length(sub(view.at, view.from));
    this.umPerPx = (view.fieldWidth / view.width) * 1000;
  }

  /** Ray through a place in the picture (px) and a place on the lens (a unit disc): origin, then direction. */
  ray(px: number, py: number, lensX: number, lensY: number, out: Float64Array): void {
    const { view, forward, right, up, focus } = this;
    const mm = this.umPerPx / 1000;
    const sx = (px - view.width / 2) * mm;
    const sy = (view.height / 2 - py) * mm;
    const lx = lensX * view.aperture;
    const ly = lensY * view.aperture;
    const ax = sx - lx;
    const ay = sy - ly;
    const n = 1 / Math.sqrt(ax * ax + ay * ay + focus * focus);
    out[0] = view.from.x + right.x * lx + up.x * ly;
    out[1] = view.from.y + right.y * lx + up.y * ly;
    out[2] = view.from.z + right.z * lx + up.z * ly;
    out[3] = (right.x * ax + up.x * ay + forward.x * focus) * n;
    out[4] = (right.y * ax + up.y * ay + forward.y * focus) * n;
    out[5] = (right.z * ax + up.z * ay + forward.z * focus) * n;
  }

  /** Where a point of the scene falls in the picture, px, and how far before the plane in focus it lies, mm. */
  project(p: Vector): { x: number; y: number; before: number } {
    const d = sub(p, this.view.from);
    const depth = dot(d, this.forward);
    const scale = this.focus / depth / (this.umPerPx / 1000);
    return {
      x: this.view.width / 2 + dot(d, this.right) * scale,
      y: this.view.height / 2 - dot(d, this.up) * scale,
      before: this.focus - depth,
    };
  }

  /** A point of the plane in focus, from a place in the picture. */
  onFocus(px: number, py: number): Vector {
    const mm = this.umPerPx / 1000;
    const across = add(
      times(this.right, (px - this.view.width / 2) * mm),
      times(this.up, (this.view.height / 2 - py) * mm),
    );
    return add(this.view.from, add(times(this.forward, this.focus), across));
  }
}
