import { carrierLog, type CarrierLog } from '../../solver/carriers.ts';
import { isAlloy, type MobilityLaw } from '../../solver/index.ts';
import { carrierMobility } from '../../solver/mobility.ts';
import { isUniform } from '../../solver/profile.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import type { LayerResult } from '../result/types.ts';
import { permittivitySteps, type Worked } from './bands-steps.ts';
import { groundOf, type Neutral } from './carrier-steps.ts';
import type { Context, Point } from './context.ts';
import { formula } from './formula.ts';
import { sheetIntegral } from './governing.ts';
import { charge, DESIGN, known, SOLVED, vacuumPermittivity, WORKED, type Known } from './known.ts';
import { dopingAt, totalDoping } from './narrowing-steps.ts';
import { materialAsks } from './published.ts';
import { law, step, type Step } from './step.ts';
import type { Found } from './workings.ts';

/** How fast a carrier answers the level: kT dn/dEF, cm^-3. */
function responseSteps(context: Context, point: Point, neutral: Neutral, carrier: 'n' | 'p'): Worked {
  const { bands } = point;
  const plain = context.stack.assumptions.statistics === 'boltzmann';
  const [states, above, alpha, density] = carrier === 'n' ? [neutral.nc, formula`-${neutral.level}`, bands.kaneN, neutral.n] : [neutral.nv, formula`${neutral.level} - ${neutral.gap}`, bands.kaneP, neutral.p];
  const out: CarrierLog = { log: 0, slope: 0 };
  const eta = carrier === 'n' ? -point.ecMinusEf / bands.kT : (point.ecMinusEf - bands.gap) / bands.kT;
  carrierLog(eta, alpha * bands.kT, plain, out);
  const k = known(carrier === 'n' ? 'n^′' : 'p^′', carrier === 'n' ? 'kT dn/dEF' : '−kT dp/dEF', states.value * Math.exp(out.log) * out.slope, 'cm⁻³', WORKED);
  const a = known('α', 'non-parabolicity', alpha, 'eV⁻¹', WORKED);
  if (plain && alpha === 0) return { known: k, steps: [step(k, formula`${density}`)] };
  return { known: k, steps: [step(k, alpha > 0 ? formula`${states} * kaneSlope((${above}) / ${neutral.kT}, ${a} * ${neutral.kT})` : formula`${states} * fermiSlope((${above}) / ${neutral.kT})`)] };
}

/** Carriers below this, cm^-3, are near the end of what numbers hold. */
const LEAST_SUM = 1e-290;

/** The Debye length by the exponent of the majority, which is far from its band where there are so few. */
function tinyCarriers(point: Point, neutral: Neutral, eps: Known, volts: Known, length: Known): Step {
  const ofElectrons = point.ecMinusEf < point.bands.gap - point.ecMinusEf;
  const states = ofElectrons ? neutral.nc : neutral.nv;
  const away = ofElectrons ? formula`${neutral.level}` : formula`(${neutral.gap} - ${neutral.level})`;
  const far = ofElectrons ? point.ecMinusEf : point.bands.gap - point.ecMinusEf;
  const alone = Math.sqrt((eps.value * vacuumPermittivity.value * volts.value) / (charge.value * states.value)) * Math.exp(far / (2 * point.bands.kT));
  const rest = known('r', 'share that the other carrier and the shape of the bands add', (alone / length.value) ** 2 - 1, '', SOLVED);
  return step(length, formula`sqrt(${eps} * ${vacuumPermittivity} * ${volts} / (${charge} * ${states} * (1 + ${rest}))) * exp(${away} / (2 * ${neutral.kT}))`);
}

export function debyeWorkings(context: Context, point: Point, row: LayerResult, neutral: Neutral): Found {
  if (row.debye_nm === null) return { steps: groundOf(neutral), remarks: ['There are so few carriers that the length is beyond the largest number.'], rests: ['carriers', 'bands'] };
  const eps = permittivitySteps(context, point);
  const [n, p] = [responseSteps(context, point, neutral, 'n'), responseSteps(context, point, neutral, 'p')];
  const sum = n.known.value + p.known.value;
  const length = known('L_D', 'Debye length', row.debye_nm * CM_PER_NM, 'nm', sum > LEAST_SUM ? WORKED : SOLVED, { scale: CM_PER_NM });
  const volts = known('kT/q', 'thermal voltage', neutral.kT.value, 'V', WORKED);
  const steps = [...groundOf(neutral), ...eps.steps, ...n.steps, ...p.steps];
  if (!(sum > LEAST_SUM)) return { steps: [...groundOf(neutral), ...eps.steps, tinyCarriers(point, neutral, eps.known, volts, length)], remarks: ['The carriers are below the smallest number: the length is worked out by their exponent.'], rests: ['carriers', 'bands'] };
  const density = known('n', 'majority carriers', Math.max(neutral.n.value, neutral.p.value), 'cm⁻³', WORKED);
  const simple = known('L_D,B', 'by the textbook', Math.sqrt((point.bands.permittivity * vacuumPermittivity.value * volts.value) / (charge.value * density.value)), 'nm', WORKED, { scale: CM_PER_NM });
  return {
    steps: [...steps, step(length, formula`sqrt(${eps.known} * ${vacuumPermittivity} * ${volts} / (${charge} * (${n.known} + ${p.known})))`)],
    simpler: { words: 'Boltzmann statistics, majority alone', steps: [step(simple, formula`sqrt(${eps.known} * ${vacuumPermittivity} * ${volts} / (${charge} * ${density}))`)], difference: `factor ${Number((simple.value / length.value).toPrecision(3))}` },
    rests: ['carriers', 'bands'],
  };
}

