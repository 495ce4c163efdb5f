import { isAlloy, type AlloyMaterial, type CrystalMaterial, type GapLaw, type Material } from '../../solver/index.ts';
import { gapAt, localBands, permittivityAt } from '../../solver/bands.ts';
import { BOLTZMANN } from '../../solver/constants.ts';
import type { Context, Point } from './context.ts';
import type { Expression } from './expression.ts';
import { formula } from './formula.ts';
import { DESIGN, known, temperatureOf, WORKED, type Known } from './known.ts';
import { narrowingSteps } from './narrowing-steps.ts';
import { materialAsks, type Asks } from './published.ts';
import { step, type Step } from './step.ts';

/** A quantity with the lines that lead to it. */
export interface Worked {
  known: Known;
  steps: Step[];
}

const NONE = { donors: 0, acceptors: 0 };

/** Bands of a material without narrowing. */
export function pureBands(context: Context, material: Material, x: number, T = context.stack.temperature): ReturnType<typeof localBands> {
  return localBands(material, x, T, { ...context.stack.assumptions, narrowing: false }, NONE);
}

export function composition(point: Point): Known {
  return known('x', `composition of ${point.layer.name}`, point.x, '', DESIGN, { path: `layers[${point.index}].x` });
}

/** The gap at a place, narrowed when narrowing is on. */
export function gapSteps(context: Context, point: Point): Worked {
  const { material } = point.layer;
  const T = context.stack.temperature;
  const on = context.stack.assumptions.narrowing;
  const pure = pureBands(context, material, point.x);
  const plain = known(on ? 'E_g,0' : 'E_g', on ? 'gap without narrowing' : 'gap', pure.gap, 'eV', WORKED);
  const steps = isAlloy(material) ? alloyGap(context, point, material, plain) : crystalGap(material, T, plain.value, materialAsks(context.catalogue, material.id), plain);
  if (!on) return { known: plain, steps };
  const fall = narrowingSteps(context, point);
  const gap = known('E_g', 'gap', point.bands.gap, 'eV', WORKED);
  return { known: gap, steps: [...steps, ...fall.steps, step(gap, formula`${plain} - ${fall.total}`)] };
}

/** Which law of a crystal gives its lowest gap. */
function crystalGap(crystal: CrystalMaterial, T: number, gap: number, ask: Asks, result: Known): Step[] {
  const other = crystal.otherValleys?.find((valley) => valley.gap !== crystal.gap && gapAt(crystal.gap, T) !== gap && gapAt(valley.gap, T) === gap);
  return [step(result, gapLaw(other?.gap ?? crystal.gap, T, ask, other ? `otherValleys.${other.name}.gap` : 'gap', other ? `${other.name}` : ''), other ? `The ${other.name} valley lies lowest.` : '')];
}

function gapLaw(law: GapLaw, T: number, ask: Asks, path: string, valley: string): Expression {
  const of = valley === '' ? '' : `, ${valley} valley,`;
  if (law.law === 'formula') return formula`${ask(`${path}.formula`, 'E_g,own', `gap by the formula of this design${of}`, gapAt(law, T), 'eV')}`;
  const t = temperatureOf(T);
  if (law.law === 'linear') return formula`${ask(`${path}.at300K`, 'E_g,300', `gap at 300 K${of}`, law.at300K, 'eV')} - ${ask(`${path}.slope`, 'a', `fall of the gap per kelvin${of}`, law.slope, 'eV/K')} * (${t} - 300)`;
  if (law.law === 'odonnell-chen') {
    const energy = ask(`${path}.phonon`, 'ħω', `mean phonon energy${of}`, law.phonon, 'eV');
    return formula`${ask(`${path}.zeroK`, 'E_g,0K', `gap at 0 K${of}`, law.zeroK, 'eV')} - 2 * ${ask(`${path}.coupling`, 'S', `coupling to phonons${of}`, law.coupling, '')} * ${energy} / (expm1(${energy} / ${known('kT', 'thermal energy', BOLTZMANN * T, 'eV', WORKED)}))`;
  }
  const zero = ask(law.alpha === 0 ? path : `${path}.zeroK`, 'E_g,0K', law.alpha === 0 ? `gap${of}` : `gap at 0 K${of}`, law.zeroK, 'eV');
  if (law.alpha === 0) return formula`${zero}`;
  return formula`${zero} - ${ask(`${path}.alpha`, 'α', `Varshni’s α${of}`, law.alpha, 'eV/K')} * ${t} ^ 2 / (${t} + ${ask(`${path}.beta`, 'β', `Varshni’s β${of}`, law.beta, 'K')})`;
}

