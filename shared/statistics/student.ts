import quantile from '@stdlib/stats-base-dists-t-quantile';
import { DomainError, requirePositive } from '../errors.js';

/**
 * Quantile of Student's t.
 *
 * @param p probability, between 0 and 1 exclusive
 * @param degreesOfFreedom positive, need not be whole; Infinity gives the normal distribution
 * @throws {DomainError} `not-a-probability`; `not-positive`
 * @example tQuantile(0.975, 9) // 2.2621572 (NIST/SEMATECH e-Handbook 1.3.6.7.2)
 */
export function tQuantile(p: number, degreesOfFreedom: number): number {
  requireProbability(p);
  if (!(degreesOfFreedom > 0)) requirePositive(degreesOfFreedom, 'degreesOfFreedom');
  return degreesOfFreedom > MANY ? normalQuantile(p) : quantile(p, degreesOfFreedom);
}

/** Beyond this t and normal agree to 1e-10. */
const MANY = 1e10;

/**
 * Quantile of the standard normal distribution, to about 1e-15: a rational first guess
 * (Abramowitz & Stegun 1964, 26.2.23; from memory) and Newton steps on the integral.
 */
export function normalQuantile(p: number): number {
  requireProbability(p);
  const tail = Math.min(p, 1 - p);
  const t = Math.sqrt(-2 * Math.log(tail));
  let z =
    t - (2.515517 + 0.802853 * t + 0.010328 * t * t) / (1 + 1.432788 * t + 0.189269 * t * t + 0.001308 * t * t * t);
  for (let step = 0; step < 4; step++) z += (normalTail(z) - tail) / normalDensity(z);
  return p < 0.5 ? -z : z;
}

/** Density of the standard normal distribution. */
export function normalDensity(z: number): number {
  return Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
}

/** Probability that a standard normal value is at most z. */
export function normalProbability(z: number): number {
  return z < 0 ? normalTail(-z) : 1 - normalTail(z);
}

/** Upper tail for z ≥ 0: half of the regularised incomplete gamma Q(½, z²/2). */
function normalTail(z: number): number {
  const x = 0.5 * z * z;
  if (z < 2) {
    // series: Φ(z) − ½ = φ(z)·(z + z³/3 + z⁵/15 + …)
    let term = z;
    let sum = z;
    for (let n = 3; Math.abs(term) > 1e-17 * Math.abs(sum) && n < 400; n += 2) {
      term *= (z * z) / n;
      sum += term;
    }
    return 0.5 - normalDensity(z) * sum;
  }
  // continued fraction (Laplace), evaluated from the far end
  let fraction = z;
  for (let k = 200; k >= 1; k--) fraction = z + k / fraction;
  return Number.isFinite(x) ? normalDensity(z) / fraction : 0;
}

/**
 * Probability that |t| is at least as large, both tails together.
 *
 * @param t the statistic
 * @param degreesOfFreedom positive
 * @see Abramowitz & Stegun 1964, 26.7.1: I_x(ν/2, ½) with x = ν/(ν + t²) (from memory)
 */
export function tTwoSidedP(t: number, degreesOfFreedom: number): number {
  requirePositive(degreesOfFreedom, 'degreesOfFreedom');
  return incompleteBeta(degreesOfFreedom / (degreesOfFreedom + t * t), degreesOfFreedom / 2, 0.5);
}

/** Regularised incomplete beta I_x(a, b), by its continued fraction (modified Lentz). */
function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  // the fraction converges fast only below this bound; the symmetry serves the rest
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(1 - x, b, a);
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  const notZero = (value: number) => (Math.abs(value) < 1e-300 ? 1e-300 : value);
  let c = 1;
  let d = 1 / notZero(1 - ((a + b) * x) / (a + 1));
  let result = d;
  for (let m = 1; m < 500; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / notZero(1 + even * d);
    c = notZero(1 + even / c);
    result *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / notZero(1 + odd * d);
    c = notZero(1 + odd / c);
    result *= d * c;
    if (Math.abs(d * c - 1) < 1e-15) break;
  }
  return (front * result) / a;
}

/** ln Γ(x) for x > 0: shifted up to 10, then Stirling's series. */
function logGamma(x: number): number {
  let shift = 0;
  let at = x;
  while (at < 10) {
    shift += Math.log(at);
    at += 1;
  }
  const inverse = 1 / (at * at);
  const series = (1 / 12 - inverse * (1 / 360 - inverse * (1 / 1260 - inverse * (1 / 1680 - inverse / 1188)))) / at;
  return (at - 0.5) * Math.log(at) - at + 0.5 * Math.log(2 * Math.PI) + series - shift;
}

function requireProbability(p: number): void {
  if (!(p > 0 && p < 1)) throw new DomainError('not-a-probability', `Must lie between 0 and 1, was ${p}.`);
}
