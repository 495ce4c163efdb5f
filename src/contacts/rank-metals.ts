import { BOLTZMANN } from '../../solver/constants.ts';
import { isAlloy, type ContactFigures } from '../../solver/index.ts';
import { layerFigures } from '../../solver/layer.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design, MetalInput } from '../design/types.ts';
import type { Point, Reading } from '../requirements/point.ts';
import type { Tolerances, Uncertainty } from '../requirements/uncertainties.ts';
import { BLOCKS } from '../requirements/verdict.ts';
import { cornerWords, temperatureWriter } from '../requirements/words.ts';
import { NOISE, worstCases, type Readable, type WorstCase } from '../requirements/worst-case.ts';
import { barrierValues, heightsOf, valueInForce, type BarrierValue } from './barrier-values.ts';
import { orderedRows } from './metal-order.ts';
import { ContactSurface, isBarrierOf, type BarrierInput, type Found, type Side } from './contact-surface.ts';

export interface RankOptions {
  side: Side;
  /** values for this run: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** which tolerances count; default "all" */ tolerances?: Tolerances;
  /** only this metal, with this value of its barrier in place of the one that the design would take */ rerun?: { metal: string; key: string };
}

/** What one metal would conduct on the surface. Keys as in the result document: the unit stands after the underscore. */
export interface MetalRow {
  metal: string;
  name: string;
  /** "element", "silicide" and so on; null where the entry does not say */ kind: string | null;
  /** entered in this design */ own: boolean;
  /** it is on the surface now */ present: boolean;
  /** key of the value that was used, null without one */ value: string | null;
  /** all values known for the pair, side by side */ values: BarrierValue[];
  /** what choosing the metal writes into the design */ contact: BarrierInput;
  barrier_n_eV: number | null;
  barrier_p_eV: number | null;
  /** at the design's temperature; null where `reason` says why */ rho_c_ohm_cm2: number | null;
  rho_c_n_ohm_cm2: number | null;
  rho_c_p_ohm_cm2: number | null;
  /** least and most at the design's temperature, within the tolerances; null where one of them is not known */ band_ohm_cm2: [number, number] | null;
  /** over the temperatures and the tolerances */ worst_ohm_cm2: number | null;
  /** "-40 degC, Ncap -20 %, barrier +50 meV" */ worst_at: string | null;
  /** where least, most and worst were found; null without them */ points: { least: MetalPoint | null; most: MetalPoint | null; worst: MetalPoint | null };
  /** no finite resistivity: at the design's temperature, or only in the worst case; a largest limit is then missed */ blocks: 'here' | 'worst' | null;
  e00_over_kT: number | null;
  transport: ContactFigures['transport'];
  lowering_eV: number | null;
  saturation_A_cm2: number | null;
  /** why a figure is missing */ reason: string | null;
  notes: string[];
}

/** A temperature and the tolerances that are moved there, as signed counts. */
export interface MetalPoint {
  temperature_K: number;
  tolerances: { name: string; count: number }[];
}

/** Metals on one surface. */
export interface Ranking {
  kind: 'ranked';
  side: Side;
  /** name of the layer under the metal */ layer: string;
  material: string;
  /** its majority */ majority: 'n' | 'p';
  temperature_K: number;
  /** K, coldest first; null where the design states none */ temperature_range_K: [number, number] | null;
  /** the temperatures as the design writes them: "-40 degC to 125 degC" */ temperatures: string;
  /** tolerances that move the contact resistivity, as text: "barrier 50 meV" */ tolerances: string[];
  /** whose barrier is taken where both were measured */ carrier: 'n' | 'p';
  /** the least that a requirement allows this end; null without one */ limit_ohm_cm2: number | null;
  /** best worst case first, then those without a figure, by name */ rows: MetalRow[];
  /** what holds for all rows */ notes: string[];
  /** solves that it took */ evaluations: number;
}

export type RankAnswer = Ranking | { kind: 'complaints'; complaints: Complaint[] };
export type RankProgress = { done: number; of: number; seen?: MetalRow };

/** Barriers that stand in for all metals where it is asked which tolerances move a contact, shares of the gap. */
const PROBES = [0.3, 0.6];
/** Tolerances of which all corners are solved. */
const MOST_FACTORIAL = 4;