/** The valley of an alloy that lies lowest, found by its gap. */
export function valleyOf(context: Context, material: AlloyMaterial, x: number): { name: string | null; A: { gap: GapLaw; path: string } | null; B: { gap: GapLaw; path: string } | null } {
  const T = context.stack.temperature;
  const { first, second } = material;
  const target = pureBands(context, material, x).gap;
  const own = { gap: first.gap, path: 'gap' };
  const main = { name: null, A: own, B: { gap: second.gap, path: 'gap' } };
  const bow = bowingOf(material, x);
  let best = { ...main, off: Math.abs((1 - x) * gapAt(first.gap, T) + x * gapAt(second.gap, T) - x * (1 - x) * bow - target) };
  const take = (candidate: ReturnType<typeof valleyOf>, gap: number): void => {
    const off = Math.abs(gap - target);
    if (off < best.off) best = { ...candidate, off } as typeof best;
  };
  for (const valley of first.otherValleys ?? []) {
    const path = `otherValleys.${valley.name}.gap`;
    const partner = second.otherValleys?.find((v) => v.name === valley.name);
    if (x === 0) take({ name: valley.name, A: { gap: valley.gap, path }, B: null }, gapAt(valley.gap, T));
    else if (partner) take({ name: valley.name, A: { gap: valley.gap, path }, B: { gap: partner.gap, path } }, (1 - x) * gapAt(valley.gap, T) + x * gapAt(partner.gap, T) - x * (1 - x) * (material.valleyBowing?.[valley.name] ?? 0));
  }
  if (x === 1) for (const valley of second.otherValleys ?? []) take({ name: valley.name, A: null, B: { gap: valley.gap, path: `otherValleys.${valley.name}.gap` } }, gapAt(valley.gap, T));
  return best;
}

function bowingOf(material: AlloyMaterial, x: number): number {
  const { gap = 0 } = material.bowing;
  return typeof gap === 'number' ? gap : gap.reduce((sum, c, i) => sum + c * x ** i, 0);
}

function alloyGap(context: Context, point: Point, material: AlloyMaterial, result: Known): Step[] {
  const T = context.stack.temperature;
  const { catalogue } = context;
  if (material.formulas?.gap) return [step(result, formula`${materialAsks(catalogue, material.id)('gap.formula', 'E_g,own', 'gap by the formula of this design', result.value, 'eV')}`)];
  const { name, A, B } = valleyOf(context, material, point.x);
  const x = composition(point);
  const steps: Step[] = [];
  const end = (which: 'A' | 'B', crystal: CrystalMaterial, valley: { gap: GapLaw; path: string }): Known => {
    const gap = known(`E_${which}`, `gap of ${crystal.id}${name === null ? '' : `, ${name} valley`}`, gapAt(valley.gap, T), 'eV', WORKED);
    steps.push(step(gap, gapLaw(valley.gap, T, materialAsks(catalogue, crystal.id), valley.path, name ?? '')));
    return gap;
  };
  const note = name === null ? '' : `The ${name} valley lies lowest.`;
  if (A === null || B === null) {
    const only = A === null ? end('B', material.second, B!) : end('A', material.first, A);
    return [...steps, step(result, formula`${only}`, note)];
  }
  const a = end('A', material.first, A);
  const b = end('B', material.second, B);
  const ask = materialAsks(catalogue, material.id);
  const { gap } = material.bowing;
  let bow: Known;
  if (name === null && Array.isArray(gap)) {
    bow = known('b', `bowing of the gap of ${material.id}`, bowingOf(material, point.x), 'eV', WORKED);
    const terms = gap.map((c, i) => ({ sign: 1 as const, of: formula`${ask('alloy.bowing.gap', `b_${i}`, `bowing of the gap, power ${i}`, c, 'eV')} * ${x} ^ ${{ kind: 'number', value: i, text: String(i) }}` }));
    steps.push(step(bow, { kind: 'sum', terms }));
  } else bow = name === null ? ask('alloy.bowing.gap', 'b', 'bowing of the gap', (gap as number | undefined) ?? 0, 'eV') : ask(`alloy.valleyBowing.${name}`, 'b', `bowing of the ${name} gap`, material.valleyBowing?.[name] ?? 0, 'eV');
  return [...steps, step(result, formula`(1 - ${x}) * ${a} + ${x} * ${b} - ${x} * (1 - ${x}) * ${bow}`, note)];
}

