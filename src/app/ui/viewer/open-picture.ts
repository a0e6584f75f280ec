import { signal, type Signal } from '@angular/core';
import OpenSeadragon from 'openseadragon';
import { Subject, type Observable } from 'rxjs';
import type { ViewPoint } from '@shared/geometry/points';
import { Viewport } from './viewport';

export interface PictureSource {
  readonly imageId: string;
  readonly revision: number;
  /** upright pixels of the original */
  readonly width: number;
  readonly height: number;
}

/** CSS pixels per image pixel at most: a pixel is then plain to see, and a tenth of it can be pointed at. */
const LARGEST_ZOOM = 32;
/** From here on pixels are shown as squares rather than smoothed: one sees what there is. */
const PLAIN_PIXELS_FROM = 4;

/**
 * One deep-zoomed picture: the only holder of OpenSeadragon. It takes no pointers or keys itself;
 * `PictureCanvas` does, so that drawing and panning are decided in one place.
 */
export class OpenPicture {
  private readonly viewer: OpenSeadragon.Viewer;
  private readonly frame = new Subject<Viewport>();
  private readonly current = signal<Viewport | null>(null);
  private readonly isDrawn = signal(false);
  private readonly hasFailed = signal(false);
  private closed = false;

  /** Each time the picture has been drawn, in the same frame: what lies over it redraws here to stay in step. */
  readonly frames: Observable<Viewport> = this.frame.asObservable();
  /** the same for templates, a change detection later; null until the picture is open */
  readonly viewport: Signal<Viewport | null> = this.current.asReadonly();
  /** all tiles of the present view are there and nothing moves */
  readonly drawn = this.isDrawn.asReadonly();
  readonly failed = this.hasFailed.asReadonly();

  /**
   * @param calm  no gliding: for people who ask for less motion
   * @param nonce of the page's content security policy
   */
  constructor(
    private readonly element: HTMLElement,
    private readonly source: PictureSource,
    calm: boolean,
    nonce: string | null,
  ) {
    forestallStyle(element.ownerDocument, nonce);
    this.viewer = new OpenSeadragon.Viewer({
      element,
      drawer: ['webgl', 'canvas'],
      showNavigationControl: false,
      tabIndex: -1,
      visibilityRatio: 0.4,
      minZoomImageRatio: 0.7,
      maxZoomPixelRatio: LARGEST_ZOOM,
      animationTime: calm ? 0 : 0.25,
      springStiffness: 9,
      blendTime: 0,
      imageLoaderLimit: 6,
      immediateRender: true,
      autoResize: true,
    });
    this.viewer.setMouseNavEnabled(false);
    this.viewer.addHandler('open', () => this.watchTiles());
    this.viewer.addHandler('open-failed', () => this.hasFailed.set(true));
    this.viewer.addHandler('animation-start', () => this.isDrawn.set(false));
    this.viewer.addHandler('animation-finish', () => this.settle());
    this.viewer.addHandler('update-viewport', () => this.draw());
    this.viewer.addHandler('resize', () => this.draw());
    void this.load();
  }

  close(): void {
    this.closed = true;
    this.frame.complete();
    this.viewer.destroy();
  }

  /**
   * The information document is read here and told its own address: what it states as its id is the public
   * one, and tiles from another origin (another name of the same machine) could not be drawn by WebGL.
   */
  private async load(): Promise<void> {
    const address = new URL(`/iiif/${this.source.imageId}~${this.source.revision}`, this.element.ownerDocument.baseURI)
      .href;
    try {
      const answer = await fetch(`${address}/info.json`);
      if (!answer.ok) throw new Error(`info.json: ${answer.status}`);
      const information = { ...((await answer.json()) as object), id: address };
      if (!this.closed) this.viewer.open({ tileSource: information });
    } catch {
      this.hasFailed.set(true); // no connection, or not to be seen any more: the page around it says which
    }
  }

  /** The whole picture. */
  fit(): void {
    this.viewer.viewport.goHome();
  }

  /** Zooms about a point of the element, or its middle. `glide` false follows fingers at once. */
  zoomBy(factor: number, about: ViewPoint | null, glide: boolean): void {
    const { viewport } = this.viewer;
    const point = about ? viewport.pointFromPixel(new OpenSeadragon.Point(about.x, about.y), !glide) : undefined;
    viewport.zoomBy(factor, point, !glide);
    viewport.applyConstraints(!glide);
  }

  /** To this many CSS pixels per image pixel. */
  zoomTo(zoom: number): void {
    const now = this.current()?.zoom;
    if (now) this.zoomBy(zoom / now, null, true);
  }

  /** Moves the picture by CSS pixels. */
  panBy(dx: number, dy: number): void {
    const { viewport } = this.viewer;
    viewport.panBy(viewport.deltaPointsFromPixels(new OpenSeadragon.Point(-dx, -dy), true), true);
    viewport.applyConstraints(true);
  }

  /** Brings an image point into the middle. */
  centreOn(point: { readonly x: number; readonly y: number }): void {
    const { viewport } = this.viewer;
    viewport.panTo(viewport.imageToViewportCoordinates(new OpenSeadragon.Point(point.x, point.y)));
    viewport.applyConstraints();
  }

  /** What is on the screen now, for a loupe; null while nothing is drawn. */
  get pixels(): HTMLCanvasElement | null {
    const canvas = this.element.querySelector('canvas');
    return canvas && canvas.width > 0 ? canvas : null;
  }

  private watchTiles(): void {
    const item = this.viewer.world.getItemAt(0);
    item.addHandler('fully-loaded-change', () => this.settle());
    this.draw();
    this.settle();
  }

  private settle(): void {
    this.isDrawn.set(this.viewer.world.getItemCount() > 0 && this.viewer.world.getItemAt(0).getFullyLoaded());
  }

  private draw(): void {
    const { viewer, source } = this;
    if (viewer.world.getItemCount() === 0) return;
    const item = viewer.world.getItemAt(0);
    const corner = (x: number, y: number) => item.imageToViewerElementCoordinates(new OpenSeadragon.Point(x, y));
    const size = viewer.viewport.getContainerSize();
    const viewport = Viewport.fromCorners(
      { origin: corner(0, 0), right: corner(source.width, 0), down: corner(0, source.height) },
      source,
      { width: size.x, height: size.y },
    );
    viewer.drawer.setImageSmoothingEnabled(viewport.zoom < PLAIN_PIXELS_FROM);
    this.current.set(viewport);
    this.frame.next(viewport);
  }
}

/**
 * The viewer writes a style of its own into the page, which the content security policy refuses and reports.
 * It doesn't where it finds one already: here it is, empty (our canvas has no focus of its own) and allowed.
 */
function forestallStyle(document: Document, nonce: string | null): void {
  const mark = 'data-openseadragon-mobile-css';
  if (document.querySelector(`style[${mark}]`)) return;
  const style = document.createElement('style');
  style.setAttribute(mark, 'true');
  if (nonce) style.nonce = nonce;
  document.head.append(style);
}
