import { chargeAt, netDoping, type ChargeValues } from '../../solver/charge.ts';
import { gapSteps, type Worked } from './bands-steps.ts';
import { textbookOf, type Context, type Point } from './context.ts';
import { formula } from './formula.ts';
import { DESIGN, known, thermal, WORKED, type Known } from './known.ts';
import { statesSteps } from './states-steps.ts';
import { step, type Step } from './step.ts';

export interface Textbook {
  /** Ec - EF */ level: Known;
  steps: Step[];
  n: Worked;
  p: Worked;
}

/** The level as a textbook has it: every dopant ionised, Boltzmann statistics; with the lines that give it. */
export function textbookSteps(context: Context, point: Point, mark = ''): Textbook {
  const book = textbookOf(point.charge);
  const values: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  chargeAt(book.charge, book.ecMinusEf, values);
  const { bands } = point;
  const net = netDoping(point.charge);
  const isN = net >= 0;
  const kT = thermal(bands.T);
  const gap = gapSteps(context, point).known;
  const nc = statesSteps(context, point, 'n').known;
  const nv = statesSteps(context, point, 'p').known;
  const N = known('N', `net active doping of ${point.layer.name}`, Math.abs(net), 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` });
  const ni = known('n_i', 'intrinsic density', Math.exp(0.5 * (Math.log(bands.nc) + Math.log(bands.nv) - bands.gap / bands.kT)), 'cm⁻³', WORKED);
  const n = known('n_B', 'electrons, every dopant ionised', values.n, 'cm⁻³', WORKED);
  const p = known('p_B', 'holes, every dopant ionised', values.p, 'cm⁻³', WORKED);
  const level = known(mark === '' ? '(E_c−E_F)_B' : `(E_c−E_F)_B,${mark}`, 'the same by Boltzmann statistics', book.ecMinusEf, 'eV', WORKED);
  const majority = formula`${N} / 2 + sqrt((${N} / 2) ^ 2 + ${ni} ^ 2)`;
  const niStep = step(ni, formula`exp((ln(${nc}) + ln(${nv}) - ${gap} / ${kT}) / 2)`);
  // Undoped, the closed form of the level outlives densities below the smallest number.
  if (net === 0) return undoped({ level, ni, n, p, kT, gap, nc, nv, niStep });
  const nStep = isN ? step(n, majority) : step(n, formula`${nc} * exp(-${level} / ${kT})`);
  const pStep = isN ? step(p, formula`${nv} * exp((${level} - ${gap}) / ${kT})`) : step(p, majority);
  const levelStep = isN ? step(level, formula`${kT} * ln(${nc} / ${n})`) : step(level, formula`${gap} - ${kT} * ln(${nv} / ${p})`);
  const steps = isN ? [niStep, nStep, levelStep] : [niStep, pStep, levelStep];
  return { level, steps, n: { known: n, steps: isN ? steps.slice(0, 2) : [...steps, nStep] }, p: { known: p, steps: isN ? [...steps, pStep] : steps.slice(0, 2) } };
}

function undoped({ level, ni, n, p, kT, gap, nc, nv, niStep }: Record<'level' | 'ni' | 'n' | 'p' | 'kT' | 'gap' | 'nc' | 'nv', Known> & { niStep: Step }): Textbook {
  return { level, steps: [step(level, formula`(${gap} + ${kT} * ln(${nc} / ${nv})) / 2`, 'Nothing is doped: n = p.')], n: { known: n, steps: [niStep, step(n, formula`${ni}`)] }, p: { known: p, steps: [niStep, step(p, formula`${ni}`)] } };
}
