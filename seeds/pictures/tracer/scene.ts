/** What a scene is made of, and how its materials answer to light. */
import type { Camera } from './camera.js';
import type { Ground } from './ground.js';
import type { Solids } from './solids.js';

/** What a material says about one place; the tracer reuses one object for all. */
export interface Surface {
  /** Colour of scattered light, linear. */
  r: number;
  g: number;
  b: number;
  /** Strength and width of the gloss: reflectance head-on, and roughness 0 (mirror) to 1. */
  gloss: number;
  rough: number;
  /** Part of the light that goes through the skin, 0 to 1. */
  through: number;
  /** Own light, linear. */
  er: number;
  eg: number;
  eb: number;
  /** Bent normal; begins as the true one. */
  nx: number;
  ny: number;
  nz: number;
}

export interface Place {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly u: number;
  readonly v: number;
  readonly shade: number;
}

export type Material = (at: Place, surface: Surface) => void;

export interface Light {
  /** Towards the light, unit length. */
  readonly x: number;
  readonly y: number;
  readonly z: number;
  /** Sine of its half width as seen from the scene: large is soft. */
  readonly spread: number;
  readonly r: number;
  readonly g: number;
  readonly b: number;
}

export interface Sky {
  (dx: number, dy: number, dz: number, out: Float64Array): void;
}

export interface Scene {
  readonly solids: Solids;
  readonly ground: Ground | null;
  readonly materials: readonly Material[];
  readonly groundMaterial: Material;
  readonly lights: readonly Light[];
  readonly sky: Sky;
  readonly camera: Camera;
}