/** Ranks every metal of the presets and of the design on one surface; a step a metal. */
export function* rankMetals(design: Design, options: RankOptions): Generator<RankProgress, RankAnswer> {
  const { side, set = {}, tolerances = 'all', rerun } = options;
  const surface = ContactSurface.read(design, side, set, tolerances);
  if (Array.isArray(surface)) return { kind: 'complaints', complaints: surface };
  const all = [...surface.catalogue.metals.values()];
  const { material } = surface.layer;
  // Measured ones first: what is best known is seen first.
  const measured = (metal: MetalInput): boolean => (metal.barriers ?? []).some((row) => row.material === material.id);
  const entries = rerun === undefined ? [...all.filter(({ entry }) => measured(entry)), ...all.filter(({ entry }) => !measured(entry))] : all.filter(({ entry }) => entry.id === rerun.metal);
  const of = entries.length + 1;
  yield { done: 0, of };
  surface.uncertainties = relevant(surface);
  yield { done: 1, of };
  const rows: MetalRow[] = [];
  for (const [i, { entry, preset }] of entries.entries()) {
    const row = metalRow(surface, entry, !preset, rerun?.key);
    rows.push(row);
    yield { done: i + 2, of, seen: row };
  }
  const { temperature } = surface.stack;
  return {
    kind: 'ranked', side, layer: surface.layer.name, material: material.id, majority: surface.majority, temperature_K: temperature,
    temperature_range_K: surface.temperatureRange === null ? null : [...surface.temperatureRange], carrier: surface.stated.carrier ?? 'n', limit_ohm_cm2: surface.limit,
    temperatures: (surface.temperatureRange ?? [temperature]).map(temperatureWriter(design)).join(' to '),
    tolerances: surface.uncertainties.map(({ label, tolerance }) => `${label} ${tolerance}`),
    rows: orderedRows(rows, { by: 'worst', descending: false }, surface.majority), notes: notesOf(surface), evaluations: surface.evaluations,
  };
}

/** Only those uncertainties that move a contact on this surface, so that each metal takes few solves; the barrier's always. */
function relevant(surface: ContactSurface): Uncertainty[] {
  const { uncertainties, temperatureRange, stack, side } = surface;
  const { gap } = surface.barrierSurface.bands;
  const zero = uncertainties.map(() => 0);
  const temperatures = [...new Set([...(temperatureRange ?? []), stack.temperature])];
  return uncertainties.filter((u, i) => {
    if (isBarrierOf(u, side)) return true;
    return PROBES.some((share) => {
      const contact: BarrierInput = { kind: 'barrier', barrier: `${share * gap} eV`, carrier: surface.majority, ...(surface.stated.imageForce === undefined ? {} : { imageForce: surface.stated.imageForce }) };
      return temperatures.some((temperature) => {
        const logs = [0, -1, 1].map((count) => logOf(surface.at(contact, { temperature, counts: zero.map((_, j) => (j === i ? count : 0)) }, searched(surface))));
        // Where nothing is known, it counts.
        return logs.some((log) => log === null) ? logs.some((log) => log !== null) : Math.max(...(logs as number[])) - Math.min(...(logs as number[])) > NOISE;
      });
    });
  });
}

/** The wave equation takes some hundred times as long as WKB: corners are looked for with WKB, and their figures then worked out as asked. */
function searched(surface: ContactSurface): 'wkb' | 'kemble' {
  return surface.stack.assumptions.transmission === 'kemble' ? 'kemble' : 'wkb';
}

function logOf(found: Found): number | null {
  if (!('figures' in found)) return null;
  const { rhoC } = found.figures;
  // What blocks is still the worst of all.
  return rhoC === null ? null : Math.log(Math.min(rhoC, Number.MAX_VALUE));
}

