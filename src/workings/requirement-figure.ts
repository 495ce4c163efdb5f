import { profileAt } from '../../solver/profile.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import type { Design } from '../design/types.ts';
import { figureOf } from '../requirements/quantities.ts';
import type { RequirementResult } from '../result/types.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { asksOf, neutralOf, shareSteps } from './carrier-steps.ts';
import { contactWorkings } from './contact-workings.ts';
import { middleOf, type Context } from './context.ts';
import type { Expression } from './expression.ts';
import { formula } from './formula.ts';
import { junctionWorkings } from './junction-workings.ts';
import { DESIGN, known, SOLVED, thermal, WORKED, type Known } from './known.ts';
import { layerWorkings } from './layer-workings.ts';
import { lastResult, step } from './step.ts';
import type { Found } from './workings.ts';

type Target = ReadRequirement['target'];

/** Quantities that a column of the ledger gives as they are, but for their unit. */
const OF_LEDGER: Partial<Record<RequirementQuantityName, ['layers' | 'junctions' | 'contacts', string]>> = {
  contactResistivity: ['contacts', 'rhoC'], leakage: ['contacts', 'saturation'], barrierN: ['contacts', 'barrierN'], barrierP: ['contacts', 'barrierP'],
  sheetResistance: ['layers', 'sheet'], resistivity: ['layers', 'resistivity'], electronDensity: ['layers', 'n'], holeDensity: ['layers', 'p'], ecMinusEf: ['layers', 'ecMinusEf'], efMinusEv: ['layers', 'efMinusEv'],
  depletionAbove: ['junctions', 'depletionAbove'], depletionBelow: ['junctions', 'depletionBelow'], peakField: ['junctions', 'peakField'], capacitance: ['junctions', 'capacitance'], conductionOffset: ['junctions', 'deltaEc'], valenceOffset: ['junctions', 'deltaEv'],
};
const LEDGER = { layers: layerWorkings, junctions: junctionWorkings, contacts: contactWorkings };

/** What a requirement is about, by its place in the stack. */
export function targetOf(design: Design, { quantity, of }: Pick<RequirementResult, 'quantity' | 'of'>): Target {
  const { of: kinds } = requirementQuantity(quantity as RequirementQuantityName);
  if (of === 'top' || of === 'bottom') return { kind: 'contact', index: of === 'top' ? 0 : 1 };
  return { kind: kinds.includes('layer') ? 'layer' : 'junction', index: design.layers.findIndex(({ name }) => name === of) };
}

/**
 * How the figure of a requirement comes about in one solved stack: the ledger's own workings, and what the requirement makes of them. The last line is the figure in the requirement's unit.
 *
 * @returns null where the result has no such figure
 */
export function requirementFigure(context: Context, row: Pick<RequirementResult, 'quantity' | 'of' | 'unit'>): { found: Found; figure: Known } | null {
  const name = row.quantity as RequirementQuantityName;
  const target = targetOf(context.design, row);
  const value = figureOf({ quantity: name, target } as ReadRequirement, { result: context.result, stack: context.stack });
  if (value === null || !Number.isFinite(value)) return null;
  const quantity = requirementQuantity(name);
  const unit = quantity.kind === 'flag' ? quantity.marginUnit : row.unit;
  const scale = unit === 'nm' ? CM_PER_NM : 1;
  const figure = known('x', `${quantity.words} of ${row.of}`, value * scale, unit, WORKED, { scale });
  const parts = partsOf(context, name, target);
  if (parts === null) return null;
  // Where the ledger's own last line is the figure in the very unit, nothing is left to say.
  const last = lastResult(parts.found);
  if (last !== null && parts.figure.kind === 'known' && parts.figure.of === last && last.scale === scale) return { figure: last, found: { ...parts.found, simpler: null } };
  return { figure, found: { ...parts.found, steps: [...parts.found.steps, step(figure, parts.figure, parts.note ?? '')], simpler: null } };
}

interface Parts {
  found: Found;
  figure: Expression;
  note?: string;
}

