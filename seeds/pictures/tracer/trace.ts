/**
 * Light along a path: from the lens, off up to three surfaces; at each the lights are asked for directly, and the sky
 * by chance. Returns linear colour.
 *
 * @see Kajiya 1986, "The rendering equation"
 */
import type { Random } from '../random.js';
import type { Light, Material, Place, Scene, Surface } from './scene.js';
import { GROUND, type Hit } from './solids.js';
import { Tree } from './tree.js';

export class Tracer {
  private readonly tree: Tree;
  private readonly hit: Hit = { t: 0, solid: -1, nx: 0, ny: 0, nz: 0, u: 0, v: 0 };
  private readonly shadow: Hit = { t: 0, solid: -1, nx: 0, ny: 0, nz: 0, u: 0, v: 0 };
  private readonly surface: Surface = {
    r: 0,
    g: 0,
    b: 0,
    gloss: 0,
    rough: 1,
    through: 0,
    er: 0,
    eg: 0,
    eb: 0,
    nx: 0,
    ny: 0,
    nz: 1,
  };
  private readonly sky = new Float64Array(3);

  constructor(
    private readonly scene: Scene,
    private readonly random: Random,
    private readonly bounces = 3,
  ) {
    this.tree = new Tree(scene.solids);
  }

  /** Colour along a ray (origin and direction, six numbers), added to `out`. */
  path(ray: Float64Array, out: Float64Array): void {
    const { scene, hit, surface, random } = this;
    let [ox, oy, oz, dx, dy, dz] = ray as unknown as [number, number, number, number, number, number];
    let wr = 1;
    let wg = 1;
    let wb = 1;
    let mirror = true; // lights themselves are seen only directly or in gloss; elsewhere they were asked for
    for (let bounce = 0; bounce <= this.bounces; bounce++) {
      if (!this.meet(ox, oy, oz, dx, dy, dz)) {
        scene.sky(dx, dy, dz, this.sky);
        if (mirror && bounce > 0) this.addLamps(dx, dy, dz);
        out[0]! += wr * this.sky[0]!;
        out[1]! += wg * this.sky[1]!;
        out[2]! += wb * this.sky[2]!;
        return;
      }
      const px = ox + dx * hit.t;
      const py = oy + dy * hit.t;
      const pz = oz + dz * hit.t;
      if (hit.nx * dx + hit.ny * dy + hit.nz * dz > 0) this.flip();
      const gx = hit.nx;
      const gy = hit.ny;
      const gz = hit.nz;
      this.ask({
        x: px,
        y: py,
        z: pz,
        u: hit.u,
        v: hit.v,
        shade: hit.solid >= 0 ? scene.solids.shades[hit.solid]! : 0,
      });
      const s = { ...surface };
      out[0]! += wr * s.er;
      out[1]! += wg * s.eg;
      out[2]! += wb * s.eb;
      const lx = px + gx * 2e-4;
      const ly = py + gy * 2e-4;
      const lz = pz + gz * 2e-4;
      for (const light of scene.lights)
        this.addLight(light, s, lx, ly, lz, gx, gy, gz, dx, dy, dz, wr, wg, wb, out, bounce);
      if (bounce === this.bounces) return;
      // Gloss or scatter, by their shares.
      const facing = Math.max(0, -(s.nx * dx + s.ny * dy + s.nz * dz));
      const shine = s.gloss + (1 - s.gloss) * (s.gloss > 0 ? 0.6 * (1 - facing) ** 5 * (1 - s.rough) : 0);
      const chance = s.gloss > 0 ? Math.min(0.5, Math.max(0.15, shine * 2)) : 0;
      if (chance > 0 && random.next() < chance) {
        const k = 2 * (dx * s.nx + dy * s.ny + dz * s.nz);
        const spread = s.rough * s.rough;
        dx = dx - k * s.nx + spread * random.normal() * 0.6;
        dy = dy - k * s.ny + spread * random.normal() * 0.6;
        dz = dz - k * s.nz + spread * random.normal() * 0.6;
        wr *= shine / chance;
        wg *= shine / chance;
        wb *= shine / chance;
        mirror = false; // the lamps' gloss is part of addLight
      } else {
        const turn = 2 * Math.PI * random.next();
        const high = 2 * random.next() - 1;
        const ring = Math.sqrt(1 - high * high);
        dx = s.nx + ring * Math.cos(turn) * 0.999;
        dy = s.ny + ring * Math.sin(turn) * 0.999;
        dz = s.nz + high * 0.999;
        const keep = (1 - shine) / (1 - chance);
        wr *= s.r * keep;
        wg *= s.g * keep;
        wb *= s.b * keep;
        mirror = false;
      }
      const n = 1 / Math.sqrt(dx * dx + dy * dy + dz * dz);
      dx *= n;
      dy *= n;
      dz *= n;
      const out0 = dx * gx + dy * gy + dz * gz;
      if (out0 < 0) {
        dx -= 2 * out0 * gx;
        dy -= 2 * out0 * gy;
        dz -= 2 * out0 * gz;
      }
      ox = lx;
      oy = ly;
      oz = lz;
      if (Math.max(wr, wg, wb) < 0.012) return;
    }
  }

