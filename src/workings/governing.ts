import { mfrac, mi, mn, mo, mrow, msub, munderover, signOf, type MathNode } from './math.ts';

const d = mi('d');
const over = (top: MathNode, under: MathNode): MathNode => mfrac(top, under);
const call = (name: MathNode, of: MathNode): MathNode => mrow(name, mo('('), of, mo(')'));

/** d/dz (ε dψ/dz) = −q(p − n + N_D⁺ − N_A⁻) − q Σ σ_i δ(z − z_i). */
export function poisson(): MathNode {
  return mrow(
    over(d, mrow(d, mi('z'))), mo('('), mi('ε'), over(mrow(d, mi('ψ')), mrow(d, mi('z'))), mo(')'), mo('='),
    mo('−'), mi('q'), mo('('), mi('p'), mo('−'), mi('n'), mo('+'), signOf('N_D^+'), mo('−'), signOf('N_A^−'), mo(')'),
    mo('−'), mi('q'), mo('∑'), signOf('σ_i'), call(mi('δ'), mrow(mi('z'), mo('−'), signOf('z_i'))),
  );
}

/** 1/ρ = (A/k²) ∫ T f dE from the edge of the neutral layer upwards. */
export function conductionIntegral(carrier: 'n' | 'p'): MathNode {
  return mrow(
    over(mn('1'), signOf(`ρ_${carrier}`)), mo('='), over(mi('A'), signOf('k^2')), munderover(mo('∫'), msub(mi('E'), mi('edge')), mo('∞')),
    call(mi('T'), mi('E')), call(mi('f'), mi('E')), d, mi('E'),
  );
}

/** ln T = −2 ∫ κ dz: the transmission that the integral takes by default. */
export function wkb(): MathNode {
  return mrow(mi('ln'), call(mi('T'), mi('E')), mo('='), mo('−'), mn('2'), munderover(mo('∫'), mn('0'), signOf('z_E')), call(mi('κ'), mi('z')), d, mi('z'));
}

/** 1/R = ∫ σ dz over the layer. */
export function sheetIntegral(): MathNode {
  return mrow(over(mn('1'), signOf('R_s')), mo('='), munderover(mo('∫'), mn('0'), mi('d')), call(mi('σ'), mi('z')), d, mi('z'));
}

/** C = dQ/dV of the solved charge. */
export function capacitanceLaw(): MathNode {
  return mrow(mi('C'), mo('='), over(mrow(d, mi('Q')), mrow(d, mi('V'))));
}
