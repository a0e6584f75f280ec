/** Points and directions of a scene, in millimetres; z is up. */
export interface Vector {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}

export const vec = (x: number, y: number, z: number): Vector => ({ x, y, z });
export const add = (a: Vector, b: Vector): Vector => ({ x: a.x + b.x, y: a.y + b.y, z: a.z + b.z });
export const sub = (a: Vector, b: Vector): Vector => ({ x: a.x - b.x, y: a.y - b.y, z: a.z - b.z });
export const times = (a: Vector, s: number): Vector => ({ x: a.x * s, y: a.y * s, z: a.z * s });
export const dot = (a: Vector, b: Vector): number => a.x * b.x + a.y * b.y + a.z * b.z;
export const length = (a: Vector): number => Math.sqrt(dot(a, a));
export const unit = (a: Vector): Vector => times(a, 1 / (length(a) || 1));
export const mix = (a: Vector, b: Vector, t: number): Vector => add(times(a, 1 - t), times(b, t));
export const cross = (a: Vector, b: Vector): Vector => ({
  x: a.y * b.z - a.z * b.y,
  y: a.z * b.x - a.x * b.z,
  z: a.x * b.y - a.y * b.x,
});

/** Two directions at right angles to a unit vector and to each other. */
export function aside(n: Vector): [Vector, Vector] {
  const a = unit(Math.abs(n.z) < 0.9 ? vec(-n.y, n.x, 0) : vec(0, -n.z, n.y));
  return [a, cross(n, a)];
}