  private addLight(
    light: Light,
    s: Surface,
    lx: number,
    ly: number,
    lz: number,
    gx: number,
    gy: number,
    gz: number,
    dx: number,
    dy: number,
    dz: number,
    wr: number,
    wg: number,
    wb: number,
    out: Float64Array,
    bounce: number,
  ): void {
    const { random } = this;
    let x = light.x + light.spread * (random.next() + random.next() - 1) * 1.2;
    let y = light.y + light.spread * (random.next() + random.next() - 1) * 1.2;
    let z = light.z + light.spread * (random.next() + random.next() - 1) * 1.2;
    const n = 1 / Math.sqrt(x * x + y * y + z * z);
    x *= n;
    y *= n;
    z *= n;
    const geometric = x * gx + y * gy + z * gz;
    const facing = s.nx * x + s.ny * y + s.nz * z;
    const wrapped = (facing + s.through) / (1 + s.through);
    if (wrapped <= 0 || (geometric <= 0 && s.through === 0)) return;
    // Light that comes round the back starts its way to the lamp on the far side.
    const side = geometric > 0 ? 0 : -4e-4;
    if (geometric > 0 && this.blocked(lx + gx * side, ly + gy * side, lz + gz * side, x, y, z)) return;
    const lit = facing > 0 ? wrapped : wrapped * 0.8;
    // Flesh colours what passes through it more deeply.
    const deep = facing > 0 ? 0 : s.through;
    let r = s.r * lit * (1 - deep + deep * s.r * 1.4);
    let g = s.g * lit * (1 - deep + deep * s.g * 1.4);
    let b = s.b * lit * (1 - deep + deep * s.b * 1.4);
    if (s.gloss > 0 && geometric > 0 && bounce < 2) {
      const hx = x - dx;
      const hy = y - dy;
      const hz = z - dz;
      const h = 1 / Math.sqrt(hx * hx + hy * hy + hz * hz);
      const c = (hx * s.nx + hy * s.ny + hz * s.nz) * h;
      const a2 = Math.max(0.0004, s.rough ** 4);
      const d = c * c * (a2 - 1) + 1;
      const cosine = Math.max(0, (x * hx + y * hy + z * hz) * h);
      const fresnel = s.gloss + (1 - s.gloss) * (1 - cosine) ** 5;
      const shine =
        c > 0 ? Math.min(9, (fresnel * a2) / (4 * d * d) / Math.max(0.25, -(dx * s.nx + dy * s.ny + dz * s.nz))) : 0;
      r += shine;
      g += shine;
      b += shine;
    }
    out[0]! += wr * r * light.r;
    out[1]! += wg * g * light.g;
    out[2]! += wb * b * light.b;
  }

  private addLamps(dx: number, dy: number, dz: number): void {
    for (const light of this.scene.lights) {
      const c = dx * light.x + dy * light.y + dz * light.z;
      if (c < 1 - light.spread * light.spread) continue;
      this.sky[0]! += light.r;
      this.sky[1]! += light.g;
      this.sky[2]! += light.b;
    }
  }

  private flip(): void {
    const { hit } = this;
    hit.nx = -hit.nx;
    hit.ny = -hit.ny;
    hit.nz = -hit.nz;
  }

  private meet(ox: number, oy: number, oz: number, dx: number, dy: number, dz: number): boolean {
    const { hit, scene } = this;
    hit.t = 1e9;
    hit.solid = -1;
    this.tree.meet(ox, oy, oz, dx, dy, dz, hit, false);
    scene.ground?.meet(ox, oy, oz, dx, dy, dz, hit);
    return hit.solid !== -1;
  }

  private blocked(ox: number, oy: number, oz: number, dx: number, dy: number, dz: number): boolean {
    const { shadow, scene } = this;
    shadow.t = 1e9;
    if (this.tree.meet(ox, oy, oz, dx, dy, dz, shadow, true)) return true;
    return scene.ground?.meet(ox, oy, oz, dx, dy, dz, shadow) ?? false;
  }

  private ask(at: Place): void {
    const { hit, scene, surface } = this;
    surface.gloss = 0;
    surface.rough = 1;
    surface.through = 0;
    surface.er = surface.eg = surface.eb = 0;
    surface.nx = hit.nx;
    surface.ny = hit.ny;
    surface.nz = hit.nz;
    const n = hit.solid === GROUND ? 0 : 1;
    const material: Material | undefined =
      n === 0 ? scene.groundMaterial : scene.materials[scene.solids.materials[hit.solid]!];
    if (!material) throw new Error('A solid has a material that the scene does not have.');
    material(at, surface);
    const l = 1 / Math.sqrt(surface.nx ** 2 + surface.ny ** 2 + surface.nz ** 2);
    surface.nx *= l;
    surface.ny *= l;
    surface.nz *= l;
  }
}
