import { densityOfStates } from './bands.ts';
import { localCharge } from './charge.ts';
import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, PLANCK } from './constants.ts';
import { isUniform } from './profile.ts';
import type { Profiles } from './solution.ts';
import type { Boundary, Stack } from './stack.ts';
import { M_PER_CM } from './units.ts';

/** Levels further apart than this, in kT, are confinement (the rule of the model). */
const SPACING = 0.5;
/** Fewer carriers, cm^-2, bend no band by more than some mV over 100 nm, confined or not. */
const FEWEST = 1e9;
/** Halvings of the energy of each level: a per mil of the depth, far finer than the rule that it serves. */
const HALVINGS = 10;
/** First energy above the bottom, eV, at which levels between two walls are looked for. */
const FIRST_REACH = 0.01;

/** A pocket of a band whose levels lie too far apart for a continuum. */
export interface ConfinedPocket {
  /** layer that holds its bottom */ layer: number;
  carrier: 'electron' | 'hole';
  /** distance of its two lowest levels, eV; of its bottom from its rim where it holds no second level */ spacing: number;
}

/**
 * Pockets of the solved bands that hold carriers and whose two lowest levels lie more than kT/2 apart.
 *
 * Levels by the phase rule Int sqrt(2 m (E - U)) dz/hbar = (n + s/4 + w/2) pi, with s smooth turning points and w walls (a step of the band, a free
 * surface; Landau and Lifshitz, Quantum Mechanics, section 48, from memory), and with the density-of-states mass. Good to some 10 % where walls are high,
 * which is enough for a warning. A pocket that a metal or an ohmic contact opens to one side confines nothing. Checked: test/solver/confinement.test.ts.
 */
export function confinedPockets(stack: Stack, profiles: Profiles): ConfinedPocket[] {
  const found: ConfinedPocket[] = [];
  const masses = massesAlong(stack, profiles);
  const nodes = profiles.z.length;
  const energy = new Float64Array(nodes);
  for (const carrier of ['electron', 'hole'] as const) {
    const density = carrier === 'electron' ? profiles.n : profiles.p;
    for (let s = 0; s < nodes; s++) energy[s] = carrier === 'electron' ? profiles.ec[s] : -profiles.ev[s];
    const pockets = new Pockets(profiles.z, energy, masses[carrier], isWall(stack.top), isWall(stack.bottom));
    for (const bottom of pockets.bottoms(SPACING * BOLTZMANN * stack.temperature)) {
      const spacing = pockets.spacing(bottom);
      const layer = profiles.layer[bottom.node];
      if (!(spacing > SPACING * BOLTZMANN * stack.temperature) || pockets.held(bottom, density) < FEWEST) continue;
      // A wide layer may hold one at each end: the tighter one speaks for it.
      const known = found.find((f) => f.layer === layer && f.carrier === carrier);
      if (!known) found.push({ layer, carrier, spacing });
      else known.spacing = Math.max(known.spacing, spacing);
    }
  }
  return found;
}

/** A free surface reflects; through a metal or an ohmic contact carriers leave. */
function isWall(boundary: Boundary): boolean {
  return boundary.kind === 'open' || boundary.kind === 'pinned';
}

/** Density-of-states masses, kg, at each node; 0 in an insulator, where no pocket reaches. */
function massesAlong(stack: Stack, profiles: Profiles): { electron: Float64Array; hole: Float64Array } {
  const electron = new Float64Array(profiles.z.length);
  const hole = new Float64Array(profiles.z.length);
  const unit = densityOfStates(1, stack.temperature);
  let top = 0;
  for (let s = 0; s < profiles.z.length; s++) {
    const layer = stack.layers[profiles.layer[s]];
    const first = s === 0 || profiles.layer[s] !== profiles.layer[s - 1];
    if (first) top = profiles.z[s];
    if (!first && isUniform(layer)) {
      electron[s] = electron[s - 1];
      hole[s] = hole[s - 1];
      continue;
    }
    const { nc, nv } = localCharge(layer, profiles.z[s] - top, stack.temperature, stack.assumptions).bands;
    electron[s] = ELECTRON_MASS * Math.cbrt((nc / unit) ** 2);
    hole[s] = ELECTRON_MASS * Math.cbrt((nv / unit) ** 2);
  }
  return { electron, hole };
}

interface Bottom {
  node: number;
  /** energy at which the pocket spills over or opens, eV; infinite between two walls */ rim: number;
}

