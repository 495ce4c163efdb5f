import { barrierHeights, pinningSlope } from '../../solver/barrier.ts';
import { isAlloy } from '../../solver/index.ts';
import { origin } from '../parameters/entry-values.ts';
import { affinitySteps, composition, gapSteps } from './bands-steps.ts';
import type { End } from './contact-workings.ts';
import { NO_SHIFTS, type BarrierShift, type Context } from './context.ts';
import { knownsOf } from './expression.ts';
import { formula } from './formula.ts';
import { DESIGN, known, WORKED, type Known } from './known.ts';
import { materialAsks, metalAsks, originOf } from './published.ts';
import { step, type Step } from './step.ts';
import type { Rival } from './workings.ts';

export interface Barrier {
  n: Known;
  p: Known;
  steps: Step[];
  /** by the work function alone; null where none is known */ ideal: { n: Known; p: Known; steps: Step[]; pStep: Step } | null;
}

/** Both barriers of an end by whatever fixes them. */
export function barrierSteps(context: Context, end: End): Barrier {
  const { row, point } = end;
  const shift = context.shifts.barriers[row.side];
  if (shift) return movedBarrier(context, end, shift);
  const boundary = context.stack[row.side];
  const gap = gapSteps(context, point);
  const n = known('φ_Bn', 'barrier for electrons', row.barrier_n_eV ?? Number.NaN, 'eV', WORKED);
  const p = known('φ_Bp', 'barrier for holes', row.barrier_p_eV ?? Number.NaN, 'eV', WORKED);
  const other = (mine: Known, its: Known): Step => step(mine, formula`${gap.known} - ${its}`);
  if (boundary.kind === 'pinned') {
    const level = known('E_s', 'Ec − EF at the surface, given in the design', boundary.level, 'eV', DESIGN, { path: `${row.side}.level` });
    return { n, p, steps: [...gap.steps, step(n, formula`${level}`), other(p, n)], ideal: null };
  }
  if (boundary.kind !== 'barrier') return { n, p, steps: [], ideal: null };
  const ideal = idealOf(context, end, gap.known);
  const { source } = boundary;
  if (source.from !== 'workFunction') {
    const own = measuredOrGiven(context, end, source);
    const steps = source.carrier === 'n' ? [step(n, formula`${own}`), other(p, n)] : [step(p, formula`${own}`), other(n, p)];
    return { n, p, steps: [...gap.steps, ...steps], ideal };
  }
  const chi = affinitySteps(context, point);
  const phi = metalAsks(context.catalogue, boundary.metal ?? '')('workFunction', 'φ_m', 'work function', source.workFunction, 'eV');
  const slope = source.slope === 'material' ? pinningSlope(point.layer.material, point.x) : source.slope;
  if (slope === 1) return { n, p, steps: [...gap.steps, ...chi.steps, step(n, formula`${phi} - ${chi.known}`), other(p, n)], ideal };
  const { known: S, steps: slopeSteps } = slopeOf(context, end, slope, source.slope === 'material');
  const cnlValue = neutrality(n.value, phi.value, chi.known.value, slope);
  const { known: cnl, steps: cnlSteps } = neutralityOf(context, end, gap.known.value - cnlValue);
  const below = known('φ_CNL', 'charge neutrality level below Ec', cnlValue, 'eV', WORKED);
  return {
    n, p, ideal,
    steps: [...gap.steps, ...chi.steps, ...slopeSteps, ...cnlSteps, step(below, formula`${gap.known} - ${cnl}`), step(n, formula`${S} * (${phi} - ${chi.known} - ${below}) + ${below}`, 'Cowley and Sze, J. Appl. Phys. 36, 3212 (1965).'), other(p, n)],
  };
}

