import { richardson, tunnellingMass } from '../../solver/carrier-constants.ts';
import { netDoping } from '../../solver/charge.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { differenceText } from '../result/figure-text.ts';
import type { ContactResult } from '../result/types.ts';
import { mixed, permittivitySteps, type Worked } from './bands-steps.ts';
import { barrierRivals, barrierSteps } from './barrier-steps.ts';
import { neutralOf } from './carrier-steps.ts';
import { rhoWorkings } from './contact-resistivity-workings.ts';
import { pointOf, type Context, type Point } from './context.ts';
import { formula } from './formula.ts';
import { poisson } from './governing.ts';
import { factor } from './junction-workings.ts';
import { charge, DESIGN, electronMass, known, planck, SOLVED, temperatureOf, thermal, vacuumPermittivity, WORKED, type Known } from './known.ts';
import { law, step, type Step } from './step.ts';
import type { Found, Simpler } from './workings.ts';

const MEV_PER_EV = 1e3;
const EV_PER_MEV = 1e-3;
const V_PER_KV = 1e3;

export interface End {
  row: ContactResult;
  point: Point;
  /** majority at the metal, by the doping */ carrier: 'electron' | 'hole';
  /** +donors less acceptors, cm^-3 */ net: number;
}

function endOf(context: Context, index: number): End {
  const row = context.result.contacts[index];
  const l = row.side === 'top' ? 0 : context.stack.layers.length - 1;
  const point = pointOf(context, l, row.side === 'top' ? 0 : context.stack.layers[l].thickness);
  const net = netDoping(point.charge);
  return { row, point, net, carrier: net >= 0 ? 'electron' : 'hole' };
}

/** The workings of one figure of a contact; null for a column that this part does not know. */
export function contactWorkings(context: Context, index: number, column: string): Found | null {
  const end = endOf(context, index);
  const { row } = end;
  switch (column) {
    case 'kind':
      return { steps: [], remarks: [`The design makes the ${row.side} end ${{ neutral: 'an ideal ohmic contact: local neutrality holds at it', barrier: 'a metal with a barrier', pinned: 'a surface with EF pinned below Ec', open: 'open: no field outside' }[row.kind]}.`], rests: [] };
    case 'source':
      return source(context, end);
    case 'barrierN':
    case 'barrierP':
      return barrier(context, end, column);
    case 'lowering':
      return lowering(context, end);
    case 'surfaceField':
      return surfaceField(context, end);
    case 'depletion':
      return depletion(context, end);
    case 'e00':
      return e00(context, end);
    case 'transport':
      return transport(context, end);
    case 'saturation':
      return saturation(context, end);
    case 'rhoC':
    case 'rhoCn':
    case 'rhoCp':
    case 'rhoCFloor':
    case 'rhoCClosed':
    case 'closedRatio':
      return rhoWorkings(context, end, column);
    default:
      return null;
  }
}

const noBarrier = (row: ContactResult): Found => ({ steps: [], remarks: [`The ${row.side} end is ${row.kind}: no metal stands on it with a barrier, so there is no such figure.`], rests: [] });

function source(context: Context, end: End): Found {
  if (end.row.barrier_source === null) return noBarrier(end.row);
  const words = { given: 'The design gives the height outright, which wins.', measured: 'A barrier was measured on this pair, which wins over the work function.', pinned: 'No barrier of this pair is known: the work function, drawn to the charge neutrality level by the slope S.', ideal: 'No barrier of this pair is known, nor any pinning: the work function less the affinity (Schottky–Mott).' }[end.row.barrier_source];
  return { steps: barrierSteps(context, end).steps, remarks: [words], rivals: barrierRivals(context, end), rests: ['bands'] };
}

