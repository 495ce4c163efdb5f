import { closedFormResistivity } from '../../solver/closed-forms.ts';
import { BOLTZMANN } from '../../solver/constants.ts';
import { contactPath, type ContactPath } from '../../solver/contact-path.ts';
import { carrierConductance, isMissing } from '../../solver/contact-resistivity.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { closedFormRatio } from '../result/ledger-contacts.ts';
import type { ContactResult } from '../result/types.ts';
import { barrierSteps } from './barrier-steps.ts';
import { groundOf, neutralOf } from './carrier-steps.ts';
import { richardsonSteps, tunnellingSteps, type End } from './contact-workings.ts';
import { pointOf, type Context, type Point } from './context.ts';
import type { Expression } from './expression.ts';
import { formula } from './formula.ts';
import { conductionIntegral, poisson, wkb } from './governing.ts';
import { factor } from './junction-workings.ts';
import { boltzmann, known, SOLVED, thermal, WORKED, type Known } from './known.ts';
import { law, step, type Step } from './step.ts';
import type { Found, Simpler } from './workings.ts';

type Column = 'rhoC' | 'rhoCn' | 'rhoCp' | 'rhoCFloor' | 'rhoCClosed' | 'closedRatio';

const WAYS = {
  wkb: 'T(E) by WKB on the solved barrier, 1 above its top',
  kemble: 'T(E) by Kemble’s uniform form on the solved barrier, smooth over its top',
  exact: 'T(E) by the wave equation on the solved barrier',
};

/** Contact resistivity: its carriers one by one, their sum, its floor, the closed form of its regime and how far that is off. */
export function rhoWorkings(context: Context, end: End, column: Column): Found {
  const { row } = end;
  const figure = { rhoC: row.rho_c_ohm_cm2, rhoCn: row.rho_c_n_ohm_cm2, rhoCp: row.rho_c_p_ohm_cm2, rhoCFloor: row.rho_c_floor_ohm_cm2, rhoCClosed: row.rho_c_closed_form_ohm_cm2, closedRatio: closedFormRatio(row) }[column];
  if (row.kind !== 'barrier') return { steps: [], remarks: [`The ${row.side} end is no barrier: an ideal contact has no resistivity of its own, and a free surface conducts nothing.`], rests: [] };
  const rests: Found['rests'] = ['stack', 'carriers', 'bands', 'image force', 'transmission'];
  if (figure === null) return { steps: [], remarks: context.result.warnings.filter((w) => w.includes(row.side)).concat('There is no figure: a constant that counts is missing, no layer takes the carriers up, or it is beyond the largest number.'), rests };
  if (column === 'rhoCClosed') return closedFound(context, end);
  if (column === 'closedRatio') return ratioFound(context, end, figure);
  const path = contactPath(context.stack, context.profiles, spaceChargeOf(context.stack, context.profiles), row.side);
  if (!path) return { steps: [], remarks: ['No layer of the stack is neutral anywhere and takes the carriers up.'], rests };
  const side = row.side === 'top' ? 0 : context.stack.layers[path.reservoir].thickness;
  const point = pointOf(context, path.reservoir, side);
  if (column === 'rhoCFloor') return floor(context, path, point, figure);
  const [n, p] = [carrierSteps(context, end, path, point, 'electron', row.rho_c_n_ohm_cm2), carrierSteps(context, end, path, point, 'hole', row.rho_c_p_ohm_cm2)];
  const start = [...barrierSteps(context, end).steps, law(poisson(), 'Poisson’s equation over the whole stack gives the barrier that the carriers meet; the image force is added to it where it is on.'), ...(row.transmission === 'wkb' ? [law(wkb(), 'One band, κ from the tunnelling mass, between the turning points.')] : [])];
  const accuracy = row.rho_c_error === null ? '' : `The integrals over energy and depth are good to ${Number((100 * row.rho_c_error).toPrecision(2))} % by their own estimate.`;
  const common = { remarks: [`Zero bias; ${WAYS[row.transmission ?? 'wkb']}. The carriers of ${point.layer.name} take part; nothing passes below their band edge there.`], rests, solved: true, accuracy };
  if (column !== 'rhoC') {
    const one = column === 'rhoCn' ? n : p;
    return { ...common, steps: [...start, ...(one?.steps ?? [])] };
  }
  const rho = known('ρ_c', 'specific contact resistivity, both carriers in parallel', figure, 'Ω cm²', WORKED);
  const parts = [n, p].filter((part) => part !== null);
  const sum = { kind: 'sum' as const, terms: parts.map((part) => ({ sign: 1 as const, of: formula`1 / ${part.rho}` })) };
  return { ...common, steps: [...start, ...parts.flatMap((part) => part.steps), step(rho, formula`1 / (${sum})`)], simpler: closedForm(context, end) };
}