/** Straight between an alloy's ends, with a bowing where it has one. */
export function mixed(context: Context, point: Point, result: Known, path: string, words: string, unit: string, read: (crystal: CrystalMaterial) => number | undefined, bowing: { path: string; value: number | undefined } | null = null): Worked {
  const { material } = point.layer;
  const T = context.stack.temperature;
  const value = (crystal: CrystalMaterial): number | undefined => (path === 'permittivity' || path === 'permittivityHighFrequency' ? permittivityAt(crystal, path, T) : read(crystal));
  if (!isAlloy(material)) return { known: materialAsks(context.catalogue, material.id)(path, result.sign, words, value(material), unit, result.scale), steps: [] };
  if (Object.hasOwn(material.formulas ?? {}, path)) return { known: materialAsks(context.catalogue, material.id)(path, result.sign, words, result.value, unit, result.scale), steps: [] };
  const ask = (crystal: CrystalMaterial, mark: string): Known => materialAsks(context.catalogue, crystal.id)(path, `${result.sign.split('_')[0]}_${mark}`, words, value(crystal) ?? Number.NaN, unit, result.scale);
  const x = composition(point);
  const [a, b] = [ask(material.first, 'A'), ask(material.second, 'B')];
  // An end that does not count need not know the value.
  if (point.x === 0) return { known: result, steps: [step(result, formula`${a}`, `At x = 0 it is that of ${material.first.id}.`)] };
  if (point.x === 1) return { known: result, steps: [step(result, formula`${b}`, `At x = 1 it is that of ${material.second.id}.`)] };
  if (bowing?.value) {
    const bow = materialAsks(context.catalogue, material.id)(bowing.path, 'b', `bowing: ${words}`, bowing.value, unit, result.scale);
    return { known: result, steps: [step(result, formula`(1 - ${x}) * ${a} + ${x} * ${b} - ${x} * (1 - ${x}) * ${bow}`)] };
  }
  return { known: result, steps: [step(result, formula`(1 - ${x}) * ${a} + ${x} * ${b}`)] };
}

/** The affinity at a place: its value at 300 K and the share of the gap's move. */
export function affinitySteps(context: Context, point: Point): Worked {
  const { material } = point.layer;
  const T = context.stack.temperature;
  const on = context.stack.assumptions.narrowing;
  const at300 = pureBands(context, material, point.x, 300);
  const pure = pureBands(context, material, point.x);
  const bowing = isAlloy(material) ? { path: 'alloy.bowing.affinity', value: material.bowing.affinity } : null;
  const reference = mixed(context, point, known('χ_300', 'affinity at 300 K', at300.affinity, 'eV', WORKED), 'affinity', 'affinity at 300 K', 'eV', (c) => c.affinity, bowing);
  const plain = known(on ? 'χ_0' : 'χ', on ? 'affinity without narrowing' : 'affinity', pure.affinity, 'eV', WORKED);
  const steps = [...reference.steps];
  if (T === 300) steps.push(step(plain, formula`${reference.known}`, 'At 300 K the gap has not moved from where the affinity was measured.'));
  else {
    const kappaValue = at300.gap === pure.gap ? 0.5 : (pure.affinity - at300.affinity) / (at300.gap - pure.gap);
    const kappa = mixed(context, point, known('κ', 'share of the gap’s move taken by Ec', kappaValue, '', WORKED), 'affinityShare', 'share of the gap’s move taken by Ec', '', (c) => c.affinityShare);
    const gapThen = known('E_g,300', 'gap at 300 K, by the law of the gap', at300.gap, 'eV', WORKED);
    const gapNow = known('E_g,T', `gap at ${T} K, by the law of the gap`, pure.gap, 'eV', WORKED);
    steps.push(...kappa.steps, step(plain, formula`${reference.known} + ${kappa.known} * (${gapThen} - ${gapNow})`));
  }
  if (!on) return { known: plain, steps };
  const fall = narrowingSteps(context, point);
  const affinity = known('χ', 'affinity', point.bands.affinity, 'eV', WORKED);
  return { known: affinity, steps: [...steps, ...fall.steps, step(affinity, formula`${plain} + ${fall.conduction}`)] };
}

export function permittivitySteps(context: Context, point: Point): Worked {
  const { material } = point.layer;
  const bowing = isAlloy(material) ? { path: 'alloy.bowing.permittivity', value: material.bowing.permittivity } : null;
  return mixed(context, point, known('ε_s', 'static permittivity, relative', point.bands.permittivity, '', WORKED), 'permittivity', 'static permittivity, relative,', '', (c) => c.permittivity, bowing);
}
