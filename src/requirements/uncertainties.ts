import { bandsAt, isAlloy, profileAt, type Boundary, type Dopant, type Interface, type Layer, type Profile, type Stack } from '../../solver/index.ts';
import { align } from '../../solver/alignment.ts';
import { barrierHeights } from '../../solver/barrier.ts';
import { isZero, type Tolerance } from '../design/tolerance.ts';
import type { Design, Variable } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { amountText, energyText, shareText } from './amount-text.ts';
import { governedBy, variablesUsed } from './governed.ts';

/**
 * One thing that is not known exactly, as a count from -1 to 1 of its tolerance. Either a variable, which moves before the design is read, or a
 * quantity of the stack.
 */
export interface Uncertainty {
  /** "Ncap", "cap Si", "cap thickness", "barrier", "offset below cap" */ label: string;
  /** moves with the variable of this name */ variable: string | null;
  /** the stack with the quantity moved; the same stack for a variable */ apply(stack: Stack, count: number): Stack;
  /** "-20 %", "+50 meV" */ words(count: number): string;
  /** the full tolerance, as text */ tolerance: string;
  origin: 'stated' | 'default';
  /** what a default tolerance moves and by how much, a share or eV, of the layer `at` (of a barrier 0 top, 1 bottom; of an offset the layer above); null of a variable */ default: { of: 'doping' | 'thickness' | 'barrier' | 'offset'; at: number; size: number } | null;
}

/**
 * Tolerances where a design states none. Orders from published practice: epitaxial doping is good to 10-30 % (suppliers' tables), implanted dose to
 * 1-5 % (Colaux et al., Analyst 2015; Stevie et al., SIMS XI 1998), layer thickness to 2-10 % (suppliers' tables), barriers scatter by tens of meV,
 * authors state 40-300 meV for offsets (Martin et al., Appl. Phys. Lett. 1994; Waldrop and Grant, Appl. Phys. Lett. 1996). The activated share of a
 * dopant has no default: it is known to factors at best.
 */
export const DEFAULT_TOLERANCES = { epitaxialDoping: 0.2, implantedDose: 0.05, thickness: 0.05, /** eV */ barrier: 0.05, /** eV */ offset: 0.1 } as const;

/** Which uncertainties count: all of them, those that the design states, or none. */
export type Tolerances = 'all' | 'stated' | 'none';

/**
 * Everything that is uncertain in a design. A quantity whose text uses a variable with a stated tolerance, directly or through other variables, moves with
 * that variable only. A stated tolerance of zero leaves the quantity where it is; a variable that nothing uses moves nothing.
 *
 * @param set  values of variables for this run, by name
 */
export function uncertaintiesOf(design: Design, set: Readonly<Record<string, string>>, which: Tolerances = 'all'): Uncertainty[] {
  if (which === 'none') return [];
  const { temperature: _, ...overrides } = set;
  const { tolerances } = readVariables(design.variables ?? [], overrides);
  const used = variablesUsed(design, set);
  const moving = (design.variables ?? []).filter(({ name }) => used.has(name) && moves(tolerances.get(name))).map(ofVariable);
  return which === 'stated' ? moving : [...moving, ...defaults(design, governedBy(design, set))];
}

function moves(tolerance: Tolerance | undefined): boolean {
  return tolerance !== undefined && !isZero(tolerance);
}

function ofVariable({ name, tolerance }: Variable): Uncertainty {
  return { label: name, variable: name, apply: (stack) => stack, words: (count) => amountText(tolerance as string, count), tolerance: tolerance as string, origin: 'stated', default: null };
}

function defaults(design: Design, governed: (...parts: unknown[]) => boolean): Uncertainty[] {
  const out: Uncertainty[] = [];
  const add = (label: string, of: NonNullable<Uncertainty['default']>['of'], at: number, size: number, words: (size: number) => string, apply: (stack: Stack, amount: number) => Stack): void => {
    out.push({ label, variable: null, apply: (stack, count) => (count === 0 ? stack : apply(stack, count * size)), words: (count) => words(count * size), tolerance: words(size).replace(/^\+/, ''), origin: 'default', default: { of, at, size } });
  };
  design.layers.forEach((layer, l) => {
    (layer.dopants ?? []).forEach((row, d) => {
      if (governed(row.concentration)) return;
      const implanted = typeof row.concentration === 'object' && 'peak' in row.concentration;
      const name = row.dopant ?? row.kind ?? 'dopant';
      const twice = (layer.dopants ?? []).filter((other) => (other.dopant ?? other.kind) === name).length > 1;
      add(`${layer.name} ${name}${twice ? ` (${d + 1})` : ''}`, 'doping', l, implanted ? DEFAULT_TOLERANCES.implantedDose : DEFAULT_TOLERANCES.epitaxialDoping, shareText, (stack, share) => withDopant(stack, l, d, 1 + share));
    });
    if (!governed(layer.thickness)) add(`${layer.name} thickness`, 'thickness', l, DEFAULT_TOLERANCES.thickness, shareText, (stack, share) => withLayer(stack, l, { thickness: stack.layers[l].thickness * (1 + share) }));
  });
  const ends = (['top', 'bottom'] as const).filter((side) => hasBarrier(design[side]) && !governed(heightText(design[side])));
  for (const side of ends) add(ends.length > 1 ? `${side} barrier` : 'barrier', 'barrier', side === 'top' ? 0 : 1, DEFAULT_TOLERANCES.barrier, energyText, (stack, amount) => withBarrier(stack, side, carrierOf(design, side), amount));
  design.layers.slice(0, -1).forEach((layer, l) => {
    const row = design.interfaces?.find((i) => i.above === layer.name);
    if (oneCrystal(design, l) || governed(row?.dEc, row?.dEv)) return;
    add(`offset below ${layer.name}`, 'offset', l, DEFAULT_TOLERANCES.offset, energyText, (stack, amount) => withOffset(stack, l, amount));
  });
  return out;
}