function carrierSteps(context: Context, end: End, path: ContactPath, point: Point, carrier: 'electron' | 'hole', figure: number | null): { rho: Known; steps: Step[] } | null {
  const A = richardsonSteps(context, point, carrier);
  if (figure === null || A === null) return null;
  const letter = carrier === 'electron' ? 'n' : 'p';
  const asked = conducted(context, end, path, carrier, figure);
  if (asked === null) return null;
  const value = Math.exp(asked) * (BOLTZMANN ** 2 / A.known.value);
  const rho = known(`ρ_${letter}`, `contact resistivity of ${carrier}s`, figure, 'Ω cm²', WORKED);
  const integral = known(`I_${letter}`, `∫ T f dE of ${carrier}s, summed over energy`, value, 'eV', SOLVED);
  return { rho, steps: [...A.steps, law(conductionIntegral(letter), 'Padovani and Stratton, Solid-State Electron. 9, 695 (1966); Chang, Fang and Sze, Solid-State Electron. 14, 541 (1971).'), step(rho, formula`${boltzmann} ^ 2 / (${A.known} * ${integral})`)] };
}

/** Off the figure by less than this, ln, it was worked out in the same way. */
const SAME = 1e-4;

/** ln of 1/rho of a carrier; a minority that hardly counts was taken by WKB whatever the way of the majority. */
function conducted(context: Context, { row }: End, path: ContactPath, carrier: 'electron' | 'hole', figure: number): number | null {
  const by = (transmission: NonNullable<ContactResult['transmission']>): number | null => {
    const found = carrierConductance(context.stack, path, carrier, { transmission });
    return isMissing(found) ? null : found.log;
  };
  const plain = by('wkb');
  if (row.transmission === null || row.transmission === 'wkb' || plain === null || Math.abs(plain + Math.log(figure)) < SAME) return plain;
  return by(row.transmission);
}

function floor(context: Context, path: ContactPath, point: Point, figure: number): Found {
  const carrier = path.electrons ? 'electron' : 'hole';
  const A = richardsonSteps(context, point, carrier);
  if (A === null) return { steps: [], remarks: ['No Richardson constant is known.'], rests: ['carriers', 'bands'] };
  const edge = known('E_edge', `band edge of the ${carrier}s of neutral ${point.layer.name} from EF`, path.electrons ? path.ecMinusEf : path.efMinusEv, 'eV', SOLVED);
  const kT = thermal(context.stack.temperature);
  const rho = known('ρ_floor', 'least contact resistivity', figure, 'Ω cm²', WORKED);
  const u = edge.value / kT.value;
  const filled: Expression = u > 20 ? formula`exp(-${edge} / ${kT})` : formula`ln1p(exp(-${edge} / ${kT}))`;
  return { steps: [...A.steps, step(rho, formula`${boltzmann} ^ 2 / (${A.known} * ${kT} * ${filled})`, `The same integral with T = 1 above the edge${u > 20 ? '; ln(1 + e) is e here' : ''}: every carrier that moves to the metal arrives.`)], rests: ['carriers', 'bands'] };
}

/** The closed form as a figure of its own; what it leaves out, the solved one has. */
function closedFound(context: Context, end: End): Found {
  const found = closedForm(context, end);
  const words = { thermionic: 'E00 lies below kT/2, or no barrier is left above EF: thermionic emission.', 'thermionic-field': 'Neither thermionic nor field emission rules: the peak between the two, a parabola in the exponent.', field: 'E00 is large against kT: field emission near EF, or near the edge of a cold layer.' }[end.row.closed_form!];
  return { steps: found?.steps ?? [], remarks: [words, 'Of the majority alone, in the depletion approximation, without the image force.'], rests: ['carriers', 'bands'] };
}

function ratioFound(context: Context, end: End, figure: number): Found {
  const solved = rhoWorkings(context, end, 'rhoC');
  const closed = closedForm(context, end);
  const last = solved.steps.at(-1);
  if (closed === null || last === undefined || last.kind !== 'formula') return { steps: [], remarks: ['There is no ratio.'], rests: [] };
  const { rho } = closed;
  const ratio = known('r', 'solved over closed form', figure, '', WORKED);
  const words = figure > 1 ? `The closed form promises ${factor(1, figure).replace('factor ', '')} of the solved resistivity: it is too good.` : 'The closed form promises more resistance than is solved: it is too cautious.';
  return { ...solved, steps: [...closed.steps, ...solved.steps, step(ratio, formula`${last.result} / ${rho}`)], remarks: [words, ...(solved.remarks ?? [])], simpler: null };
}