/** A barrier that its tolerance has moved: the nominal one by whatever fixes it, then the tolerance. */
function movedBarrier(context: Context, end: End, { nominal, carrier, amount }: BarrierShift): Barrier {
  const { row, point } = end;
  const gap = gapSteps(context, point);
  const heights = nominal.kind === 'barrier' ? barrierHeights(nominal.source, point.layer.material, point.x, point.bands) : { barrierN: nominal.kind === 'pinned' ? nominal.level : Number.NaN, barrierP: nominal.kind === 'pinned' ? point.bands.gap - nominal.level : Number.NaN, source: null };
  const found = barrierSteps({ ...context, stack: { ...context.stack, [row.side]: nominal }, shifts: NO_SHIFTS }, { ...end, row: { ...row, barrier_n_eV: heights.barrierN, barrier_p_eV: heights.barrierP, barrier_source: heights.source } });
  const [mine, its] = carrier === 'n' ? [found.n, found.p] : [found.p, found.n];
  const base: Known = { ...mine, sign: `${mine.sign},0`, words: `${mine.words}, without its tolerance` };
  const steps = found.steps.filter((s) => s.kind === 'law' || s.result !== its || found.steps.some((t) => t.kind === 'formula' && knownsOf(t.formula).includes(its) && t.result === mine)).map((s): Step => (s.kind === 'formula' && s.result === mine ? { ...s, result: base } : s));
  const n = known('φ_Bn', 'barrier for electrons at this corner', row.barrier_n_eV ?? Number.NaN, 'eV', WORKED);
  const p = known('φ_Bp', 'barrier for holes at this corner', row.barrier_p_eV ?? Number.NaN, 'eV', WORKED);
  const delta = known('Δ', 'tolerance of the barrier at this corner', amount, 'eV', WORKED);
  const [moved, other] = carrier === 'n' ? [n, p] : [p, n];
  return { n, p, steps: [...gap.steps, ...steps, step(moved, formula`${base} + ${delta}`), step(other, formula`${gap.known} - ${moved}`)], ideal: found.ideal };
}

/** The neutrality level below Ec that the solved barrier rests on. */
function neutrality(barrierN: number, phi: number, chi: number, slope: number): number {
  return (barrierN - slope * (phi - chi)) / (1 - slope);
}

function slopeOf(context: Context, { row, point }: End, value: number, ofMaterial: boolean): { known: Known; steps: Step[] } {
  const S = known('S', 'slope of the barrier against the work function', value, '', WORKED);
  const { material } = point.layer;
  if (!ofMaterial) return { known: known('S', S.words, value, '', DESIGN, { path: `${row.side}.pinning` }), steps: [] };
  if (!isAlloy(material) || material.pinningSlope !== undefined) return { known: materialAsks(context.catalogue, material.id)('pinningSlope', 'S', 'slope of the barrier against the work function', value, ''), steps: [] };
  const x = composition(point);
  const [a, b] = [material.first, material.second].map((c, i) => materialAsks(context.catalogue, c.id)('pinningSlope', `S_${i === 0 ? 'A' : 'B'}`, 'slope of the barrier', c.pinningSlope ?? 1, ''));
  return { known: S, steps: [step(S, formula`(1 - ${x}) * ${a} + ${x} * ${b}`)] };
}

function neutralityOf(context: Context, { point }: End, value: number): { known: Known; steps: Step[] } {
  const { material } = point.layer;
  const words = 'charge neutrality level above Ev';
  if (!isAlloy(material) || material.neutralityLevel !== undefined) return { known: materialAsks(context.catalogue, material.id)('neutralityLevel', 'E_CNL', words, material.neutralityLevel ?? value, 'eV'), steps: [] };
  const x = composition(point);
  const k = known('E_CNL', words, value, 'eV', WORKED);
  const of = (c: { id: string; neutralityLevel?: number }, mark: string): Known => materialAsks(context.catalogue, c.id)('neutralityLevel', `E_${mark}`, words, c.neutralityLevel, 'eV');
  const [a, b] = [of(material.first, 'A'), of(material.second, 'B')];
  if (point.x === 0) return { known: k, steps: [step(k, formula`${a}`)] };
  if (point.x === 1) return { known: k, steps: [step(k, formula`${b}`)] };
  return { known: k, steps: [step(k, formula`(1 - ${x}) * ${a} + ${x} * ${b}`)] };
}

