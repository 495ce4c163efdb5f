import { METAL_BAND, type BarrierShape } from './barrier-shape.ts';
import { waveStepsFor, waveTransmission } from './exact-transmission.ts';
import { integratePeaked, type PeakedResult } from './peaked-integral.ts';
import { integrate } from './quadrature.ts';
import { logTransmission, type LogTransmission, type Transmission } from './transmission.ts';
import { wkbExponent, type Dispersion } from './wkb.ts';

/** ln of Fermi's occupancy at an energy over kT. */
export function logOccupancy(u: number): number {
  return u > 0 ? -u - Math.log1p(Math.exp(-u)) : -Math.log1p(Math.exp(u));
}

/** ln of ln(1 + exp(-u)): the integral of the occupancy above u, in kT. */
export function logOccupancyAbove(u: number): number {
  return u > 30 ? -u : Math.log(u < 0 ? -u + Math.log1p(Math.exp(u)) : Math.log1p(Math.exp(-u)));
}

/** Relative error asked of the integral over energy, and of T at one energy. */
export const ACCURACY = 2e-6;
const DEPTH_ACCURACY = 1.5e-6;
const WAVE_ACCURACY = 1e-6;
/** What is reported, over the estimates: of 1,600 random contacts between 4 and 600 K, 1 in 50 was off by more than its estimate, and none by more than three times. */
const CAUTION = 2.5;
/** Height of a barrier, kT, above which its cells are held against finer ones, and how much better those are reckoned. */
const COLD = 60;
const COARSER = 4;
/** Cells of the barrier at most so many times finer than usual. */
const MOST_FINENESS = 16;
/** Places at which the stretch of energies that counts is looked for, and how far below the peak it ends, in natural logarithms. */
const SCAN = 18;
const DEPTH = 18;
/** A place of that stretch whose neighbour lies so much lower is too far from it; and how often they are halved at most. */
const FAR = 60;
const MOST_NARROWINGS = 60;
/** Panels that an integral may take. A wave kept between two steps of a thick undoped layer rings in energy more finely than can be followed: the error says so. */
const MOST_PANELS = { wkb: 24, kemble: 24, exact: 14 };
/** Above this error T itself is summed, for an average over its ringing comes out better than its logarithm; and the panels that this may take. */
const RINGING = 1e-3;
const MOST_RINGING = 14;
/** Errors beyond which there is no figure: of T by its steps, and of the whole, which may still tell the decade. */
const LOST = 1;
const LOST_DECADE = 9;
/** With T = 1 above the top, a part so small that T is not looked at there. */
const NEXT_TO_NOTHING = 1e-8;
/** The smallest root of (E - edge)/kT that is looked at where there is no barrier. */
const SMALLEST_ROOT = 1e-4;
/** A barrier below this many kT is none. */
const NO_BARRIER = 1e-3;
/** Reach above the top and above EF, kT. */
const REACH = 18;
/** Where the occupancy bends, kT from EF. */
const KNEE = [-12, -3, 3, 12];
/** Height of the barrier, kT, above which those count. */
const SHARP = 40;
/** Energies where T(E) bends that are minded at most, and how near two may come, of the barrier's height. */
const MOST_BENDS = 6;
const NEAR = 1e-4;

export interface LogIntegral {
  log: number;
  /** relative */ error: number;
  /** energies times depths that T was looked at for */ work: number;
}

/**
 * ln of Int T f dE/kT above the neutral edge, with its relative error: of the integral over energy, and of that over depth. Infinite where waves cannot be followed well enough for a figure.
 *
 * @param finer  the same barrier in cells as many times finer
 *
 * T(E) bends where E passes a hill, a dale or a step of the band: there the range from the edge to the top is cut. In each piece E = a + (b - a) sin^2(pi v/2), which smooths the
 * roots at both ends. The peak of T f is looked for first; what lies e^-18 below it is left out. ln T is smooth between the bends and is interpolated
 * (peaked-integral.ts), so that the occupancy may be as sharp as the cold makes it.
 */