/** The closed form of the regime, as the solver chooses it. */
function closedForm(context: Context, end: End): (Simpler & { rho: Known }) | null {
  const { row, point, net, carrier } = end;
  const A = richardsonSteps(context, point, carrier);
  const e00 = tunnellingSteps(context, end);
  if (row.rho_c_closed_form_ohm_cm2 === null || row.closed_form === null || A === null || e00 === null) return null;
  const height = net > 0 ? row.barrier_n_eV! : row.barrier_p_eV!;
  const edgeValue = net > 0 ? point.ecMinusEf : point.bands.gap - point.ecMinusEf;
  const kT = thermal(context.stack.temperature);
  const neutral = neutralOf(context, point);
  const barriers = barrierSteps(context, end);
  const phi = net > 0 ? barriers.n : barriers.p;
  const edge = known('E_edge', 'band edge of the neutral layer from EF', edgeValue, 'eV', WORKED);
  const V = known('ψ', 'band bending', height - edgeValue, 'eV', WORKED);
  const rho = known('ρ_closed', `${row.closed_form} emission in closed form`, closedFormResistivity(height, edgeValue, e00.known.value, A.known.value, context.stack.temperature).rhoC, 'Ω cm²', WORKED);
  const lines: Step[] = [step(edge, net > 0 ? formula`${neutral.level}` : formula`${neutral.gap} - ${neutral.level}`), step(V, formula`${phi} - ${edge}`)];
  const last = { thermionic: () => thermionic(rho, A.known, kT, phi, edge), 'thermionic-field': () => [step(rho, formula`${boltzmann} ^ 2 / ${A.known} * cosh(${e00.known} / ${kT}) / (2 * sqrt(pi * ${e00.known} * ${V} * tanh(${e00.known} / ${kT}))) * exp(${V} * tanh(${e00.known} / ${kT}) / ${e00.known} + ${edge} / ${kT})`)], field: () => field(rho, A.known, kT, e00.known, edge, V) }[row.closed_form]();
  return { rho, words: `${row.closed_form} emission in closed form: depletion approximation, no image force (Padovani and Stratton 1966; Yu, Solid-State Electron. 13, 239, 1970)`, steps: [...groundOf(neutral), ...barriers.steps, ...A.steps, ...e00.steps, ...lines, ...last], difference: factor(rho.value, row.rho_c_ohm_cm2 ?? Number.NaN) };
}

function thermionic(rho: Known, A: Known, kT: Known, phi: Known, edge: Known): Step[] {
  const top = known('E_top', 'height that the carriers pass', Math.max(phi.value, edge.value), 'eV', WORKED);
  const filled: Expression = top.value / kT.value > 20 ? formula`exp(-${top} / ${kT})` : formula`ln1p(exp(-${top} / ${kT}))`;
  return [step(top, formula`max(${phi}, ${edge})`), step(rho, formula`${boltzmann} ^ 2 / (${A} * ${kT} * ${filled})`)];
}

function field(rho: Known, A: Known, kT: Known, e00: Known, edge: Known, V: Known): Step[] {
  const isDegenerate = edge.value < 0;
  const z = known('u', isDegenerate ? 'height of EF in the barrier, share of the bending' : 'height kT in the barrier, share of the bending', (isDegenerate ? -edge.value : kT.value) / V.value, '', WORKED);
  const s = Math.sqrt(1 - z.value);
  const c1 = known('c_1', 'slope of the exponent there', Math.atanh(s) / e00.value, 'eV⁻¹', WORKED);
  const b = known('b', 'exponent there', (V.value / e00.value) * (s - z.value * Math.atanh(s)), '', WORKED);
  return [
    step(z, isDegenerate ? formula`-${edge} / ${V}` : formula`${kT} / ${V}`),
    step(c1, formula`artanh(sqrt(1 - ${z})) / ${e00}`),
    step(b, formula`${V} / ${e00} * (sqrt(1 - ${z}) - ${z} * artanh(sqrt(1 - ${z})))`),
    step(rho, isDegenerate
      ? formula`${boltzmann} ^ 2 / ${A} * exp(${b}) / (pi * ${kT} / sin(pi * ${c1} * ${kT}) - exp(${c1} * ${edge}) / ${c1})`
      : formula`${boltzmann} ^ 2 / ${A} * exp(${b}) * (1 - ${c1} * ${kT}) / ${kT} * exp(${c1} * ${kT} + ${edge} / ${kT})`),
  ];
}
