import { naturalValence } from '../../solver/alignment.ts';
import { isAlloy } from '../../solver/index.ts';
import { OFFSETS, type PublishedOffset } from '../design/catalogue.ts';
import { isPair } from '../design/offset.ts';
import { decimalText } from '../result/figure-text.ts';
import { entryValues } from '../parameters/entry-values.ts';
import { affinitySteps, composition, mixed, pureBands, type Worked } from './bands-steps.ts';
import type { Context, Point } from './context.ts';
import { formula } from './formula.ts';
import type { Sides } from './junction-workings.ts';
import { DESIGN, known, WORKED, type Known } from './known.ts';
import { narrowingSteps } from './narrowing-steps.ts';
import { originOf } from './published.ts';
import { step, type Step } from './step.ts';
import type { Rival } from './workings.ts';

export interface Offset {
  /** what the rule gives itself; the other follows from the gaps */ deltaEc: Known | null;
  deltaEv: Known | null;
  steps: Step[];
  remark: string;
}

const WORDS = { c: 'step of Ec, below less above', v: 'step of Ev, below less above' };

/** What fixes the offsets of an interface, with its source. */
export function offsetSteps(context: Context, index: number, sides: Sides): Offset {
  const row = context.result.junctions[index];
  const solved = context.stack.interfaces.find((i) => i.index === index);
  const result = (edge: 'c' | 'v'): Known => known(`ΔE_${edge}`, WORDS[edge], edge === 'c' ? row.delta_ec_eV : row.delta_ev_eV, 'eV', WORKED);
  if (row.alignment === 'own') {
    const at = context.design.interfaces?.findIndex((i) => i.above === context.design.layers[index].name) ?? -1;
    const edge = solved?.dEc !== undefined ? 'c' : 'v';
    const written = context.design.interfaces?.[at];
    // An interface that says nothing itself has the design's own offset of the pair.
    const pair = written?.dEc === undefined && written?.dEv === undefined ? context.design.custom?.offsets?.find((o) => isPair(o, sides.above.layer.material.id, sides.below.layer.material.id)) : undefined;
    const origin = pair ? originOf(entryValues(pair)[0].origin, true) : DESIGN;
    const own = known(`ΔE_${edge},own`, pair ? `own offset of ${pair.first} and ${pair.second}` : `offset given in the design`, (edge === 'c' ? solved?.dEc : solved?.dEv) ?? Number.NaN, 'eV', origin, { path: pair ? `custom.offsets ${pair.first}/${pair.second}` : `interfaces[${at}].dE${edge}` });
    const k = result(edge);
    return { deltaEc: edge === 'c' ? k : null, deltaEv: edge === 'v' ? k : null, steps: [step(k, formula`${own}`)], remark: 'An offset given in the design wins over every rule.' };
  }
  if (row.alignment === 'published') return published(sides, result);
  if (row.alignment === 'natural') return natural(context, sides, result('v'));
  const k = result('c');
  const [a, b] = [affinitySteps(context, sides.above), affinitySteps(context, sides.below)];
  const [above, below] = [{ ...a.known, sign: 'χ_above', words: `affinity of ${row.above}` }, { ...b.known, sign: 'χ_below', words: `affinity of ${row.below}` }];
  return {
    deltaEc: k, deltaEv: null, steps: [...a.steps, ...b.steps, step(k, formula`${above} - ${below}`)],
    remark: row.alignment === 'same' ? 'Both sides are one material: only narrowing can part their bands.' : 'The electron affinity rule (Anderson, Solid-State Electron. 5, 341, 1962): no published offset of the pair, nor natural valence edges on one scale, or the rule was asked for.',
  };
}

/** The published offset of a pair, and whether its second material lies below. */
function publishedRow(sides: Sides): { row: PublishedOffset; second: boolean } | null {
  const [a, b] = [sides.above.layer.material.id, sides.below.layer.material.id];
  const row = OFFSETS.find((o) => (o.first === a && o.second === b) || (o.first === b && o.second === a));
  return row ? { row, second: row.second === b } : null;
}