export function logIntegral(shape: BarrierShape, finer: (fineness: number) => BarrierShape, kind: Transmission, dispersion: Dispersion, accuracy: number): LogIntegral {
  const { edge, top, kT } = shape;
  const above = logOccupancyAbove(top / kT);
  const climbs = top - edge > NO_BARRIER * kT;
  const axis = climbs ? energyAxis(shape, kind === 'exact' ? [] : bendsOf(shape)) : null;
  const rough: LogTransmission = (energy) => (energy >= top ? 0 : -wkbExponent(shape, energy, dispersion));
  const stretch = axis ? stretchOf(axis, rough, above, kT) : { from: 0, to: 0, place: 0, peak: above, energies: [top], lowest: top };
  const { transmission: each, error: depthError, places } = settled(shape, finer, kind, dispersion, kind === 'exact' ? [stretch.lowest, ...stretch.energies] : stretch.energies, Math.min(1, accuracy / ACCURACY));
  if (!(depthError < LOST)) return { log: -Infinity, error: Infinity, work: 0 };
  let work = 0;
  const transmission: LogTransmission = (energy) => {
    work += places;
    return each(energy);
  };
  const shift = stretch.peak;
  // The metal's band holds holes no deeper than its bottom.
  const ceiling = kind === 'exact' && shape.carrier === 'hole' ? METAL_BAND - NO_BARRIER * kT : Infinity;
  let sum = 0;
  let error = 0;
  if (axis) {
    // The wave's T grows as the root of E above the edge, which is taken along with the cheap part.
    const rootAt = (x: number): number => (kind === 'exact' ? 0.5 * Math.log((axis.energy(x) - edge) / (top - edge)) : 0);
    const integrand = {
      dear: (x: number): number => transmission(axis.energy(x)) - rootAt(x),
      cheap: (x: number): number => axis.logShare(x, kT) + rootAt(x),
    };
    const from = kind === 'exact' ? Math.max(stretch.from, 1e-7) : stretch.from;
    const to = Math.min(stretch.to, axis.place(ceiling));
    const inner = [...axis.ends, stretch.place].filter((x) => x > from && x < to).sort((a, b) => a - b);
    const bottom = Math.exp(above - shift);
    const below = integratePeaked(integrand, [from, ...inner, to], top - edge > SHARP * kT ? KNEE.map((u) => axis.place(u * kT)) : [], shift, accuracy, kind === 'wkb' ? bottom : 0, MOST_PANELS[kind] + inner.length);
    const direct = kind === 'exact' && below.error > RINGING * below.value ? integrate((x) => Math.exp(integrand.dear(x) + integrand.cheap(x) - shift), [from, ...inner, to], accuracy, 0, MOST_RINGING) : below;
    const { value, error: off } = direct.error < below.error ? direct : below;
    sum += value;
    error += off;
  }
  const rest = Math.exp(above - shift);
  if (kind === 'wkb' || rest < NEXT_TO_NOTHING * sum) sum += rest;
  else {
    const over = overTheTop(shape, transmission, kind, shift, accuracy, sum, ceiling);
    sum += over.value;
    error += over.error;
  }
  // In the metal's band there are no holes so deep: nothing passes at all.
  if (sum === 0) return { log: -Infinity, error: depthError, work };
  const off = CAUTION * (error / sum + depthError);
  return Number.isFinite(sum) && off < LOST_DECADE ? { log: shift + Math.log(sum), error: off, work } : { log: -Infinity, error: Infinity, work };
}

/** The part above the barrier's top, or above the edge where there is no barrier. @param known  the part below, on the same scale */
function overTheTop(shape: BarrierShape, transmission: LogTransmission, kind: Transmission, shift: number, accuracy: number, known: number, ceiling: number): PeakedResult {
  const { edge, top, kT } = shape;
  const first = Math.max(top, edge);
  const last = Math.min(ceiling, Math.max(first, 0) + REACH * kT);
  if (!(last > first)) return { value: 0, error: 0, evaluations: 0 };
  if (kind === 'exact' && first === edge) {
    // From the neutral edge on the wave's T grows as the root w of (E - edge)/kT, and is smooth in w.
    const end = Math.sqrt((last - first) / kT);
    const integrand = { dear: (w: number): number => transmission(first + kT * w * w) - Math.log(w), cheap: (w: number): number => logOccupancy(first / kT + w * w) + Math.log(2 * w * w) };
    const ends = [SMALLEST_ROOT, ...[0.5, 2].filter((w) => w < end), end];
    return integratePeaked(integrand, ends, KNEE.filter((u) => u > first / kT).map((u) => Math.sqrt(u - first / kT)), shift, accuracy, known, MOST_PANELS.exact);
  }
  // Kemble's exponent bends where it stops to mirror the barrier.
  const mirrored = kind === 'kemble' ? [top + (top - edge)] : [];
  const ends = [first, ...[Math.max(first, 0) + 4 * kT, ...mirrored].filter((e) => e > first && e < last).sort((a, b) => a - b), last];
  const integrand = { dear: transmission, cheap: (energy: number): number => logOccupancy(energy / kT) - Math.log(kT) };
  return integratePeaked(integrand, ends, KNEE.map((u) => u * kT), shift, accuracy, known, MOST_PANELS[kind]);
}

