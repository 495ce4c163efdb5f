/** Nodes and weights of Gauss and Legendre on [0, 1]; Abramowitz and Stegun, table 25.4. */
export interface GaussRule {
  nodes: readonly number[];
  weights: readonly number[];
}

const G3 = Math.sqrt(0.6) / 2;
export const GAUSS_3: GaussRule = { nodes: [0.5 - G3, 0.5, 0.5 + G3], weights: [5 / 18, 4 / 9, 5 / 18] };

const NEAR = Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 6;
const FAR = Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 6;
const HEAVY = (322 + 13 * Math.sqrt(70)) / 1800;
const LIGHT = (322 - 13 * Math.sqrt(70)) / 1800;
export const GAUSS_5: GaussRule = { nodes: [0.5 - FAR, 0.5 - NEAR, 0.5, 0.5 + NEAR, 0.5 + FAR], weights: [LIGHT, HEAVY, 64 / 225, HEAVY, LIGHT] };

/**
 * Kronrod's extension of the seven-point Gauss rule on [-1, 1]: nodes >= 0, weights, and the Gauss weights at every second node.
 * Kronrod (1965); computed anew to 18 digits from the zeros of the Legendre and Stieltjes polynomials.
 */
const KRONROD_NODES = [0, 0.207784955007898468, 0.405845151377397167, 0.58608723546769113, 0.74153118559939444, 0.864864423359769073, 0.949107912342758525, 0.991455371120812639];
const KRONROD_WEIGHTS = [0.209482141084727828, 0.204432940075298892, 0.19035057806478541, 0.169004726639267903, 0.140653259715525919, 0.104790010322250184, 0.0630920926299785533, 0.022935322010529225];
const GAUSS_WEIGHTS = [0.417959183673469388, 0, 0.381830050505118945, 0, 0.279705391489276668, 0, 0.129484966168869693, 0];

export interface QuadratureResult {
  value: number;
  /** estimate, absolute */ error: number;
  evaluations: number;
}

interface Panel {
  from: number;
  to: number;
  value: number;
  error: number;
}

/**
 * Adaptive integral over neighbouring panels: the panel of the largest error is halved until the errors' sum is below `relative` times the value (or `floor`), or
 * until `most` panels are there; the error that is left is reported either way.
 *
 * @param ends  rising, at least two: the first panels lie between them
 *
 * The difference of the two rules is the error of the poorer one; the value is that of the better one, so the estimate is on the safe side.
 */
export function integrate(f: (x: number) => number, ends: readonly number[], relative: number, floor = 0, most = 60): QuadratureResult {
  const panels: Panel[] = [];
  let evaluations = 0;
  const add = (from: number, to: number): void => {
    const centre = 0.5 * (from + to);
    const half = 0.5 * (to - from);
    let better = KRONROD_WEIGHTS[0] * f(centre);
    let poorer = (GAUSS_WEIGHTS[0] / KRONROD_WEIGHTS[0]) * better;
    for (let i = 1; i < KRONROD_NODES.length; i++) {
      const both = f(centre - half * KRONROD_NODES[i]) + f(centre + half * KRONROD_NODES[i]);
      better += KRONROD_WEIGHTS[i] * both;
      poorer += GAUSS_WEIGHTS[i] * both;
    }
    evaluations += 2 * KRONROD_NODES.length - 1;
    panels.push({ from, to, value: half * better, error: Math.abs(half * (better - poorer)) });
  };
  for (let i = 0; i + 1 < ends.length; i++) if (ends[i + 1] > ends[i]) add(ends[i], ends[i + 1]);
  for (;;) {
    let value = 0;
    let error = 0;
    let worst = 0;
    panels.forEach((p, i) => {
      value += p.value;
      error += p.error;
      if (p.error > panels[worst].error) worst = i;
    });
    if (error <= Math.max(relative * Math.abs(value), floor) || panels.length === 0 || panels.length >= most) return { value, error, evaluations };
    const [{ from, to }] = panels.splice(worst, 1);
    const middle = 0.5 * (from + to);
    add(from, middle);
    add(middle, to);
  }
}
