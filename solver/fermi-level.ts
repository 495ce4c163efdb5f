import { carrierLog, type CarrierLog } from './carriers.ts';
import { distance, type LocalCharge } from './charge.ts';
import { inverseFermiHalf } from './fermi-integral.ts';

/** Root of local charge neutrality, and how it was found. */
export interface NeutralLevel {
  /** eV */ ecMinusEf: number;
  evaluations: number;
  reason: 'small step' | 'exact' | 'no progress in floating point' | 'insulator';
}

const MOST_EVALUATIONS = 300;
const EPSILON = 2.220446049250313e-16;
/** Rounding of a difference of two logarithms, of the larger. */
const NOISE = EPSILON;
/** First step beyond the outermost kink, in kT. */
const FIRST_REACH = 8;

const electrons: CarrierLog = { log: 0, slope: 0 };
const holes: CarrierLog = { log: 0, slope: 0 };

/** ln(positive) - ln(negative), its derivative by (Ec - EF)/kT, and the rounding of the difference. */
const balance = { value: 0, slope: 0, noise: 0 };

/** Weighted running log-sum-exp. */
class LogSum {
  log = -Infinity;
  /** d log/dy */ slope = 0;
  clear(): void {
    this.log = -Infinity;
    this.slope = 0;
  }
  add(log: number, slope: number): void {
    if (log === -Infinity) return;
    if (this.log === -Infinity) {
      this.log = log;
      this.slope = slope;
      return;
    }
    const d = log - this.log;
    if (d <= 0) {
      const e = Math.exp(d);
      this.slope = (this.slope + e * slope) / (1 + e);
      this.log += Math.log1p(e);
    } else {
      const e = Math.exp(-d);
      this.slope = (slope + e * this.slope) / (1 + e);
      this.log = log + Math.log1p(e);
    }
  }
}

const positive = new LogSum();
const negative = new LogSum();

/**
 * Logarithms that no Fermi level changes, taken once a point. Densities are counted in `reference`, sqrt(Nc Nv), cm^-3: logarithms near zero keep digits
 * that those of 1e17 would lose.
 */
interface Fixed {
  reference: number;
  logNc: number;
  logNv: number;
  /** (gap)/kT */ top: number;
  /** ln of the bound density of each level [levels] */ size: number[];
}

/**
 * Balance of positive against negative charge, each a sum of positive terms, in logarithms: nothing underflows.
 *
 * Of each level only the smaller part appears: a mostly charged donor as its full charge, which joins the constants, against its
 * neutral rest; a mostly neutral one as the charge that it does give. Either way of writing has the same root and the same sign, but
 * with the larger part uncompensated freeze-out (1e15 held, 1e-14 given) or full compensation (equal and all charged) would drown.
 *
 * @param y  (Ec - EF)/kT
 */
function evaluate(c: LocalCharge, fixed: Fixed, y: number): void {
  const b = c.bands;
  const boltzmann = b.statistics === 'boltzmann';
  carrierLog(-y, b.kaneN * b.kT, boltzmann, electrons);
  carrierLog(y - fixed.top, b.kaneP * b.kT, boltzmann, holes);
  positive.clear();
  negative.clear();
  positive.add(fixed.logNv + holes.log, holes.slope);
  negative.add(fixed.logNc + electrons.log, -electrons.slope);
  let donors = 0;
  let acceptors = 0;
  for (let i = 0; i < c.levels.length; i++) {
    const level = c.levels[i];
    let constant = level.density;
    if (level.bound > 0) {
      // Held 1/(1 + e^v), given 1/(1 + e^-v) of the level; the smaller of the two, e/(1 + e) with e = exp(-|v|), is what counts.
      const v = distance(b, level, y * b.kT) - level.logG;
      const mostlyCharged = v > 0;
      const e = Math.exp(mostlyCharged ? -v : v);
      const smaller = fixed.size[i] + (mostlyCharged ? -v : v) - Math.log1p(e);
      const larger = 1 / (1 + e);
      if (!mostlyCharged) constant = level.density * (1 - level.bound);
      // d ln(held)/dv = -given, d ln(given)/dv = held; v rises with y for a donor and falls for an acceptor.
      if (level.donor === mostlyCharged) negative.add(smaller, -larger);
      else positive.add(smaller, larger);
    }
    if (level.donor) donors += constant;
    else acceptors += constant;
  }
  const net = donors - acceptors + c.fixed;
  if (net > 0) positive.add(Math.log(net / fixed.reference), 0);
  if (net < 0) negative.add(Math.log(-net / fixed.reference), 0);
  balance.value = positive.log - negative.log;
  balance.slope = positive.slope - negative.slope;
  balance.noise = NOISE * Math.max(1, Math.abs(positive.log), Math.abs(negative.log));
}

/** One end of the bracket, with the balance there where it was asked. */
interface End {
  y: number;
  value: number;
  slope: number;
  /** ln of the charge that the far band has to balance: positive below, negative above */ charge: number;
}