/** Energies from the edge to the top by a coordinate that runs through one unit a piece. */
interface EnergyAxis {
  ends: number[];
  energy(x: number): number;
  /** ln of f dE/dx/kT */ logShare(x: number, kT: number): number;
  /** the coordinate of an energy, clamped to the axis */ place(energy: number): number;
}

function energyAxis(shape: BarrierShape, bends: readonly number[]): EnergyAxis {
  const marks = [shape.edge, ...bends, shape.top];
  const last = marks.length - 2;
  const piece = (x: number): number => Math.max(0, Math.min(last, Math.floor(x)));
  return {
    ends: marks.map((_, i) => i),
    energy: (x) => {
      const i = piece(x);
      return marks[i] + (marks[i + 1] - marks[i]) * Math.sin(0.5 * Math.PI * (x - i)) ** 2;
    },
    logShare: (x, kT) => {
      const i = piece(x);
      const height = marks[i + 1] - marks[i];
      const s = Math.sin(0.5 * Math.PI * (x - i));
      const u = (marks[i] + height * s * s) / kT;
      const slope = (height / kT) * Math.PI * s * Math.sqrt(Math.max(0, 1 - s * s));
      return u > 0 ? Math.log(slope / (1 + Math.exp(-u))) - u : Math.log(slope / (1 + Math.exp(u)));
    },
    place: (energy) => {
      if (energy <= shape.edge) return 0;
      if (energy >= shape.top) return last + 1;
      const i = Math.max(0, marks.findIndex((mark) => mark > energy) - 1);
      return i + (2 / Math.PI) * Math.asin(Math.sqrt((energy - marks[i]) / (marks[i + 1] - marks[i])));
    },
  };
}

/** Energies of the hills, dales and steps between the edge and the top, rising. */
function bendsOf(shape: BarrierShape): number[] {
  const { before, after, layer, edge, top } = shape;
  const least = NEAR * (top - edge);
  const found: number[] = [];
  for (let k = 0; k + 1 < layer.length; k++) {
    const step = Math.abs(before[k + 1] - after[k]) > least;
    const turn = (after[k] - before[k]) * (after[k + 1] - before[k + 1]) < 0;
    if (step) found.push(after[k], before[k + 1]);
    else if (turn) found.push(after[k]);
  }
  const rising = found.filter((energy) => energy > edge + least && energy < top - least).sort((a, b) => a - b);
  const apart = rising.filter((energy, i) => i === 0 || energy - rising[i - 1] > least);
  return apart.slice(0, MOST_BENDS);
}

interface Stretch {
  from: number;
  to: number;
  /** of the peak */ place: number;
  /** ln of the integrand at its peak, or of the part above the top where that is larger */ peak: number;
  /** where most of the current goes, eV: the peak and a place on either side */ energies: number[];
  /** where it begins, eV */ lowest: number;
}

