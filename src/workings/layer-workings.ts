import { CM_PER_NM } from '../../solver/units.ts';
import { differenceText } from '../result/figure-text.ts';
import { textbookError_meV } from '../result/ledger-layers.ts';
import type { LayerResult } from '../result/types.ts';
import { affinitySteps, gapSteps, type Worked } from './bands-steps.ts';
import { groundOf, neutralOf, shareSteps, type Neutral } from './carrier-steps.ts';
import { middleOf, type Context, type Point } from './context.ts';
import { formula } from './formula.ts';
import { DESIGN, known, WORKED, type Known } from './known.ts';
import { statesSteps } from './states-steps.ts';
import { step, type Step } from './step.ts';
import { textbookSteps } from './textbook-steps.ts';
import { debyeWorkings, mobilityWorkings, resistivityWorkings, sheetWorkings } from './transport-workings.ts';
import type { Found, Simpler } from './workings.ts';

const MEV_PER_EV = 1e3;
const EV_PER_MEV = 1e-3;

/** The workings of one figure of a layer; null for a column that this part does not know. */
export function layerWorkings(context: Context, index: number, column: string): Found | null {
  const row = context.result.layers[index];
  const point = middleOf(context, index);
  if (row.insulator && !['material', 'thickness', 'gap', 'affinity', 'regime', 'ecMinusEf', 'efMinusEv', 'ionised'].includes(column)) return { steps: [], remarks: [`${row.material} is taken as an insulator: it holds no free carriers, so there is no such figure.`], rests: ['bands'] };
  const neutral = (): Neutral => neutralOf(context, point);
  switch (column) {
    case 'material':
      return { steps: [], remarks: [row.x === null ? `The design names ${row.material}.` : `The design names ${row.material}; x is that at the middle of the layer.`], rests: [] };
    case 'thickness': {
      const d = known('d', `thickness of ${row.name}`, point.layer.thickness, 'nm', DESIGN, { scale: CM_PER_NM, path: `layers[${index}].thickness` });
      return { steps: [step(known('d', 'thickness', point.layer.thickness, 'nm', WORKED, { scale: CM_PER_NM }), formula`${d}`)], rests: [] };
    }
    case 'gap':
      return plain(gapSteps(context, point), ['bands']);
    case 'affinity':
      return plain(affinitySteps(context, point), ['bands']);
    case 'nc':
      return plain(statesSteps(context, point, 'n'), ['bands']);
    case 'nv':
      return plain(statesSteps(context, point, 'p'), ['bands']);
    case 'ni':
      return intrinsic(context, point);
    case 'regime':
      return regime(row, neutral());
    case 'ecMinusEf':
    case 'efMinusEv':
    case 'n':
    case 'p':
      return row.insulator ? midgap(context, point, column) : level(context, point, row, neutral(), column);
    case 'ionised':
      return ionised(context, point, neutral());
    case 'textbook':
      return textbook(context, point, row, neutral());
    case 'debye':
      return debyeWorkings(context, point, row, neutral());
    case 'mobility':
      return mobilityWorkings(context, point, row);
    case 'resistivity':
      return resistivityWorkings(context, point, row, neutral());
    case 'sheet':
      return sheetWorkings(context, point, row, neutral());
    default:
      return null;
  }
}


function plain(worked: Worked, rests: Found['rests']): Found {
  return { steps: worked.steps, rests };
}

function level(context: Context, point: Point, row: LayerResult, n: Neutral, column: 'ecMinusEf' | 'efMinusEv' | 'n' | 'p'): Found {
  const book = textbookSteps(context, point);
  const ground = groundOf(n);
  const simple = (steps: Step[], mine: number, its: number, unit: string, words: string): Simpler => ({
    words: 'Boltzmann statistics, every dopant ionised',
    steps,
    difference: unit === 'eV' ? `${differenceText(MEV_PER_EV * (its - mine), 3)} meV` : mine > 0 && its > 0 ? `factor ${Number((its / mine).toPrecision(3))}` : words,
  });
  if (column === 'ecMinusEf') return { steps: ground, simpler: simple(book.steps, row.ec_minus_ef_eV, book.level.value, 'eV', ''), rests: ['carriers', 'bands'] };
  if (column === 'efMinusEv') {
    const under = known('E_F−E_v', 'Fermi level above the valence band edge', point.bands.gap - point.ecMinusEf, 'eV', WORKED);
    const simpler = known('E_F−E_v', 'by the textbook', point.bands.gap - book.level.value, 'eV', WORKED);
    return { steps: [...ground, step(under, formula`${n.gap} - ${n.level}`)], simpler: simple([...book.steps, step(simpler, formula`${n.gap} - ${book.level}`)], under.value, simpler.value, 'eV', ''), rests: ['carriers', 'bands'] };
  }
  const [known_, last] = column === 'n' ? [n.n, n.nStep] : [n.p, n.pStep];
  const density = column === 'n' ? book.n : book.p;
  return { steps: [...ground.filter((s) => s !== last), last], simpler: simple(density.steps, known_.value, density.known.value, 'cm⁻³', 'both below the smallest number'), rests: ['carriers', 'bands'] };
}