function metalRow(surface: ContactSurface, metal: MetalInput, own: boolean, key: string | undefined): MetalRow {
  const { stated } = surface;
  const values = barrierValues(metal, stated, surface.barrierSurface);
  const wanted: BarrierInput = { kind: 'barrier', metal: metal.id, ...stated };
  const boundary = surface.boundary(wanted);
  const heights = typeof boundary === 'string' ? null : heightsOf(boundary.source, surface.barrierSurface);
  const asked = key === undefined ? undefined : values.find((value) => value.key === key);
  const value = asked ?? (typeof boundary === 'string' || heights === null ? null : valueInForce(values, boundary.source, heights));
  const contact = asked?.contact ?? wanted;
  const there = surface.design[surface.side];
  const row: MetalRow = {
    metal: metal.id, name: metal.name ?? metal.id, kind: metal.kind ?? null, own, present: there.kind === 'barrier' && there.metal === metal.id, value: value?.key ?? null, values, contact,
    barrier_n_eV: asked?.barrier_n_eV ?? heights?.barrierN ?? null, barrier_p_eV: asked?.barrier_p_eV ?? heights?.barrierP ?? null,
    rho_c_ohm_cm2: null, rho_c_n_ohm_cm2: null, rho_c_p_ohm_cm2: null, band_ohm_cm2: null, worst_ohm_cm2: null, worst_at: null, points: { least: null, most: null, worst: null }, blocks: null,
    e00_over_kT: null, transport: null, lowering_eV: null, saturation_A_cm2: null, reason: null, notes: [],
  };
  if (asked === undefined && typeof boundary === 'string') return { ...row, reason: boundary };
  return { ...row, ...figuresOf(surface, contact) };
}

type Figured = Partial<MetalRow>;

function figuresOf(surface: ContactSurface, contact: BarrierInput): Figured {
  const { temperature } = surface.stack;
  const nominal: Point = { temperature, counts: surface.uncertainties.map(() => 0) };
  const here = surface.at(contact, nominal);
  if (!('figures' in here)) return { reason: here.refusal };
  const f = here.figures;
  const figured: Figured = {
    ...withRho(f), e00_over_kT: f.e00 === null ? null : f.e00 / (BOLTZMANN * temperature), transport: f.transport, lowering_eV: f.lowering, saturation_A_cm2: f.saturationCurrent, notes: [...f.rhoCNotes],
  };
  if (f.blocks) return { ...figured, blocks: 'here', reason: `${BLOCKS} at ${temperatureWriter(surface.design)(temperature)}` };
  if (f.rhoC === null || !Number.isFinite(f.rhoC)) return { ...figured, reason: f.rhoCNotes[0] ?? 'no contact resistivity', notes: f.rhoCNotes.slice(1) };
  const [most, least] = run(new Study(surface, contact), [MOST, LEAST], [temperature], temperature);
  const range = surface.temperatureRange ?? [temperature];
  const study = new Study(surface, contact);
  const [worst] = run(study, [MOST], range, temperature);
  const low = rhoAt(surface, contact, least);
  const high = rhoAt(surface, contact, most);
  const top = rhoAt(surface, contact, worst);
  if (low !== null && high !== null) figured.band_ohm_cm2 = [low, high];
  const place = ({ reading }: WorstCase): MetalPoint | null => reading && { temperature_K: reading.point.temperature, tolerances: reading.point.counts.flatMap((count, i) => (count === 0 ? [] : [{ name: surface.uncertainties[i].label, count }])) };
  figured.points = { least: place(least), most: place(most), worst: place(worst) };
  const words = (found: WorstCase): string => cornerWords((found.reading as Reading).point, named(surface, contact), temperatureWriter(surface.design), found.effects);
  if (worst.reading !== null && blocksAt(surface, contact, worst.reading.point)) return { ...figured, blocks: 'worst', worst_at: words(worst) };
  if (worst.unanswered.length > 0 || top === null) {
    const blank = worst.unanswered[0];
    const where = cornerWords(blank?.point ?? (worst.reading?.point as Point), named(surface, contact), temperatureWriter(surface.design));
    const count = worst.unanswered.length;
    return { ...figured, reason: `no worst case: ${blank?.refusal ?? 'no contact resistivity'} (${count > 1 ? `at ${count} corners, first at ` : ''}${where})` };
  }
  figured.worst_ohm_cm2 = top;
  figured.worst_at = words(worst);
  return figured;
}