function stretchOf(axis: EnergyAxis, rough: LogTransmission, above: number, kT: number): Stretch {
  const pieces = axis.ends.length - 1;
  const each = Math.ceil(SCAN / pieces) + (pieces > 1 ? 3 : 0);
  const places = Array.from({ length: pieces * each }, (_, j) => (j + 0.5) / each);
  // In the cold the occupancy ends between two places.
  for (const energy of [0, -2 * kT]) {
    const x = axis.place(energy);
    if (x > 0 && x < pieces) places.push(x);
  }
  places.sort((a, b) => a - b);
  const logAt = (x: number): number => rough(axis.energy(x)) + axis.logShare(x, kT);
  const logs = places.map(logAt);
  narrow(places, logs, logAt, above);
  const best = logs.indexOf(Math.max(...logs));
  const peak = Math.max(above, logs[best]);
  const kept = logs.map((v, j) => (v > peak - DEPTH ? j : -1)).filter((j) => j >= 0);
  // Nothing of what lies below the top counts, but the places next to it are looked at all the same.
  const first = kept.length > 0 ? kept[0] : places.length - 1;
  const last = kept.length > 0 ? kept[kept.length - 1] : places.length - 1;
  const near = kept.filter((j) => logs[j] > peak - 3);
  const energies = near.length > 0 ? [axis.energy(places[best]), axis.energy(places[near[0]]), axis.energy(places[near[near.length - 1]])] : [axis.energy(axis.ends[pieces])];
  const from = first > 0 ? places[first - 1] : 0;
  return { from, place: places[best], to: last + 1 < places.length ? places[last + 1] : pieces, peak, energies: [...new Set(energies)], lowest: axis.energy(from) };
}

/**
 * Adds places to a scan until none next to the peak, nor next to where the integrand ends, lies far below its neighbour: a thick barrier in the cold moves it by thousands from one place to the
 * next, and the peak between two of them would be beyond the largest number on the scale of either.
 *
 * @param places  rising, with their logarithms in `logs`; both grow
 * @param above   ln of the part that is not scanned
 */
function narrow(places: number[], logs: number[], logAt: (x: number) => number, above: number): void {
  const halve = (j: number): boolean => {
    const x = 0.5 * (places[j] + places[j + 1]);
    if (!(x > places[j] && x < places[j + 1])) return false;
    places.splice(j + 1, 0, x);
    logs.splice(j + 1, 0, logAt(x));
    return true;
  };
  for (let step = 0; step < MOST_NARROWINGS; step++) {
    const peak = Math.max(above, ...logs);
    // A place of the integrand's stretch whose neighbour lies far below it.
    const far = (j: number): boolean => Math.max(logs[j], logs[j + 1]) > peak - DEPTH && Math.abs(logs[j + 1] - logs[j]) > FAR;
    let moved = false;
    for (let j = places.length - 2; j >= 0; j--) if (far(j)) moved = halve(j) || moved;
    if (!moved) return;
  }
}

/** The transmission with cells or steps as fine as its accuracy needs, and how far off it is in depth at the energies that count, relative. */
function settled(shape: BarrierShape, finer: (fineness: number) => BarrierShape, kind: Transmission, dispersion: Dispersion, energies: readonly number[], strictness: number): { transmission: LogTransmission; error: number; /** depths that one value of it looks at */ places: number } {
  const { edge, top, kT } = shape;
  if (kind === 'exact') {
    // The edge itself passes nothing, and up to a tenth of kT above it little goes.
    const least = edge + 0.1 * kT;
    const steps = waveStepsFor(shape, energies.map((energy) => Math.max(energy, least)), strictness * WAVE_ACCURACY, energies.some((energy) => energy < least));
    return { transmission: (energy) => waveTransmission(steps, energy), error: steps.error + strictness * WAVE_ACCURACY, places: 3 * steps.drift.length };
  }
  const exponentsOf = (barrier: BarrierShape, halved: boolean): number[] => energies.map((energy) => (energy < top ? wkbExponent(barrier, energy, dispersion, halved) : 0));
  const apart = (a: number[], b: number[]): number => Math.max(...a.map((v, i) => Math.abs(v - b[i])));
  const enough = strictness * DEPTH_ACCURACY;
  let fine = shape;
  let exponents = exponentsOf(fine, false);
  // Over the top the exponent counts only where it is small, and so is its error.
  const error = apart(exponents, exponentsOf(fine, true));
  if (top - edge < COLD * kT && error < enough) return { transmission: logTransmission(fine, kind, dispersion), error, places: fine.height.length };
  // In the cold the carriers pass near the foot of a barrier of many cells, where only other cells tell how far off these are.
  for (let fineness = 2; ; fineness *= 2) {
    fine = finer(fineness);
    const next = exponentsOf(fine, false);
    const off = apart(exponents, next);
    exponents = next;
    // The finer cells are better than the difference, by more than this in most places.
    if (off / COARSER < enough || fineness >= MOST_FINENESS) return { transmission: logTransmission(fine, kind, dispersion), error: off / COARSER, places: fine.height.length };
  }
}