/** An insulator carries nothing: no balance fixes its level, which is put at midgap to stand somewhere. */
function midgap(context: Context, point: Point, column: string): Found {
  const gap = gapSteps(context, point);
  const under = column === 'efMinusEv';
  const half = known(under ? 'E_F−E_v' : 'E_c−E_F', 'half the gap', point.ecMinusEf, 'eV', WORKED);
  return { steps: [...gap.steps, step(half, formula`${gap.known} / 2`)], remarks: ['An insulator holds no free carriers, so that nothing in it fixes a Fermi level by itself; the figure only says where midgap lies.'], rests: ['bands'] };
}

export function intrinsicSteps(context: Context, point: Point): Worked {
  const [gap, nc, nv] = [gapSteps(context, point), statesSteps(context, point, 'n'), statesSteps(context, point, 'p')];
  const { bands } = point;
  const ni = known('n_i', 'intrinsic density', Math.exp(0.5 * (Math.log(bands.nc) + Math.log(bands.nv) - bands.gap / bands.kT)), 'cm⁻³', WORKED);
  const kT = known('kT', 'thermal energy', bands.kT, 'eV', WORKED);
  return { known: ni, steps: [...gap.steps, ...nc.steps, ...nv.steps, step(ni, formula`exp((ln(${nc.known}) + ln(${nv.known}) - ${gap.known} / ${kT}) / 2)`, 'The root of Nc Nv exp(−Eg/kT), whatever the statistics.')] };
}

function intrinsic(context: Context, point: Point): Found {
  return { steps: intrinsicSteps(context, point).steps, rests: ['bands'] };
}

/** The words with the ratios that they were told by. */
function regime(row: LayerResult, n: Neutral): Found {
  if (row.insulator) return { steps: [], remarks: [`${row.material} is taken as an insulator.`], rests: [] };
  const net = known('|N|', 'net active doping', Math.abs(n.ionised.reduce((sum, l) => sum + (l.donor ? 1 : -1) * densityOf(l, row), 0)), 'cm⁻³', DESIGN);
  const toC = known('u_c', 'Ec − EF over kT', n.level.value / n.kT.value, '', WORKED);
  const toV = known('u_v', 'EF − Ev over kT', (n.gap.value - n.level.value) / n.kT.value, '', WORKED);
  const steps: Step[] = [...groundOf(n), step(toC, formula`${n.level} / ${n.kT}`, 'Below 3: degenerate.'), step(toV, formula`(${n.gap} - ${n.level}) / ${n.kT}`, 'Below 3: degenerate.')];
  const most = Math.max(n.n.value, n.p.value);
  if (most > 0) {
    const minority = known('r', 'minority over majority', Math.min(n.n.value, n.p.value) / most, '', WORKED);
    steps.push(step(minority, formula`min(${n.n}, ${n.p}) / max(${n.n}, ${n.p})`, 'Above 0.1: intrinsic.'));
  }
  if (net.value > 0) {
    const held = known('s', 'majority carriers over net doping', most / net.value, '', WORKED);
    steps.push(step(held, formula`max(${n.n}, ${n.p}) / ${net}`, 'Below 0.9: frozen out.'));
  }
  const remarks = ['The first that holds, in the order shown, names the regime; else it is extrinsic. The limits are common practice, without a source.'];
  if (row.fully_depleted) remarks.push('In the solved stack the charge falls nowhere in the layer below half of its dopants’: it is fully depleted.');
  return { steps, remarks, rests: ['carriers', 'bands'] };
}

function densityOf(l: Neutral['ionised'][number], row: LayerResult): number {
  return l.row < 0 ? l.known.value : row.ionised[l.row].concentration_cm3;
}

function ionised(context: Context, point: Point, n: Neutral): Found {
  const steps: Step[] = [];
  const remarks: string[] = [];
  if (point.layer.dopants.length === 0) return { steps, remarks: ['The layer is not doped.'], rests: [] };
  const shares: { density: Known; share: Known }[] = [];
  point.layer.dopants.forEach((d, row) => {
    const found = shareSteps(context, point, row, n);
    if (!found) return void remarks.push(`Of ${d.id ?? d.kind} there is nothing at the middle of the layer.`);
    steps.push(...found.neutral.steps, ...found.depleted.steps);
    const density = point.charge.levels.find((l) => l.row === row)!.density;
    shares.push({ density: known(`N_${row + 1}`, `active ${d.id ?? d.kind}`, density, 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants[${row}]` }), share: found.neutral.known });
  });
  const [first] = shares;
  if (first) {
    const sum = shares.reduce((total, { density }) => total + density.value, 0);
    const all = known('s', 'share of all active dopants that is ionised in the neutral layer', shares.reduce((total, { density, share }) => total + density.value * share.value, 0) / sum, '%', WORKED);
    const over = { kind: 'sum' as const, terms: shares.map(({ density, share }) => ({ sign: 1 as const, of: formula`${density} * ${share}` })) };
    const under = { kind: 'sum' as const, terms: shares.map(({ density }) => ({ sign: 1 as const, of: formula`${density}` })) };
    steps.push(step(all, formula`(${over}) / (${under})`));
  }
  return { steps: [...n.ground, n.balance, ...steps], remarks, rests: ['carriers', 'bands'] };
}

function textbook(context: Context, point: Point, row: LayerResult, n: Neutral): Found {
  const book = textbookSteps(context, point);
  const off = known('Δ', 'textbook less the figure in force', textbookError_meV(row) * EV_PER_MEV, 'meV', WORKED, { scale: EV_PER_MEV });
  return { steps: [...groundOf(n), ...book.steps, step(off, formula`${book.level} - ${n.level}`)], rests: ['carriers', 'bands'] };
}
