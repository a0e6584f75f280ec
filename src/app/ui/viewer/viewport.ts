import { px, viewPx, type ImagePoint, type ViewPoint } from '@shared/geometry/points';

interface Vector {
  readonly x: number;
  readonly y: number;
}

/**
 * Where the picture lies in the viewing element at one moment. The only place that converts between
 * image pixels (upright, edges at whole numbers) and CSS pixels of the element.
 *
 * It is made from three points rather than a zoom and an offset, so that a turned view needs nothing new.
 */
export class Viewport {
  private readonly determinant: number;

  /**
   * @param origin where the picture's corner (0, 0) lies, view px
   * @param right  view px per image px along +x of the picture
   * @param down   view px per image px along +y of the picture
   * @param size   of the viewing element, CSS px
   */
  constructor(
    private readonly origin: Vector,
    private readonly right: Vector,
    private readonly down: Vector,
    readonly size: { readonly width: number; readonly height: number },
  ) {
    this.determinant = right.x * down.y - right.y * down.x;
  }

  /** From where the viewer says that the corners (0, 0), (width, 0) and (0, height) of the picture lie. */
  static fromCorners(
    corners: { readonly origin: Vector; readonly right: Vector; readonly down: Vector },
    picture: { readonly width: number; readonly height: number },
    size: { readonly width: number; readonly height: number },
  ): Viewport {
    const { origin, right, down } = corners;
    const along = { x: (right.x - origin.x) / picture.width, y: (right.y - origin.y) / picture.width };
    const across = { x: (down.x - origin.x) / picture.height, y: (down.y - origin.y) / picture.height };
    return new Viewport({ x: origin.x, y: origin.y }, along, across, size);
  }

  /** view px per image px */
  get zoom(): number {
    return Math.hypot(this.right.x, this.right.y);
  }

  /** The six numbers of canvas's `setTransform` and fabric's `viewportTransform`, from image to view. */
  get transform(): [number, number, number, number, number, number] {
    return [this.right.x, this.right.y, this.down.x, this.down.y, this.origin.x, this.origin.y];
  }

  /** The image point in the middle of the element. */
  get centre(): ImagePoint {
    return this.toImage(viewPx(this.size.width / 2, this.size.height / 2));
  }

  toView(point: ImagePoint): ViewPoint {
    return viewPx(
      this.origin.x + point.x * this.right.x + point.y * this.down.x,
      this.origin.y + point.x * this.right.y + point.y * this.down.y,
    );
  }

  toImage(point: ViewPoint): ImagePoint {
    const x = point.x - this.origin.x;
    const y = point.y - this.origin.y;
    return px(
      (x * this.down.y - y * this.down.x) / this.determinant,
      (y * this.right.x - x * this.right.y) / this.determinant,
    );
  }

  /** A distance on the screen in image px. */
  toImageLength(viewLength: number): number {
    return viewLength / this.zoom;
  }

  /** Whether the point can be seen, with a margin inside the element's edge, view px. */
  shows(point: ImagePoint, margin = 0): boolean {
    const { x, y } = this.toView(point);
    return x >= margin && y >= margin && x <= this.size.width - margin && y <= this.size.height - margin;
  }
}