/** The tolerances as they are told of a contact: a barrier measured for the other carrier moves as that carrier's. */
function named(surface: ContactSurface, contact: BarrierInput): Uncertainty[] {
  const boundary = surface.boundary(contact);
  const carrier = typeof boundary === 'string' || boundary.source.from === 'workFunction' ? surface.majority : boundary.source.carrier;
  if (carrier === surface.majority) return [...surface.uncertainties];
  return surface.uncertainties.map((u) => (isBarrierOf(u, surface.side) ? { ...u, label: `${u.label} of ${carrier === 'n' ? 'electrons' : 'holes'}` } : u));
}

function withRho({ rhoC, rhoCn, rhoCp }: ContactFigures): Figured {
  const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);
  return { rho_c_ohm_cm2: finite(rhoC), rho_c_n_ohm_cm2: finite(rhoCn), rho_c_p_ohm_cm2: finite(rhoCp) };
}

/** The figure at the corner that was found, with the transmission that the design asks for. */
function rhoAt(surface: ContactSurface, contact: BarrierInput, found: WorstCase): number | null {
  if (found.reading === null) return null;
  const there = surface.at(contact, found.reading.point);
  return 'figures' in there && there.figures.rhoC !== null && Number.isFinite(there.figures.rhoC) ? there.figures.rhoC : null;
}

function blocksAt(surface: ContactSurface, contact: BarrierInput, point: Point): boolean {
  const there = surface.at(contact, point);
  return 'figures' in there && there.figures.blocks;
}

function run(study: Study, rows: readonly number[], temperatures: readonly number[], nominal: number): WorstCase[] {
  const steps = worstCases(study, rows, temperatures, nominal, { mostFactorial: MOST_FACTORIAL, samples: 0, inside: 0 });
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** Rows of a study: the highest contact resistivity, the lowest. */
const MOST = 0;
const LEAST = 1;

/** A contact as the search for the worst case reads it: the lower a score, the worse. */
class Study implements Readable {
  readonly #readings = new Map<string, Reading>();
  readonly uncertainties: readonly Uncertainty[];

  constructor(readonly surface: ContactSurface, readonly contact: BarrierInput) {
    this.uncertainties = surface.uncertainties;
  }

  get evaluations(): number {
    return this.surface.evaluations;
  }

  has(point: Point): boolean {
    return this.#readings.has(keyOf(point));
  }

  at(point: Point): Reading {
    let reading = this.#readings.get(keyOf(point));
    if (reading === undefined) {
      const found = this.surface.at(this.contact, point, searched(this.surface));
      const log = logOf(found);
      const refusal = 'figures' in found ? (log === null ? (found.figures.rhoCNotes[0] ?? 'no contact resistivity') : null) : found.refusal;
      reading = { point, scores: log === null ? [null, null] : [-log, log], figures: [log, log], refusal };
      this.#readings.set(keyOf(point), reading);
    }
    return reading;
  }
}

const keyOf = ({ temperature, counts }: Point): string => `${temperature}|${counts.join()}`;

/** What is to be kept in mind with every figure. */
function notesOf({ layer, majority, stack, uncertainties, side }: ContactSurface): string[] {
  const { material } = layer;
  const notes: string[] = [];
  const outside = isAlloy(material) ? undefined : material.outsideContactModel;
  if (outside !== undefined && outside.carrier === majority) {
    notes.push(`mechanism outside the model; contacts to ${outside.carrier}-type ${material.id} were measured between ${outside.low.toExponential(1)} and ${outside.high.toExponential(1)} ohm cm^2 (${outside.source}), decades away from what a barrier explains`);
  }
  if (stack.assumptions.transmission === 'exact') notes.push('corners were looked for with WKB, their figures worked out with the exact transmission');
  if (!uncertainties.some((u) => isBarrierOf(u, side))) notes.push('without a tolerance of the barrier: heights are known to tens of meV at best');
  const { regime } = layerFigures(layer, stack.temperature, stack.assumptions, false);
  if (regime === 'freeze-out' || regime === 'intrinsic') notes.push(`${layer.name} is ${regime === 'intrinsic' ? 'intrinsic' : 'frozen out'} at the design's temperature`);
  return notes;
}
