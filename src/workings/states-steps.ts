import { isAlloy, type CrystalMaterial } from '../../solver/index.ts';
import { densityOfStates, gapAt, massAt } from '../../solver/bands.ts';
import { M3_PER_CM3 } from '../../solver/units.ts';
import { composition, pureBands, valleyOf, type Worked } from './bands-steps.ts';
import type { Context, Point } from './context.ts';
import { formula } from './formula.ts';
import { electronMass, known, planck, temperatureOf, thermalJoule, WORKED, type Known } from './known.ts';
import { materialAsks } from './published.ts';
import { step, type Step } from './step.ts';

const POWERS = ['', '', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];

/** Density of states of a band at a place. */
export function statesSteps(context: Context, point: Point, carrier: 'n' | 'p'): Worked {
  const T = context.stack.temperature;
  const value = carrier === 'n' ? point.bands.nc : point.bands.nv;
  const sign = carrier === 'n' ? 'N_c' : 'N_v';
  const words = `effective density of states of the ${carrier === 'n' ? 'conduction' : 'valence'} band`;
  const mass = known(carrier === 'n' ? 'm_e' : 'm_h', `density-of-states mass of ${carrier === 'n' ? 'electrons' : 'holes'}`, massBehind(value, T), 'm₀', WORKED);
  const steps = massSteps(context, point, carrier, mass);
  const perVolume = known(sign, words, value * M3_PER_CM3, 'cm⁻³', WORKED, { scale: M3_PER_CM3 });
  steps.push(step(perVolume, formula`2 * (2 * pi * ${mass} * ${electronMass} * ${thermalJoule(T)} / ${planck} ^ 2) ^ (3 / 2)`, 'Worked out in SI.'));
  return { known: known(sign, words, value, 'cm⁻³', WORKED), steps };
}

/** The mass that gives a density of states, m0. */
function massBehind(density: number, T: number): number {
  return Math.cbrt((density / densityOfStates(1, T)) ** 2);
}

function massSteps(context: Context, point: Point, carrier: 'n' | 'p', result: Known): Step[] {
  const { material } = point.layer;
  const T = context.stack.temperature;
  const key = carrier === 'n' ? 'electronMass' : 'holeMass';
  const words = result.words;
  const polynomial = (into: Known, crystal: CrystalMaterial, path: string, mass: readonly number[] | undefined): Step => {
    const ask = materialAsks(context.catalogue, crystal.id);
    if (path === key && crystal.formulas?.[key]) return step(into, formula`${ask(key, `m_${crystal.id}`, `${words}, by the formula of this design`, massAt(crystal, key, T), 'm₀')}`);
    const t = temperatureOf(T);
    const terms = (mass ?? []).map((c, i) => {
      const coefficient = ask(path, (mass ?? []).length === 1 ? `m_${crystal.id}` : `c_${i}`, i === 0 ? words : `${words}, power ${i} of T in K`, c, i === 0 ? 'm₀' : `m₀/K${i === 1 ? '' : POWERS[i] ?? `^${i}`}`);
      return { sign: 1 as const, of: i === 0 ? formula`${coefficient}` : i === 1 ? formula`${coefficient} * ${t}` : formula`${coefficient} * ${t} ^ ${{ kind: 'number', value: i, text: String(i) }}` };
    });
    return step(into, terms.length === 1 ? terms[0].of : { kind: 'sum', terms });
  };
  const massOf = (crystal: CrystalMaterial, valley: string | null): { mass: readonly number[] | undefined; path: string } => {
    const other = carrier === 'n' && valley !== null ? crystal.otherValleys?.find((v) => v.name === valley) : undefined;
    return other ? { mass: other.electronMass, path: `otherValleys.${valley}.electronMass` } : { mass: crystal[key], path: key };
  };
  if (!isAlloy(material)) {
    const other = material.otherValleys?.find((v) => gapAt(material.gap, T) !== pureBands(context, material, 0).gap && gapAt(v.gap, T) === pureBands(context, material, 0).gap);
    const { mass, path } = massOf(material, other?.name ?? null);
    return [polynomial(result, material, path, mass)];
  }
  if (material.formulas?.[key]) return [step(result, formula`${materialAsks(context.catalogue, material.id)(key, `m_${material.id}`, `${words}, by the formula of this design`, result.value, 'm₀')}`)];
  const { name } = material.formulas?.gap ? { name: null } : valleyOf(context, material, point.x);
  const x = composition(point);
  const worked = (crystal: CrystalMaterial, mark: string): { known: Known; step: Step } => {
    const { mass, path } = massOf(crystal, name);
    const own = path === key && crystal.formulas?.[key];
    const k = known(`m_${mark}`, `${words} in ${crystal.id}`, own ? massAt(crystal, key, T) : (mass ?? []).reduce((sum, c, i) => sum + c * T ** i, 0), 'm₀', WORKED);
    return { known: k, step: polynomial(k, crystal, path, mass) };
  };
  const [a, b] = [worked(material.first, 'A'), worked(material.second, 'B')];
  if (point.x === 0) return [a.step, step(result, formula`${a.known}`)];
  if (point.x === 1) return [b.step, step(result, formula`${b.known}`)];
  const bowing = carrier === 'n' ? material.bowing.electronMass : material.bowing.holeMass;
  if (!bowing) return [a.step, b.step, step(result, formula`(1 - ${x}) * ${a.known} + ${x} * ${b.known}`)];
  const bow = materialAsks(context.catalogue, material.id)(`alloy.bowing.${key}`, 'b', `bowing: ${words}`, bowing, 'm₀');
  return [a.step, b.step, step(result, formula`(1 - ${x}) * ${a.known} + ${x} * ${b.known} - ${x} * (1 - ${x}) * ${bow}`)];
}
