/**
 * Filled states of one band against energy, s = (E - Ec)/kT for electrons or (Ev - E)/kT for holes, eta = (EF - Ec)/kT or (Ev - EF)/kT.
 *
 * Per volume and energy: g f = (Nc/kT) (2/sqrt(pi)) sqrt(s (1 + a s)) (1 + 2 a s)/(1 + exp(s - eta)), a = Kane's alpha kT (0 = parabolic); its integral over E
 * is n = Nc F(eta). Kane, J. Phys. Chem. Solids 1, 249 (1957). All in logarithms: at 4 K densities leave the range of doubles.
 */
const LOG_NORM = Math.log(2 / Math.sqrt(Math.PI));

/** ln of g in units of Nc/kT; -Infinity at the edge. */
export function statesDistribution(s: number, a: number): number {
  return LOG_NORM + 0.5 * Math.log(s * (1 + a * s)) + Math.log1p(2 * a * s);
}

/** ln of g f in units of Nc/kT. */
export function energyDistribution(s: number, eta: number, a: number): number {
  return statesDistribution(s, a) - softPlus(s - eta);
}

/** ln(1 + exp(u)) without overflow. */
function softPlus(u: number): number {
  return u > 0 ? u + Math.log1p(Math.exp(-u)) : Math.log1p(Math.exp(u));
}

/** d ln(g f)/ds, falling strictly with s: the distribution has one peak. */
function slope(s: number, eta: number, a: number): number {
  return 0.5 / s + (0.5 * a) / (1 + a * s) + (2 * a) / (1 + 2 * a * s) - 1 / (1 + Math.exp(eta - s));
}

/** s of the largest g f. Bisection: the slope is +infinite at 0, and at most 2/s - 0.9997 at s = eta + 8. */
export function peakOfBand(eta: number, a: number): number {
  let low = 0;
  let high = Math.max(eta, 0) + 8;
  for (let i = 0; i < 26; i++) {
    const mid = 0.5 * (low + high);
    if (slope(mid, eta, a) > 0) low = mid;
    else high = mid;
  }
  return 0.5 * (low + high);
}

/**
 * Where ln(g f) is at least `level`, as [from, to] in s; the peak itself twice where it does not reach it.
 *
 * ln(g f) is concave in s, so Newton's method from outside the far end closes in from one side. Near the edge it is bent too strongly for that: there the
 * unknown is ln s, in which it is nearly straight.
 */
export function levelInterval(level: number, eta: number, a: number): [number, number] {
  const peak = peakOfBand(eta, a);
  const excess = energyDistribution(peak, eta, a) - level;
  if (!(excess > 0)) return [peak, peak];
  let to = peak + 2 * excess + 6;
  for (let i = 0; i < 40; i++) {
    const step = (energyDistribution(to, eta, a) - level) / slope(to, eta, a);
    to = Math.max(to - step, peak);
    if (Math.abs(step) < 1e-4) break;
  }
  let low = Math.log(peak) - 2 * excess - 6;
  let high = Math.log(peak);
  for (let i = 0; i < 30 && high - low > 1e-4; i++) {
    const mid = 0.5 * (low + high);
    if (energyDistribution(Math.exp(mid), eta, a) < level) low = mid;
    else high = mid;
  }
  return [Math.exp(0.5 * (low + high)), to];
}
