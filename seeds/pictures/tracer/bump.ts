/** Bends a surface's normal as if its height varied by a formula of space (mm in, mm out). */
import type { Place, Surface } from './scene.js';

export function bend(
  surface: Surface,
  at: Place,
  step: number,
  height: (x: number, y: number, z: number) => number,
): void {
  const here = height(at.x, at.y, at.z);
  const gx = (height(at.x + step, at.y, at.z) - here) / step;
  const gy = (height(at.x, at.y + step, at.z) - here) / step;
  const gz = (height(at.x, at.y, at.z + step) - here) / step;
  const { nx, ny, nz } = surface;
  const along = gx * nx + gy * ny + gz * nz;
  surface.nx = nx - (gx - along * nx);
  surface.ny = ny - (gy - along * ny);
  surface.nz = nz - (gz - along * nz);
}