/**
 * Fermi level of a neutral point: the root of p - n + N_D+ - N_A- = 0.
 *
 * @returns Ec - EF, eV, with the number of evaluations and the reason for stopping; midgap in an insulator, which has no such level
 * @throws {Error} the iteration ran out of evaluations (never seen; a bug if it happens)
 *
 * The balance rises strictly with Ec - EF. Its sign at the band edges and at each level, found by halving, gives a first bracket between two kinks of
 * the logarithmic balance, where that is nearly straight; Newton's iteration starts from the end whose balance is smaller and is kept inside.
 * It stops where the balance is only the rounding of its logarithms, or where the square of the step, which is what Newton leaves, is below the last digit. Both
 * come before the bracket is looked at: at the root rounding may put the step on the wrong side.
 *
 * Measured on 20,000 random points (1-1500 K, gaps 0.1-6.1 eV, up to four rows of 1e12-1e21 cm^-3, some exactly compensated): 5.0 evaluations in the mean, 12 at
 * most; the net charge is below 3e-14 of the larger charge beyond what the last digit of Ec - EF itself moves.
 */
export function neutralLevel(c: LocalCharge): NeutralLevel {
  const b = c.bands;
  if (b.insulator) return { ecMinusEf: b.gap / 2, evaluations: 0, reason: 'insulator' };
  const reference = Math.sqrt(b.nc) * Math.sqrt(b.nv);
  const fixed: Fixed = { reference, logNc: Math.log(b.nc / reference), logNv: Math.log(b.nv / reference), top: b.gap / b.kT, size: [] };
  const kinks = [0, fixed.top];
  for (const level of c.levels) {
    fixed.size.push(Math.log((level.density * level.bound) / reference));
    if (level.bound > 0) kinks.push(level.donor ? level.depth / b.kT + level.logG : fixed.top - level.depth / b.kT - level.logG);
  }
  kinks.sort((p, q) => p - q);
  let evaluations = 0;
  const low: End = { y: -Infinity, value: -Infinity, slope: 1, charge: 0 };
  const high: End = { y: Infinity, value: Infinity, slope: 1, charge: 0 };
  /** Evaluates at y and moves one end of the bracket there. */
  const at = (y: number): number => {
    evaluate(c, fixed, y);
    evaluations++;
    const end = balance.value < 0 ? low : high;
    end.y = y;
    end.value = balance.value;
    end.slope = balance.slope;
    end.charge = end === high ? positive.log : negative.log;
    return balance.value;
  };
  let first = -1;
  let last = kinks.length;
  while (last - first > 1) {
    const middle = (first + last) >> 1;
    if (at(kinks[middle]) < 0) first = middle;
    else last = middle;
  }
  let y = firstStep(fixed, low, high);
  let width = Infinity;
  let reach = FIRST_REACH;
  while (evaluations < MOST_EVALUATIONS) {
    const v = at(y);
    if (Math.abs(v) <= balance.noise) return { ecMinusEf: y * b.kT, evaluations, reason: v === 0 ? 'exact' : 'no progress in floating point' };
    const step = -v / balance.slope;
    if (step * step <= EPSILON * Math.min(1, balance.slope) * Math.max(1, Math.abs(y))) return { ecMinusEf: (y + step) * b.kT, evaluations, reason: 'small step' };
    if (high.y - low.y <= EPSILON * Math.max(1, Math.abs(y))) return { ecMinusEf: y * b.kT, evaluations, reason: 'no progress in floating point' };
    const next = y + step;
    // Newton where it stays inside and its steps shrink; else half the bracket, or farther out where that is open.
    if (next > low.y && next < high.y && Math.abs(step) <= 0.5 * width) {
      y = next;
      width = Math.abs(step);
    } else {
      y = middleOf(low, high, reach);
      reach *= 4;
      width = high.y - low.y;
    }
  }
  throw new Error(`no neutral Fermi level within ${MOST_EVALUATIONS} evaluations`);
}

/**
 * Where to begin: Newton's step from the end of the smaller balance; where it leaves the bracket, its middle. But beyond the outermost kink a band is filled
 * and its density no exponential: there, unless the dopants fill up faster still, the inverse of F_1/2 of the charge that the band has to balance.
 */
function firstStep(fixed: Fixed, low: End, high: End): number {
  const end = -low.value < high.value ? low : high;
  let y = end.y - end.value / end.slope;
  if (end.slope < 1) {
    if (low.y === -Infinity) y = -filling(high.charge - fixed.logNc);
    else if (high.y === Infinity) y = fixed.top + filling(low.charge - fixed.logNv);
  }
  return y > low.y && y < high.y ? y : middleOf(low, high, FIRST_REACH);
}

/** eta at which F_1/2 is exp(log); only a guess where statistics or band are others. */
function filling(log: number): number {
  return log < 600 ? inverseFermiHalf(Math.exp(log)) : NaN;
}

function middleOf(low: End, high: End, reach: number): number {
  if (low.y === -Infinity) return high.y - reach;
  return high.y === Infinity ? low.y + reach : 0.5 * (low.y + high.y);
}