function measuredOrGiven(context: Context, { row, point }: End, source: { from: 'given' | 'measured'; carrier: 'n' | 'p'; height: number }): Known {
  const words = `barrier for ${source.carrier === 'n' ? 'electrons' : 'holes'}, ${source.from === 'given' ? 'given in the design' : 'measured'}`;
  const sign = source.carrier === 'n' ? 'φ_n' : 'φ_p';
  if (source.from === 'given') return known(sign, words, source.height, 'eV', DESIGN, { path: `${row.side}.barrier` });
  const found = context.catalogue.metals.get(row.metal ?? '');
  const measured = (found?.entry.barriers ?? []).filter((b) => b.material === point.layer.material.id);
  const used = measured.find((b) => b.carrier === source.carrier) ?? measured[0];
  return known(sign, words, source.height, 'eV', originOf(origin(used), !(found?.preset ?? false)), { path: `${row.metal} barriers on ${point.layer.material.id}` });
}

/** Work function less affinity, where the metal has a work function. */
function idealOf(context: Context, { row, point }: End, gap: Known): Barrier['ideal'] {
  const metal = row.metal === null ? undefined : context.catalogue.metals.get(row.metal);
  const text = metal?.entry.workFunction;
  if (metal === undefined || text === undefined) return null;
  const phi = metalAsks(context.catalogue, metal.entry.id)('workFunction', 'φ_m', 'work function', electronvolts(text), 'eV');
  if (Number.isNaN(phi.value)) return null;
  const chi = affinitySteps(context, point);
  const n = known('φ_Bn,ideal', 'work function less affinity', phi.value - chi.known.value, 'eV', WORKED);
  const p = known('φ_Bp,ideal', 'gap less that', gap.value - n.value, 'eV', WORKED);
  return { n, p, steps: [...chi.steps, step(n, formula`${phi} - ${chi.known}`)], pStep: step(p, formula`${gap} - ${n}`) };
}

/** A plain energy in eV or meV; NaN for an expression, which only the reader of designs understands. */
function electronvolts(text: string): number {
  const found = /^\s*([-+]?[\d.]+(?:e[-+]?\d+)?)\s*(m?)eV\s*$/i.exec(text);
  return found ? Number(found[1]) * (found[2] === '' ? 1 : 1e-3) : Number.NaN;
}

/** Other published barriers of the pair, and what the work function would give. */
export function barrierRivals(context: Context, end: End): Rival[] {
  const { row, point } = end;
  const metal = row.metal === null ? undefined : context.catalogue.metals.get(row.metal);
  if (!metal) return [];
  const boundary = context.stack[row.side];
  const used = boundary.kind === 'barrier' && boundary.source.from === 'measured' ? boundary.source : null;
  const rivals = (metal.entry.barriers ?? [])
    .filter((b) => b.material === point.layer.material.id && !(used && b.carrier === used.carrier && Math.abs(electronvolts(b.height) - used.height) < 1e-9))
    .map((b): Rival => {
      const from = originOf(origin(b), !metal.preset);
      return { words: `measured barrier for ${b.carrier === 'n' ? 'electrons' : 'holes'}`, value: `${b.height}`, source: from.from === 'source' ? from.text : 'own value' };
    });
  const ideal = idealOf(context, end, gapSteps(context, point).known);
  if (ideal && row.barrier_source !== 'ideal') rivals.push({ words: 'work function less affinity, for electrons', value: `${Number(ideal.n.value.toPrecision(4))} eV`, source: 'Schottky–Mott' });
  return rivals;
}
