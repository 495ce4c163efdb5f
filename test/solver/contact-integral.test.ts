import { describe, expect, it } from 'vitest';
import { logOccupancy } from '../../solver/contact-integral.ts';
import { BOLTZMANN, ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { WAVE } from '../../solver/barrier-shape.ts';
import { contactPath, type ContactPath } from '../../solver/contact-path.ts';
import { carrierConductance, isMissing } from '../../solver/contact-resistivity.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { integratePeaked } from '../../solver/peaked-integral.ts';
import { GAUSS_5 } from '../../solver/quadrature.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import { isRefusal } from '../../solver/solution.ts';
import { metal, SILICON } from './contact-fixtures.ts';
import { dopant } from './point-fixtures.ts';
import { layer, stackOf } from './stack-fixtures.ts';

/** Pseudo-random numbers from 0 to 1: the linear congruence of Numerical Recipes (1992), from memory. */
function randomFrom(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 1664525 + 1013904223) >>> 0) / 2 ** 32;
}

/** The band of electrons on the way, cut into many short pieces: [from, to, U]. */
function piecesOf(path: ContactPath, image: number, kT: number): { from: number; to: number; u: (s: number) => number }[] {
  const pieces: { from: number; to: number; u: (s: number) => number }[] = [];
  for (let i = 0; i + 1 < path.s.length; i++) {
    const [a, b] = [path.s[i], path.s[i + 1]];
    if (!(b > a)) continue;
    const h = b - a;
    const u = (s: number): number => {
      const t = (s - a) / h;
      const r = 1 - t;
      const psi = r * r * (1 + 2 * t) * path.psi[i] + t * t * (3 - 2 * t) * path.psi[i + 1] + h * t * r * (r * path.slope[i] - t * path.slope[i + 1]);
      return r * path.conduction[i] + t * path.conduction[i + 1] - psi - (image > 0 ? image / s : 0);
    };
    let from = a;
    while (from < b) {
      // Next to the metal the image force asks for pieces that grow with the distance.
      const step = image > 0 ? Math.min(h / 6, Math.max(0.15 * from, image / 20)) : h / 6;
      const to = b - from < 1.01 * step ? b : from + step;
      pieces.push({ from, to, u });
      from = to;
    }
  }
  // Behind the way's end the bands settle exponentially.
  const last = path.s.length - 1;
  const height = path.conduction[last] - path.psi[last] - path.ecMinusEf;
  const length = height / path.slope[last];
  if (height > 0 && height < kT && length > 0 && length < path.s[last]) {
    const u = (s: number): number => path.ecMinusEf + height * Math.exp(-(s - path.s[last]) / length);
    for (let k = 0; k < 160; k++) pieces.push({ from: path.s[last] + 0.25 * k * length, to: path.s[last] + 0.25 * (k + 1) * length, u });
  }
  return pieces;
}

/** 2 Int kappa ds in the crudest sure way: five Gauss points a piece, and where U crosses E the root as a new variable. */
function exponentOf(pieces: ReturnType<typeof piecesOf>, mass: number, energy: number): number {
  let sum = 0;
  for (const { from, to, u } of pieces) {
    const a = (from > 0 ? u(from) : u(1e-3 * to)) - energy;
    const b = u(to) - energy;
    if (a <= 0 && b <= 0) continue;
    let [low, high] = [from, to];
    if (a <= 0 || b <= 0) {
      for (let k = 0; k < 50; k++) {
        const middle = 0.5 * (low + high);
        if (u(middle) - energy > 0 === a > 0) low = middle;
        else high = middle;
      }
    }
    const [start, end] = a > 0 && b > 0 ? [from, to] : a > 0 ? [low, from] : [high, to];
    const rooted = a <= 0 || b <= 0;
    GAUSS_5.nodes.forEach((v, g) => {
      const s = rooted ? start + (end - start) * v * v : start + (end - start) * v;
      const depth = u(s) - energy;
      if (depth > 0) sum += GAUSS_5.weights[g] * Math.abs(end - start) * (rooted ? 2 * v : 1) * Math.sqrt(depth);
    });
  }
  return 2 * Math.sqrt(WAVE * mass) * sum;
}