/** Pockets of an energy U(z), eV, straight between nodes; a step is a pair of nodes at one depth. */
class Pockets {
  private readonly z: Float64Array;
  private readonly u: Float64Array;
  private readonly mass: Float64Array;
  private readonly walls: readonly [boolean, boolean];

  constructor(z: Float64Array, u: Float64Array, mass: Float64Array, topWall: boolean, bottomWall: boolean) {
    this.z = z;
    this.u = u;
    this.mass = mass;
    this.walls = [topWall, bottomWall];
  }

  /** Minima that are deeper than `depth`, eV. */
  bottoms(depth: number): Bottom[] {
    const { u, walls } = this;
    const out: Bottom[] = [];
    let high = walls[0] ? Infinity : u[0];
    let low = 0;
    const close = (right: number): void => {
      const rim = Math.min(high, right);
      if (rim - u[low] > depth) out.push({ node: low, rim });
    };
    // Up and down in turn: a minimum is closed once the energy has risen above it by `depth`, a maximum once it has fallen.
    let falling = true;
    let crest = high;
    for (let s = 0; s < u.length; s++) {
      if (falling) {
        if (u[s] < u[low]) low = s;
        if (u[s] > u[low] + depth) {
          falling = false;
          crest = u[s];
        }
      } else {
        crest = Math.max(crest, u[s]);
        if (u[s] < crest - depth) {
          close(crest);
          high = crest;
          low = s;
          falling = true;
        }
      }
    }
    if (!falling || walls[1]) close(walls[1] ? Infinity : crest);
    return out;
  }

  /** Distance of the two lowest levels, eV; the depth where there is no second level. */
  spacing(bottom: Bottom): number {
    const floor = this.u[bottom.node];
    let top = bottom.rim;
    if (top === Infinity) {
      // Between two walls there are levels without end: look higher until there are two.
      let reach = FIRST_REACH;
      for (top = floor + reach; this.levels(bottom.node, top) < 2; top += reach) reach *= 2;
    } else if (this.levels(bottom.node, top) < 2) return top - floor;
    return this.level(bottom.node, floor, top, 2) - this.level(bottom.node, floor, top, 1);
  }

  /** Carriers in the pocket below its rim, cm^-2. */
  held(bottom: Bottom, density: Float64Array): number {
    let sum = 0;
    for (const step of [-1, 1]) {
      for (let s = bottom.node; this.u[s + step] < bottom.rim; s += step) sum += 0.5 * Math.abs(this.z[s + step] - this.z[s]) * (density[s] + density[s + step]);
    }
    return sum;
  }

  private level(node: number, floor: number, top: number, count: number): number {
    let low = floor;
    let high = top;
    for (let i = 0; i < HALVINGS; i++) {
      const middle = 0.5 * (low + high);
      if (this.levels(node, middle) >= count) high = middle;
      else low = middle;
    }
    return 0.5 * (low + high);
  }

  /** How many levels the pocket at `node` holds below `energy`; whole numbers are levels. */
  private levels(node: number, energy: number): number {
    const { z, u, mass, walls } = this;
    let phase = 0;
    let ends = 0;
    for (const [side, step] of [-1, 1].entries()) {
      let s = node;
      for (;;) {
        const next = s + step;
        if (next < 0 || next >= u.length) {
          ends += walls[side] ? 0.5 : 0.25;
          break;
        }
        const h = Math.abs(z[next] - z[s]) * M_PER_CM;
        const a = energy - u[s];
        const b = energy - u[next];
        if (b <= 0) {
          ends += h === 0 ? 0.5 : 0.25;
          phase += (wave(mass[s]) * (2 / 3) * h * a * Math.sqrt(a)) / (a - b);
          break;
        }
        // The mean of a square root over a straight stretch, without a difference that cancels.
        if (h > 0) phase += (0.5 * (wave(mass[s]) + wave(mass[next])) * (2 / 3) * h * (a + Math.sqrt(a * b) + b)) / (Math.sqrt(a) + Math.sqrt(b));
        s = next;
      }
    }
    return phase / Math.PI - ends + 1;
  }
}

/** sqrt(2 m e)/hbar, per m and root volt. */
function wave(mass: number): number {
  return (Math.sqrt(2 * mass * ELEMENTARY_CHARGE) * 2 * Math.PI) / PLANCK;
}