/** The carrier whose mobility the ledger shows. */
const majorityOf = (row: LayerResult): 'electron' | 'hole' => (row.type === 'p' || (row.type === 'i' && row.p_cm3 > row.n_cm3) ? 'hole' : 'electron');

/** Mobility of a carrier by its material's law; null where there is none. */
export function mobilitySteps(context: Context, point: Point, carrier: 'electron' | 'hole'): Worked | null {
  const { material } = point.layer;
  const { donors, acceptors } = dopingAt(point);
  const value = carrierMobility(material, carrier, point.x, donors + acceptors);
  if (value === null) return null;
  const owner = material.mobility?.[carrier] === undefined && isAlloy(material) ? (point.x === 0 ? material.first : material.second) : material;
  const of = owner.mobility?.[carrier] as MobilityLaw;
  const ask = materialAsks(context.catalogue, owner.id);
  const unit = 'cm²/(V s)';
  const mu = known(carrier === 'electron' ? 'μ_n' : 'μ_p', `mobility of ${carrier}s`, value, unit, WORKED);
  if (typeof of === 'number') return { known: mu, steps: [step(mu, formula`${ask(`mobility.${carrier}`, 'μ_0', `${carrier} mobility`, of, unit)}`)] };
  const part = (key: keyof typeof of, sign: string, words: string, u: string): Known => ask(`mobility.${carrier}.${key}`, sign, words, of[key], u);
  const least = part('min', 'μ_min', 'least mobility', unit);
  return { known: mu, steps: [step(mu, formula`${least} + (${part('max', 'μ_max', 'largest mobility', unit)} - ${least}) / (1 + (${totalDoping(point)} / ${part('reference', 'N_ref', 'reference doping', 'cm⁻³')}) ^ ${part('exponent', 'γ', 'exponent', '')})`, 'Caughey and Thomas, Proc. IEEE 55, 2192 (1967). A law of room temperature, without temperature.')] };
}

export function mobilityWorkings(context: Context, point: Point, row: LayerResult): Found {
  const carrier = majorityOf(row);
  const mobility = mobilitySteps(context, point, carrier);
  if (!mobility) return { steps: [], remarks: [`No published ${carrier} mobility of ${row.material}${row.x === null ? '' : ' at this composition'} is known here, and between an alloy’s ends nothing is interpolated: alloy scattering makes it smaller than any mean.`], rests: [] };
  return { steps: mobility.steps, rests: [] };
}

function conductionSteps(context: Context, point: Point, row: LayerResult, neutral: Neutral): { steps: Step[]; rho: Known } | null {
  if (row.resistivity_ohm_cm === null) return null;
  const parts = (['electron', 'hole'] as const).flatMap((carrier) => {
    const mobility = mobilitySteps(context, point, carrier);
    return mobility ? [{ mobility, density: carrier === 'electron' ? neutral.n : neutral.p }] : [];
  });
  const rho = known('ρ', `resistivity of ${row.name}`, row.resistivity_ohm_cm, 'Ω cm', WORKED);
  const sum = { kind: 'sum' as const, terms: parts.map(({ mobility, density }) => ({ sign: 1 as const, of: formula`${density} * ${mobility.known}` })) };
  return { rho, steps: [...groundOf(neutral), ...parts.flatMap(({ mobility }) => mobility.steps), step(rho, formula`1 / (${charge} * (${sum}))`)] };
}

const noConduction = (row: LayerResult): string => `There is no figure: a mobility of ${row.material} that counts is not known here, or nothing conducts.`;

export function resistivityWorkings(context: Context, point: Point, row: LayerResult, neutral: Neutral): Found {
  const found = conductionSteps(context, point, row, neutral);
  return { steps: found?.steps ?? groundOf(neutral), remarks: found ? [] : [noConduction(row)], rests: ['carriers', 'bands'] };
}

export function sheetWorkings(context: Context, point: Point, row: LayerResult, neutral: Neutral): Found {
  const found = conductionSteps(context, point, row, neutral);
  if (row.sheet_ohm === null) return { steps: found?.steps ?? groundOf(neutral), remarks: [noConduction(row)], rests: ['carriers', 'bands'] };
  const sheet = known('R_s', `sheet resistance of ${row.name}`, row.sheet_ohm, 'Ω/sq', WORKED);
  const remarks = ['Of the neutral layer: what is depleted in the solved stack is not taken off.'];
  if (!isUniform(point.layer)) {
    const conductance = known('G', 'sheet conductance, by midpoint sums that were halved until they settled to 0.1 %', 1 / row.sheet_ohm, 'S', SOLVED);
    return { steps: [...(found?.steps ?? groundOf(neutral)), law(sheetIntegral(), 'The layer is graded: its conductivity is summed over the depth, with the carriers of local neutrality at each.'), step(sheet, formula`1 / ${conductance}`)], remarks, rests: ['carriers', 'bands'] };
  }
  const d = known('d', `thickness of ${row.name}`, point.layer.thickness, 'nm', DESIGN, { scale: CM_PER_NM, path: `layers[${point.index}].thickness` });
  return { steps: [...(found?.steps ?? []), ...(found ? [step(sheet, formula`${found.rho} / ${d}`)] : [])], remarks, rests: ['carriers', 'bands'] };
}