function barrier(context: Context, end: End, column: 'barrierN' | 'barrierP'): Found {
  const { row } = end;
  const mine = column === 'barrierN' ? row.barrier_n_eV : row.barrier_p_eV;
  if (mine === null) return noBarrier(row);
  const found = barrierSteps(context, end);
  const wanted = column === 'barrierN' ? found.n : found.p;
  const last = found.steps.find((s) => s.kind !== 'law' && s.result === wanted)!;
  let simpler: Simpler | null = null;
  if (found.ideal && row.barrier_source !== 'ideal') {
    const k = column === 'barrierN' ? found.ideal.n : found.ideal.p;
    simpler = { words: 'Schottky–Mott: work function less affinity', steps: [...found.ideal.steps, ...(column === 'barrierN' ? [] : [found.ideal.pStep])], difference: `${differenceText(MEV_PER_EV * (k.value - mine), 3)} meV` };
  }
  return { steps: [...found.steps.filter((s) => s !== last), last], remarks: ['Without the image-force lowering.'], simpler, rivals: barrierRivals(context, end), rests: ['bands'] };
}

/** Permittivity that the image force sees. */
function opticalSteps(context: Context, point: Point): Worked {
  const bowing = 'first' in point.layer.material ? { path: 'alloy.bowing.permittivity', value: point.layer.material.bowing.permittivity } : null;
  return mixed(context, point, known('ε_hf', 'high-frequency permittivity, relative', point.bands.permittivityHighFrequency, '', WORKED), 'permittivityHighFrequency', 'high-frequency permittivity, relative,', '', (c) => c.permittivityHighFrequency, bowing);
}

function lowering(context: Context, end: End): Found {
  const { row, point } = end;
  if (row.lowering_eV === null) return row.kind === 'barrier' ? { steps: [], remarks: ['The design leaves the image force out at this contact.'], rests: [] } : noBarrier(row);
  const k = known('Δφ', 'image-force lowering', row.lowering_eV, 'eV', WORKED);
  if (row.lowering_eV === 0) return { steps: [step(k, formula`0`)], remarks: ['The field does not deplete the majority here: an accumulated surface has no barrier top inside the semiconductor that could be lowered.'], rests: ['stack', 'image force'], solved: true };
  const eps = opticalSteps(context, point);
  return {
    steps: [law(poisson(), GOVERNING), ...eps.steps, step(k, formula`sqrt(${charge} * abs(${fieldOf(row)}) / (4 * pi * ${eps.known} * ${vacuumPermittivity}))`, 'Sze and Ng, Physics of Semiconductor Devices (2007), section 3.2.4.')],
    remarks: ['A closed form for the solved field. The contact resistivity does not subtract it: there the image force enters the barrier itself.'],
    rests: ['stack', 'image force', 'carriers', 'bands'], solved: true,
  };
}

const GOVERNING = 'Poisson’s equation with the carriers and ionised dopants of every depth, solved over the whole stack at one Fermi level.';

const fieldOf = (row: ContactResult): Known => known('E_0', 'solved field just inside the semiconductor', row.surface_field_V_cm, 'kV/cm', SOLVED, { scale: V_PER_KV, path: 'profile.field_V_cm' });

