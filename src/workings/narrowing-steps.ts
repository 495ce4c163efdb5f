import { isAlloy, type CrystalMaterial } from '../../solver/index.ts';
import { narrowing } from '../../solver/narrowing.ts';
import { composition } from './bands-steps.ts';
import type { Context, Point } from './context.ts';
import { formula } from './formula.ts';
import { DESIGN, known, WORKED, type Known } from './known.ts';
import { materialAsks } from './published.ts';
import { step, type Step } from './step.ts';

export interface Narrowed {
  /** fall of the gap, eV */ total: Known;
  /** its part in Ec, eV */ conduction: Known;
  steps: Step[];
}

/** All active dopants of a place, cm^-3, the compensating charges left out. */
export function dopingAt(point: Point): { donors: number; acceptors: number } {
  let [donors, acceptors] = [0, 0];
  for (const level of point.charge.levels) {
    if (level.row < 0) continue;
    if (level.donor) donors += level.density;
    else acceptors += level.density;
  }
  return { donors, acceptors };
}

export function totalDoping(point: Point): Known {
  const { donors, acceptors } = dopingAt(point);
  return known('N', `sum of all active dopants of ${point.layer.name}`, donors + acceptors, 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` });
}

/** Narrowing in force at a place by its material's law; of an alloy, straight between its ends. */
export function narrowingSteps(context: Context, point: Point): Narrowed {
  const { material } = point.layer;
  if (!isAlloy(material)) return crystalSteps(context, point, material, '');
  const first = crystalSteps(context, point, material.first, 'A');
  const second = crystalSteps(context, point, material.second, 'B');
  const x = composition(point);
  const mix = (sign: string, words: string, a: Known, b: Known): { known: Known; step: Step } => {
    const k = known(sign, words, (1 - point.x) * a.value + point.x * b.value, 'eV', WORKED);
    return { known: k, step: step(k, formula`(1 - ${x}) * ${a} + ${x} * ${b}`) };
  };
  const total = mix('ΔE_g', 'narrowing of the gap', first.total, second.total);
  const conduction = mix('ΔE_g,c', 'its part in Ec', first.conduction, second.conduction);
  return { total: total.known, conduction: conduction.known, steps: [...first.steps, ...second.steps, total.step, conduction.step] };
}

function crystalSteps(context: Context, point: Point, crystal: CrystalMaterial, mark: string): Narrowed {
  const { narrowing: law } = crystal;
  const { donors, acceptors } = dopingAt(point);
  const ask = materialAsks(context.catalogue, crystal.id);
  const end = mark === '' ? '' : `,${mark}`;
  const value = law ? narrowing(law, donors, acceptors) : 0;
  const total = known(`ΔE_g${end}`, `narrowing of the gap of ${crystal.id}`, value, 'eV', WORKED);
  const conduction = known(`ΔE_g,c${end}`, 'its part in Ec', value * (law?.conductionShare ?? 0), 'eV', WORKED);
  const zero: Step[] = [step(total, formula`0`, law ? 'Nothing is doped here.' : `No narrowing is known of ${crystal.id}.`), step(conduction, formula`0`)];
  if (!law || !(donors + acceptors > 0)) return { total, conduction, steps: zero };
  const N = totalDoping(point);
  const part = step(conduction, formula`${ask('narrowing.conductionShare', 'κ_c', 'share of the narrowing in Ec', law.conductionShare, '')} * ${total}`);
  if (law.law === 'slotboom') {
    const log = formula`ln(${N} / ${ask('narrowing.reference', 'N_ref', 'reference of the narrowing', law.reference, 'cm⁻³')})`;
    return { total, conduction, steps: [step(total, formula`${ask('narrowing.energy', 'E_1', 'energy of the narrowing', law.energy, 'eV')} * (${log} + sqrt((${log}) ^ 2 + ${ask('narrowing.constant', 'C', 'constant of the narrowing', law.constant, '')}))`), part] };
  }
  const share = donors / (donors + acceptors);
  const steps: Step[] = [];
  const D = known('N_D', 'active donors', donors, 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` });
  const factor = (key: 'third' | 'quarter' | 'half', sign: string): Known => {
    const of = (kind: 'donor' | 'acceptor'): Known => ask(`narrowing.${kind}.${key}`, `${sign}^${kind === 'donor' ? 'D' : 'A'}`, `factor of narrowing by ${kind}s`, law[kind][key], 'eV');
    if (share === 1 || share === 0) return of(share === 1 ? 'donor' : 'acceptor');
    const k = known(sign, 'factor of the narrowing, weighted by each kind’s share', share * law.donor[key] + (1 - share) * law.acceptor[key], 'eV', WORKED);
    steps.push(step(k, formula`(${D} * ${of('donor')} + (${N} - ${D}) * ${of('acceptor')}) / ${N}`));
    return k;
  };
  const [a, b, c] = [factor('third', 'a_1/3'), factor('quarter', 'a_1/4'), factor('half', 'a_1/2')];
  const r = formula`(${N} / ${known('N_18', 'density to which the factors refer', 1e18, 'cm⁻³', WORKED)})`;
  return { total, conduction, steps: [...steps, step(total, formula`max(0, ${a} * ${r} ^ (1 / 3) + ${b} * ${r} ^ (1 / 4) + ${c} * ${r} ^ (1 / 2))`), part] };
}