function partsOf(context: Context, name: RequirementQuantityName, target: Target): Parts | null {
  const { index } = target;
  const column = OF_LEDGER[name];
  if (column !== undefined) return single(ledger(context, column[0], target, column[1]));
  switch (name) {
    case 'barrier':
      return single(ledger(context, 'contacts', target, holesUnder(context, index) ? 'barrierP' : 'barrierN'));
    case 'bandBending':
      return bending(context, target);
    case 'surfaceField':
      return mapped(ledger(context, 'contacts', target, 'surfaceField'), (k) => formula`abs(${k})`);
    case 'builtIn':
      return mapped(ledger(context, 'junctions', target, 'builtin'), (k) => formula`abs(${k})`);
    case 'carrierDensity':
      return both(ledger(context, 'layers', target, 'n'), ledger(context, 'layers', target, 'p'), (n, p) => formula`max(${n}, ${p})`);
    case 'depletionWidth':
      if (target.kind === 'contact') return single(ledger(context, 'contacts', target, 'depletion'));
      return both(ledger(context, 'junctions', target, 'depletionAbove'), ledger(context, 'junctions', target, 'depletionBelow'), (a, b) => formula`${a} + ${b}`);
    case 'degenerate': {
      const kT = thermal(context.stack.temperature);
      return both(ledger(context, 'layers', target, 'ecMinusEf'), ledger(context, 'layers', target, 'efMinusEv'), (c, v) => formula`3 - min(${c}, ${v}) / ${kT}`, 'Within 3 kT of a band a layer counts as degenerate (common practice, no source); above zero it does.');
    }
    case 'ionisedShare':
      return ionised(context, index);
    case 'solubility':
      return solubility(context, index);
    case 'depletedShare':
    case 'fullyDepleted':
      return depleted(context, index, name);
    default:
      return null;
  }
}

function ledger(context: Context, table: keyof typeof LEDGER, { index }: Target, column: string): Found | null {
  const at = table === 'contacts' ? context.result.contacts.findIndex(({ side }) => side === (index === 0 ? 'top' : 'bottom')) : index;
  return LEDGER[table](context, at, column);
}

const single = (found: Found | null): Parts | null => mapped(found, (k) => formula`${k}`);

function mapped(found: Found | null, of: (k: Known) => Expression, note = ''): Parts | null {
  const last = found && lastResult(found);
  return last === null ? null : { found: found!, figure: of(last), note };
}

/** Two figures of which one may be missing: then the other stands alone. */
function both(a: Found | null, b: Found | null, of: (a: Known, b: Known) => Expression, note = ''): Parts | null {
  const [x, y] = [a && lastResult(a), b && lastResult(b)];
  if (!x || !y) return x ? single(a) : single(b);
  return { found: { ...a!, steps: [...a!.steps, ...b!.steps], remarks: [...(a!.remarks ?? []), ...(b!.remarks ?? [])] }, figure: of(x, y), note };
}

function holesUnder({ result }: Context, index: number): boolean {
  const row = index === 0 ? result.layers[0] : result.layers[result.layers.length - 1];
  return row.p_cm3 > row.n_cm3;
}

function bending(context: Context, target: Target): Parts | null {
  const { ec_eV } = context.result.profile;
  const layer = target.index === 0 ? 0 : context.result.layers.length - 1;
  const surface = known('E_c,s', 'solved band edge at the contact, from EF', ec_eV[target.index === 0 ? 0 : ec_eV.length - 1], 'eV', SOLVED, { path: 'profile.ec_eV' });
  const parts = mapped(layerWorkings(context, layer, 'ecMinusEf'), (k) => formula`${surface} - ${k}`);
  return parts && { ...parts, found: { ...parts.found, solved: true, rests: ['stack', ...parts.found.rests] } };
}

function ionised(context: Context, index: number): Parts | null {
  const point = middleOf(context, index);
  const neutral = neutralOf(context, point);
  const shares = point.layer.dopants.flatMap((_, row) => shareSteps(context, point, row, neutral) ?? []);
  if (shares.length === 0) return null;
  const of = shares.map(({ neutral: { known: k } }) => formula`${k} / 100`);
  return { found: { steps: [...neutral.ground, neutral.balance, ...shares.flatMap((s) => s.neutral.steps)], rests: ['carriers', 'bands'] }, figure: of.length === 1 ? of[0] : { kind: 'call', law: 'min', of }, note: of.length === 1 ? '' : 'The dopant of which the least is ionised.' };
}