/** Depletion approximation under a barrier: the bending that is left to the charge of the dopants. */
function approximation(context: Context, end: End): { steps: Step[]; width: Known; field: Known } | null {
  const { row, point, net } = end;
  const height = net >= 0 ? row.barrier_n_eV : row.barrier_p_eV;
  if (row.kind !== 'barrier' && row.kind !== 'pinned') return null;
  if (height === null || net === 0 || point.bands.insulator) return null;
  const neutral = neutralOf(context, point);
  const edge = net > 0 ? point.ecMinusEf : point.bands.gap - point.ecMinusEf;
  const bending = height - edge;
  if (!(bending > 0)) return null;
  const eps = permittivitySteps(context, point);
  const N = known('N', `net active doping of ${point.layer.name} at the surface`, Math.abs(net), 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` });
  const phi = known(net > 0 ? 'φ_Bn' : 'φ_Bp', 'barrier', height, 'eV', WORKED);
  const V = known('V_s', 'band bending under the contact', bending, 'V', WORKED);
  const permittivity = eps.known.value * vacuumPermittivity.value;
  const width = known('W', 'depletion width by the depletion approximation', Math.sqrt((2 * permittivity * bending) / (charge.value * N.value)), 'nm', WORKED, { scale: CM_PER_NM });
  const field = known('E_0,approx', 'surface field by the depletion approximation', Math.sqrt((2 * charge.value * N.value * bending) / permittivity), 'kV/cm', WORKED, { scale: V_PER_KV });
  return {
    width, field,
    steps: [...eps.steps, step(V, net > 0 ? formula`${phi} - ${neutral.level}` : formula`${phi} - (${neutral.gap} - ${neutral.level})`), step(width, formula`sqrt(2 * ${eps.known} * ${vacuumPermittivity} * ${V} / (${charge} * ${N}))`), step(field, formula`sqrt(2 * ${charge} * ${N} * ${V} / (${eps.known} * ${vacuumPermittivity}))`)],
  };
}

/** Boundary that the stack was solved with at this end. */
function boundaryWords({ row, point }: End): string {
  const of = point.layer.name;
  if (row.kind === 'neutral') return `At this end ${of} is neutral: Ec − EF is that of charge neutrality there.`;
  if (row.kind === 'open') return 'At this end there is no field outside: the field inside is that of the surface’s own sheet charge.';
  return `At this end Ec − EF is held at φBn = ${Number((row.barrier_n_eV ?? 0).toPrecision(6))} eV.`;
}

function surfaceField(context: Context, end: End): Found {
  const { row } = end;
  const node = row.side === 'top' ? 0 : context.profiles.field.length - 1;
  const read = known('(dψ/dz)_0', `slope of the solved potential at the ${row.side} end`, -context.profiles.field[node], 'kV/cm', SOLVED, { scale: V_PER_KV, path: 'profile.field_V_cm' });
  const k = known('E_0', 'field just inside the semiconductor', row.surface_field_V_cm, 'kV/cm', SOLVED, { scale: V_PER_KV });
  const a = approximation(context, end);
  return {
    steps: [law(poisson(), GOVERNING), step(k, formula`-${read}`)], remarks: [boundaryWords(end)],
    simpler: a && { words: 'depletion approximation (size)', steps: a.steps, difference: factor(a.field.value, Math.abs(row.surface_field_V_cm)) },
    rests: ['stack', 'carriers', 'bands'], solved: true,
  };
}

function depletion(context: Context, end: End): Found {
  const { row, point } = end;
  if (row.depletion_nm === null) return { steps: [], remarks: ['Without doping there is no dopant charge for the solved charge to be compared with.'], rests: [] };
  const total = context.profiles.z[context.profiles.z.length - 1];
  const z0 = known('z_0', `depth of the ${row.side} end`, row.side === 'top' ? 0 : total, 'nm', SOLVED, { scale: CM_PER_NM, path: 'profile.z_nm' });
  const ze = known('z_e', 'depth where the net charge falls to half of the dopants’', row.side === 'top' ? row.depletion_nm * CM_PER_NM : total - row.depletion_nm * CM_PER_NM, 'nm', SOLVED, { scale: CM_PER_NM, path: 'profile.charge_cm3' });
  const width = known('W', 'depletion width', row.depletion_nm * CM_PER_NM, 'nm', SOLVED, { scale: CM_PER_NM });
  const a = approximation(context, end);
  return {
    steps: [law(poisson(), GOVERNING), step(width, formula`abs(${ze} - ${z0})`)],
    remarks: [boundaryWords(end), ...(row.depletion_nm === 0 ? [`${point.layer.name} is neutral or accumulated here: nothing is depleted.`] : [])],
    simpler: a && { words: 'depletion approximation', steps: a.steps.slice(0, -1), difference: factor(a.width.value, width.value) },
    rests: ['stack', 'carriers', 'bands'], solved: true,
  };
}

export function tunnellingSteps(context: Context, end: End): Worked | null {
  const { row, point, net, carrier } = end;
  if (row.e00_meV === null) return null;
  const eps = permittivitySteps(context, point);
  const mass = mixed(context, point, known('m_t', `tunnelling mass of ${carrier}s`, tunnellingMass(point.layer.material, point.x, carrier) ?? Number.NaN, 'm₀', WORKED), `tunnellingMass.${carrier}`, `${carrier} tunnelling mass`, 'm₀', (c) => c.tunnellingMass?.[carrier]);
  const N = known('N', `net active doping at the metal, all of it charged there`, Math.abs(net) * 1e6, 'cm⁻³', DESIGN, { scale: 1e6, path: `layers[${point.index}].dopants` });
  const eps0 = { ...vacuumPermittivity, value: vacuumPermittivity.value * 100, scale: 100 };
  const k = known('E_00', 'characteristic energy of tunnelling', row.e00_meV * EV_PER_MEV, 'meV', WORKED, { scale: EV_PER_MEV });
  return { known: k, steps: [...eps.steps, ...mass.steps, step(k, formula`${planck} / (4 * pi) * sqrt(${N} / (${mass.known} * ${electronMass} * ${eps.known} * ${eps0}))`, 'Padovani and Stratton, Solid-State Electron. 9, 695 (1966). Worked out in SI; over q it is an energy in eV.')] };
}

function e00(context: Context, end: End): Found {
  const found = tunnellingSteps(context, end);
  if (!found) return end.row.kind === 'barrier' ? { steps: [], remarks: ['There is no figure: the layer is not doped at the metal, or no tunnelling mass of it is known.'], rests: [] } : noBarrier(end.row);
  return { steps: found.steps, rests: ['bands'] };
}

function transport(context: Context, end: End): Found {
  const found = tunnellingSteps(context, end);
  if (!found) return e00(context, end);
  const kT = thermal(context.stack.temperature);
  const ratio = known('E_00/kT', 'tunnelling against thermal energy', found.known.value / kT.value, '', WORKED);
  return { steps: [...found.steps, step(ratio, formula`${found.known} / ${kT}`, 'Below 0.5 thermionic, to 5 thermionic-field, above that field emission (common practice, no source).')], rests: ['bands'] };
}

export function richardsonSteps(context: Context, point: Point, carrier: 'electron' | 'hole'): Worked | null {
  const value = richardson(point.layer.material, point.x, carrier);
  if (value === undefined) return null;
  return mixed(context, point, known('A', `Richardson constant of ${carrier}s`, value, 'A/(cm² K²)', WORKED), `richardson.${carrier}`, `${carrier} Richardson constant`, 'A/(cm² K²)', (c) => c.richardson?.[carrier]);
}

function saturation(context: Context, end: End): Found {
  const { row, point, net, carrier } = end;
  if (row.saturation_A_cm2 === null) return row.kind === 'barrier' ? { steps: [], remarks: ['There is no figure: no barrier is left after the lowering, the layer is not doped there, or no Richardson constant of it is known.'], rests: [] } : noBarrier(row);
  const A = richardsonSteps(context, point, carrier)!;
  const found = barrierSteps(context, end);
  const phi = net > 0 ? found.n : found.p;
  const kT = thermal(context.stack.temperature);
  const T = temperatureOf(context.stack.temperature);
  const fall = known('Δφ', 'image-force lowering', row.lowering_eV ?? 0, 'eV', SOLVED);
  const J = known('J_0', 'saturation current density', row.saturation_A_cm2, 'A/cm²', WORKED);
  return { steps: [...found.steps, ...A.steps, step(J, formula`${A.known} * ${T} ^ 2 * exp(-(${phi} - ${fall}) / ${kT})`, 'Thermionic emission, e.g. Sze and Ng, Physics of Semiconductor Devices (2007), section 3.3.1.')], remarks: ['Thermionic emission alone: tunnelling would add to it.'], rests: ['bands', 'image force', 'stack'], solved: true };
}