/** ln of Int T f dE/kT by brute force: Gauss panels everywhere, and a kT wide near EF and the band's edge. */
function bruteForce(path: ContactPath, image: number, mass: number, kT: number): number {
  const edge = path.ecMinusEf;
  const pieces = piecesOf(path, image, kT);
  let top = edge;
  for (const { from, to, u } of pieces) for (let k = 0; k <= 20; k++) if (from + k > 0) top = Math.max(top, u(from + ((to - from) * k) / 20 || 1e-3 * to));
  // The top lies between two of those places at most a 1e-3 kT higher; T is 1 within an exponent of that.
  const ends = Array.from({ length: 61 }, (_, i) => edge + (top - edge) * Math.sin((Math.PI / 2) * (i / 60)) ** 2);
  for (let k = -20; k <= 32; k++) ends.push(k * kT, edge + Math.abs(k) * kT, edge + (Math.abs(k) / 32) ** 3 * kT);
  const panels = ends.filter((e) => e >= edge && e <= top).sort((a, b) => a - b);
  const logs: [number, number][] = [];
  for (let i = 0; i + 1 < panels.length; i++) {
    GAUSS_5.nodes.forEach((v, g) => {
      const energy = panels[i] + v * (panels[i + 1] - panels[i]);
      logs.push([-exponentOf(pieces, mass, energy) + logOccupancy(energy / kT), (GAUSS_5.weights[g] * (panels[i + 1] - panels[i])) / kT]);
    });
  }
  const over = top / kT > 30 ? -top / kT : Math.log(Math.log1p(Math.exp(-top / kT)));
  const peak = Math.max(over, ...logs.map(([log]) => log));
  return peak + Math.log(Math.exp(over - peak) + logs.reduce((sum, [log, weight]) => sum + weight * Math.exp(log - peak), 0));
}

describe('the integral over energy and depth', () => {
  it('of 200 random contacts between 4 and 600 K reports an error below 1e-5, and is as near to brute force', () => {
    const random = randomFrom(20);
    const between = (a: number, b: number): number => a * (b / a) ** random();
    let compared = 0;
    for (let i = 0; i < 200; i++) {
      const [T, N, height, imageForce] = [between(4, 600), between(1e16, 5e20), 0.15 + 0.75 * random(), random() < 0.4];
      const below = between(1e17, 1e20);
      const cap = between(3, 60);
      const layers = [layer('cap', cap, [dopant('donor', N, { model: 'complete' })], SILICON), layer('n', 500, [dopant('donor', below, { model: 'complete' })], SILICON)];
      const s = solveStack(stackOf(layers, { T, top: metal(height, imageForce) }), { contacts: false });
      if (isRefusal(s)) throw new Error(s.reason);
      const path = contactPath(s.stack, s.profiles, spaceChargeOf(s.stack, s.profiles), 'top');
      if (!path?.electrons) continue;
      const found = carrierConductance(s.stack, path, 'electron');
      if (isMissing(found)) throw new Error(found.missing);
      const name = `${i}: ${T} K, ${N}, ${height} eV, ${imageForce}`;
      expect(found.error, name).toBeLessThan(1e-5);
      // 3e-5 leaves room for what brute force misses itself. It is slow: every fifth.
      if (i % 5 !== 0) continue;
      const kT = BOLTZMANN * T;
      const image = imageForce ? ELEMENTARY_CHARGE / (16 * Math.PI * SILICON.permittivityHighFrequency * EPSILON_0) : 0;
      const ours = found.log - Math.log((110 / BOLTZMANN ** 2) * kT);
      expect(Math.abs(ours - bruteForce(path, image, 0.26, kT)), name).toBeLessThan(3e-5);
      compared++;
    }
    expect(compared).toBeGreaterThan(30);
  }, 120_000);
});

describe('the interpolated integral', () => {
  it('of a Gaussian times a step as sharp as wished is the closed form, with few values of the dear factor', () => {
    // Int from -6 to 0 of exp(-x^2): sqrt(pi)/2 but for 2e-17, cut off by a step of 1e-4.
    const step = 1e-4;
    const { value, error, evaluations } = integratePeaked({ dear: (x) => -x * x, cheap: (x) => logOccupancy(x / step) }, [-6, 6], [-12 * step, -3 * step, 3 * step, 12 * step], 0, 1e-8);
    expect(evaluations).toBeLessThanOrEqual(17);
    // A step of width w shifts the end by no more than its second moment, pi^2/6 w^2 times the slope, here 0.
    expect(Math.abs(value / (Math.sqrt(Math.PI) / 2) - 1)).toBeLessThan(2e-8);
    expect(error).toBeLessThan(1e-8);
  });

  it('halves its panels about a bend, and owns up to what is left when there may be no more', () => {
    const bent = { dear: (x: number): number => -Math.abs(x - 0.3) * 5, cheap: (): number => 0 };
    const exact = (2 - Math.exp(-1.5) - Math.exp(-3.5)) / 5;
    const enough = integratePeaked(bent, [0, 1], [], 0, 1e-6);
    expect(Math.abs(enough.value - exact)).toBeLessThan(3e-6 * exact);
    const few = integratePeaked(bent, [0, 1], [], 0, 1e-10, 0, 2);
    expect(few.error).toBeGreaterThan(1e-10 * exact);
    expect(Math.abs(few.value - exact)).toBeLessThan(few.error);
  });
});