function published(sides: Sides, result: (edge: 'c' | 'v') => Known): Offset {
  const found = publishedRow(sides)!;
  const { row, second } = found;
  const edge = row.deltaEv !== undefined ? 'v' : 'c';
  const k = result(edge);
  const point = second ? sides.below : sides.above;
  const rows = entryValues(row);
  const value = (part: 'constant' | 'perX', at: number): Known | null => {
    const found_ = rows.find((r) => r.path === `deltaE${edge}.${part}`);
    if (!found_) return null;
    return known(part === 'constant' ? `ΔE_${edge},0` : `ΔE_${edge},x`, part === 'constant' ? `published offset ${row.first} to ${row.second}` : `published offset ${row.first} to ${row.second}, per x`, at, 'eV', originOf(found_.origin, false), { path: `offsets ${row.first}/${row.second} deltaE${edge}.${part}` });
  };
  const number = (text: string | undefined): number => Number.parseFloat(text ?? '0') * (text?.trim().endsWith('meV') ? 1e-3 : 1);
  const law = row[edge === 'v' ? 'deltaEv' : 'deltaEc']!;
  const constant = value('constant', number(law.constant));
  const perX = value('perX', number(law.perX));
  const x = composition(point);
  const sum = { kind: 'sum' as const, terms: [...(constant ? [{ sign: 1 as const, of: formula`${constant}` }] : []), ...(perX ? [{ sign: 1 as const, of: formula`${perX} * ${x}` }] : [])] };
  return {
    deltaEc: edge === 'c' ? k : null, deltaEv: edge === 'v' ? k : null,
    steps: [step(k, second ? sum : formula`-(${sum})`, second ? '' : `The published step is from ${row.first} to ${row.second}; here ${row.second} lies above.`)],
    remark: 'A published offset of this very pair.',
  };
}

/** Natural valence edge of one side, with the rise by narrowing. */
function edgeSteps(context: Context, point: Point, mark: string): Worked {
  const { material } = point.layer;
  const found = naturalValence(material, point.x)!;
  const bowing = isAlloy(material) ? { path: 'alloy.bowing.naturalValence', value: material.bowing.naturalValence } : null;
  const plain = mixed(context, point, known(`E_v,${mark}`, `natural valence edge of ${point.layer.name} on the scale of ${found.scale}`, found.edge, 'eV', WORKED), 'naturalValence.edge', 'natural valence edge', 'eV', (c) => c.naturalValence?.edge, bowing);
  const edge = { ...plain.known, sign: `E_v,${mark}` };
  if (!context.stack.assumptions.narrowing) return { known: edge, steps: plain.steps };
  const fall = narrowingSteps(context, point);
  const pure = pureBands(context, material, point.x);
  const raised = known(`E_v,${mark}^∗`, 'the same, raised by the valence share of the narrowing', found.edge + (pure.gap - point.bands.gap) - (point.bands.affinity - pure.affinity), 'eV', WORKED);
  return { known: raised, steps: [...plain.steps, ...fall.steps, step(raised, formula`${edge} + ${fall.total} - ${fall.conduction}`)] };
}

function natural(context: Context, sides: Sides, k: Known): Offset {
  const [a, b] = [edgeSteps(context, sides.above, 'above'), edgeSteps(context, sides.below, 'below')];
  return { deltaEc: null, deltaEv: k, steps: [...a.steps, ...b.steps, step(k, formula`${b.known} - ${a.known}`)], remark: 'Natural valence edges of both materials on one scale (Vurgaftman, Meyer and Ram-Mohan, J. Appl. Phys. 89, 5815, 2001).' };
}

/** What the rules that were not used would give for the step of Ec. */
export function offsetRivals(context: Context, index: number, { above, below }: Sides): Rival[] {
  const row = context.result.junctions[index];
  if (row.alignment === 'same') return [];
  const gaps = below.bands.gap - above.bands.gap;
  const rivals: Rival[] = [];
  const tell = (words: string, deltaEv: number, source: string): void => void rivals.push({ words, value: `ΔEc ${decimalText(deltaEv + gaps)} eV, ΔEv ${decimalText(deltaEv)} eV`, source });
  const found = publishedRow({ above, below });
  const interfaceRow = context.stack.interfaces.find((i) => i.index === index)?.published;
  if (row.alignment !== 'published' && found && interfaceRow) {
    const deltaEv = interfaceRow.dEv ?? (interfaceRow.dEc === undefined ? Number.NaN : interfaceRow.dEc - gaps);
    const origin = originOf(entryValues(found.row)[0].origin, false);
    tell('published offset of the pair', deltaEv, 'text' in origin ? origin.text : '');
  }
  const [a, b] = [naturalValence(above.layer.material, above.x), naturalValence(below.layer.material, below.x)];
  if (row.alignment !== 'natural' && a && b && a.scale === b.scale) tell('natural valence edges', b.edge - a.edge, `scale of ${a.scale}`);
  if (row.alignment !== 'affinity') tell('electron affinity rule', above.bands.affinity - below.bands.affinity - gaps, 'Anderson, Solid-State Electron. 5, 341 (1962)');
  return rivals;
}