/** Points at which a graded profile is looked at, as the requirement does. */
const LOOKS = 64;

function solubility(context: Context, index: number): Parts | null {
  const point = middleOf(context, index);
  const { layer } = point;
  const terms = layer.dopants.flatMap((d, row) => {
    if (d.solubility === undefined) return [];
    let peak = 0;
    for (let k = 0; k <= LOOKS; k++) peak = Math.max(peak, profileAt(d.concentration, (layer.thickness * k) / LOOKS, layer.thickness));
    const tag = layer.dopants.length > 1 ? `,${row + 1}` : '';
    const N = known(`N_peak${tag}`, `largest ${d.id ?? d.kind} in ${layer.name}`, peak, 'cm⁻³', DESIGN, { path: `layers[${index}].dopants[${row}].concentration` });
    const a = known(`a${tag === '' ? '' : `_${row + 1}`}`, 'activated share', d.activation, '', DESIGN, { path: `layers[${index}].dopants[${row}].activation` });
    return [formula`${N} * ${a} / ${asksOf(context, point, row)('solubility', `N_max${tag}`, 'highest active concentration published', d.solubility, 'cm⁻³')}`];
  });
  if (terms.length === 0) return null;
  return { found: { steps: [], rests: [] }, figure: terms.length === 1 ? terms[0] : { kind: 'call', law: 'max', of: terms }, note: 'Dopants without a published limit do not count.' };
}

function depleted(context: Context, index: number, name: 'depletedShare' | 'fullyDepleted'): Parts | null {
  const { result } = context;
  const row = result.layers[index];
  const isShare = name === 'depletedShare';
  const remarks = isShare ? [] : ['A layer that is depleted throughout counts as just past the mark, whatever its thickness.'];
  if (row.fully_depleted) {
    const one = known('w', 'depleted share of the thickness: nothing neutral is left', 1, '', SOLVED);
    return { found: { steps: [], remarks, rests: ['stack'], solved: true }, figure: isShare ? formula`${one}` : formula`${one} - 1 + ${tiny}` };
  }
  const above = index === 0 ? ledger(context, 'contacts', { kind: 'contact', index: 0 }, 'depletion') : junctionWorkings(context, index - 1, 'depletionBelow');
  const below = index === result.layers.length - 1 ? ledger(context, 'contacts', { kind: 'contact', index: 1 }, 'depletion') : junctionWorkings(context, index, 'depletionAbove');
  const d = known('d', `thickness of ${row.name}`, context.stack.layers[index].thickness, 'nm', DESIGN, { scale: CM_PER_NM, path: `layers[${index}].thickness` });
  // The two widths bear one sign each in the ledger: here they stand in one formula.
  const width = (found: Found | null, mark: string): Known | null => {
    const last = found && lastResult(found);
    return last === null ? null : { ...last, sign: `W_${mark}` };
  };
  const [a, b] = [width(above, 'upper'), width(below, 'lower')];
  if (!a && !b) {
    const none = known('w', 'depleted share of the thickness: without dopants nothing is depleted', 0, '', SOLVED);
    return isShare ? null : { found: { steps: [], remarks, rests: ['stack'], solved: true }, figure: formula`${none} - 1 - ${tiny}` };
  }
  const sum = a && b ? formula`(${a} + ${b}) / ${d}` : formula`${(a ?? b)!} / ${d}`;
  const found: Found = { steps: [...(above?.steps ?? []), ...(below?.steps ?? [])], remarks, rests: ['stack', 'carriers', 'bands'], solved: true };
  return { found, figure: isShare ? formula`min(1, ${sum})` : formula`min(0, ${sum} - 1) - ${tiny}`, note: isShare ? '' : 'Below zero some of the layer is neutral.' };
}

/** What tells a layer that is just depleted from one that just is not: the smallest step beside 1. */
const tiny = known('δ', 'smallest step beside 1 that a number of the program holds', Number.EPSILON, '', WORKED);