/** Both layers are one material of one composition as written: no offset to be uncertain of. */
function oneCrystal(design: Design, l: number): boolean {
  const [above, below] = [design.layers[l], design.layers[l + 1]];
  return above.material === below.material && JSON.stringify(above.x ?? null) === JSON.stringify(below.x ?? null) && typeof above.x !== 'object';
}

function hasBarrier(contact: Design['top']): boolean {
  return contact.kind === 'barrier' || contact.kind === 'pinned';
}

function heightText(contact: Design['top']): string | undefined {
  return contact.kind === 'pinned' ? contact.level : contact.kind === 'barrier' ? contact.barrier : undefined;
}

function carrierOf(design: Design, side: 'top' | 'bottom'): 'n' | 'p' {
  const contact = design[side];
  return contact.kind === 'barrier' ? (contact.carrier ?? 'n') : 'n';
}

function withLayer(stack: Stack, l: number, part: Partial<Layer>): Stack {
  return { ...stack, layers: stack.layers.map((layer, i) => (i === l ? { ...layer, ...part } : layer)) };
}

/** The whole profile of one dopant times a factor; of an implanted one its dose, the background stays. */
function withDopant(stack: Stack, l: number, d: number, factor: number): Stack {
  const dopants: Dopant[] = stack.layers[l].dopants.map((dopant, i) => (i === d ? { ...dopant, concentration: scaled(dopant.concentration, factor) } : dopant));
  return withLayer(stack, l, { dopants });
}

function scaled(profile: Profile, factor: number): Profile {
  switch (profile.kind) {
    case 'constant':
      return { kind: 'constant', value: profile.value * factor };
    case 'implant':
      return { ...profile, peak: profile.peak * factor };
    case 'points':
      return { ...profile, value: profile.value.map((v) => v * factor) };
    default:
      return { ...profile, from: profile.from * factor, to: profile.to * factor };
  }
}

/** The barrier for its own carrier raised by an amount, eV; a pinned surface has its level that much lower. */
function withBarrier(stack: Stack, side: 'top' | 'bottom', carrier: 'n' | 'p', amount: number): Stack {
  const boundary = stack[side];
  if (boundary.kind === 'pinned') return { ...stack, [side]: { ...boundary, level: boundary.level + amount } };
  if (boundary.kind !== 'barrier') return stack;
  const { source } = boundary;
  if (source.from !== 'workFunction') return { ...stack, [side]: { ...boundary, source: { ...source, height: source.height + amount } } };
  // Whatever pins it, the height that comes out is what is uncertain: it is taken at this temperature, then moved.
  const layer = stack.layers[side === 'top' ? 0 : stack.layers.length - 1];
  const z = side === 'top' ? 0 : layer.thickness;
  const heights = barrierHeights(source, layer.material, profileAt(layer.x, z, layer.thickness), bandsAt(layer, z, stack.temperature, stack.assumptions));
  const height = (carrier === 'n' ? heights.barrierN : heights.barrierP) + amount;
  const own: Boundary = { ...boundary, source: { from: 'given', carrier, height } };
  return { ...stack, [side]: own };
}

/**
 * The conduction band step raised by an amount, eV (the valence band step with it, the gaps are known better). Between two compositions of one alloy the
 * step cannot be further off than the gaps differ.
 */
function withOffset(stack: Stack, l: number, amount: number): Stack {
  const [above, below] = [stack.layers[l], stack.layers[l + 1]];
  let most = Infinity;
  if (isAlloy(above.material) && above.material.id === below.material.id) {
    const gapAbove = bandsAt(above, above.thickness, stack.temperature, stack.assumptions).gap;
    most = Math.abs(gapAbove - bandsAt(below, 0, stack.temperature, stack.assumptions).gap);
  }
  const { deltaEc, source } = align(stack).interfaces[l];
  if (source === 'same') return stack;
  const dEc = deltaEc + Math.sign(amount) * Math.min(Math.abs(amount), most);
  const own = stack.interfaces.find((row) => row.index === l) ?? { index: l, sheetCharge: 0 };
  const { dEv: _, ...rest } = own;
  const interfaces: Interface[] = [...stack.interfaces.filter((row) => row.index !== l), { ...rest, dEc }];
  return { ...stack, interfaces };
}
