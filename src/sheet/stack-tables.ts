import type { Dopant, Profile, Stack } from '../../solver/index.ts';
import { toStack } from '../design/stack.ts';
import type { Design, DopantRow, LayerInput } from '../design/types.ts';
import { writeNumber, writeQuantity } from '../quantity/write-quantity.ts';
import { percentText } from '../result/figure-text.ts';
import { regimeWords } from '../result/ledger-layers.ts';
import type { Result } from '../result/types.ts';
import { layerSpreads, spreadText, type Spread } from './layer-tolerances.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { inParts, type Cell, type SheetTable } from './table.ts';

const words = (text: string): Cell => [{ text }];
const EMPTY: Cell = [];

/** Dopants of one row; a layer with more goes on in the next, so that no row grows beyond a page. */
const MOST_DOPANTS = 8;

/**
 * The stack from the top down, one row a layer, a line a dopant.
 *
 * @param assumed  whether requirements were judged with the usual tolerances where none is stated
 */
export function layerTable(design: Design, result: Result, set: Readonly<Record<string, string>>, assumed: boolean): SheetTable {
  const reading = toStack(design, set);
  const stack = reading.ok ? reading.stack : null;
  const spreads = layerSpreads(design, set, assumed);
  const names = (design.variables ?? []).map((v) => v.name);
  return {
    title: 'Layers, from the top down',
    columns: [
      { heading: 'No.', align: 'end' },
      { heading: 'Layer', align: 'start' },
      { heading: 'Material', align: 'start' },
      { heading: 'Thickness', align: 'start' },
      { heading: 'Tolerance', align: 'start' },
      { heading: 'Dopant', align: 'start' },
      { heading: 'Concentration', align: 'start' },
      { heading: 'Tolerance', align: 'start' },
      { heading: 'Active', align: 'end' },
      { heading: 'Compensated', align: 'end' },
      { heading: 'Type and regime', align: 'start' },
    ],
    rows: design.layers.flatMap((layer, l) => {
      const solved = stack?.layers[l];
      const own: Cell[] = [
        words(String(l + 1)),
        words(layer.name),
        materialCell(layer, solved, result.layers[l]?.x ?? null, spreads[l].x, names),
        [{ text: printedUnits(solved ? writeQuantity(solved.thickness, 'length') : layer.thickness) }, ...typed(layer.thickness, names)],
        words(spreadText(spreads[l].thickness)),
      ];
      const regime = words(result.layers[l] ? regimeWords(result.layers[l]) : '');
      const rows = layer.dopants ?? [];
      if (rows.length === 0) return [[[...own, words('none'), EMPTY, EMPTY, EMPTY, EMPTY, regime]]];
      const again: Cell[] = [words(String(l + 1)), words(`${layer.name}, continued`), EMPTY, EMPTY, EMPTY];
      const lines = rows.map((row, d): Cell[] => [
        ...(d === 0 ? own : d % MOST_DOPANTS === 0 ? again : own.map(() => EMPTY)),
        dopantCell(row, solved?.dopants[d]),
        concentrationCell(row, solved?.dopants[d], names),
        words(spreadText(spreads[l].dopants[d])),
        words(percentText(solved?.dopants[d]?.activation ?? null)),
        words(percentText(solved?.dopants[d]?.compensation ?? null)),
        d === 0 ? regime : EMPTY,
      ]);
      return inParts(lines, MOST_DOPANTS);
    }),
  };
}

function materialCell(layer: LayerInput, solved: Stack['layers'][number] | undefined, middle: number | null, spread: Spread, names: readonly string[]): Cell {
  if (layer.x === undefined || middle === null || !solved) return words(layer.material);
  return [{ text: layer.material }, { text: `x ${profileText(solved.x, (x) => writeNumber(x, 3), '= ')}${spread ? ` ${spreadText(spread)}` : ''}`, faint: true }, ...(typeof layer.x === 'string' ? typed(layer.x, names) : [])];
}

const MODELS: Record<Dopant['model'], string> = { dilute: 'dilute', merging: 'merging with the band', screened: 'screened', complete: 'all ionised' };

function dopantCell(row: DopantRow, solved: Dopant | undefined): Cell {
  const kind = solved?.kind ?? row.kind ?? 'dopant';
  const model = solved ? MODELS[solved.model] : '';
  const name = row.dopant === undefined ? `${kind}, own` : row.dopant.toLowerCase().includes(kind) ? row.dopant : `${row.dopant}, ${kind}`;
  return [{ text: name }, { text: model, faint: true }];
}

function concentrationCell(row: DopantRow, solved: Dopant | undefined, names: readonly string[]): Cell {
  const texts = typeof row.concentration === 'string' ? typed(row.concentration, names) : [];
  if (!solved) return words(typeof row.concentration === 'string' ? printedUnits(row.concentration) : '');
  return [{ text: profileText(solved.concentration, (n) => printedUnits(writeQuantity(n, 'density', 3))) }, ...texts];
}

/** The expression behind a value, where one was typed. */
function typed(text: string, names: readonly string[]): Cell {
  return names.some((name) => new RegExp(`(^|[^A-Za-z0-9_])${name}($|[^A-Za-z0-9_])`).test(text)) ? [{ text: `= ${text}`, faint: true }] : [];
}

/** A value through the depth of a layer in words. */
function profileText(profile: Profile, write: (value: number) => string, constant = ''): string {
  const length = (cm: number): string => printedUnits(writeQuantity(cm, 'length', 3));
  switch (profile.kind) {
    case 'constant': return `${constant}${write(profile.value)}`;
    case 'implant': return `implanted: peak ${write(profile.peak)} at ${length(profile.depth)}, straggle ${length(profile.straggle)}${profile.background > 0 ? `, on ${write(profile.background)}` : ''}`;
    case 'points': return `${profile.value.length} points, from ${write(profile.value[0])} to ${write(profile.value[profile.value.length - 1])}, largest ${write(Math.max(...profile.value))}`;
    default: return `${write(profile.from)} to ${write(profile.to)}, ${profile.kind === 'linear' ? 'linear' : profile.kind}`;
  }
}

/** The design's variables as they were for this result; null without any. */
export function variableTable(design: Design, set: Readonly<Record<string, string>>): SheetTable | null {
  const rows = design.variables ?? [];
  if (rows.length === 0) return null;
  return {
    title: 'Variables',
    columns: [{ heading: 'Name', align: 'start' }, { heading: 'Value', align: 'start' }, { heading: 'Tolerance', align: 'start' }, { heading: 'Range', align: 'start' }, { heading: 'Note', align: 'start', wide: true }],
    rows: rows.map((v) => {
      const moved = Object.hasOwn(set, v.name);
      return [[
        words(v.name),
        [{ text: printedUnits(moved ? set[v.name] : v.value) }, ...(moved ? [{ text: `for this sheet; the design says ${printedUnits(v.value)}`, faint: true }] : [])],
        words(v.tolerance === undefined ? '–' : `± ${printedUnits(v.tolerance.replace(/^\s*(?:±|\+\/-|\+-)\s*/, ''))}`),
        words(v.range ? v.range.map(printedUnits).join(' to ') : '–'),
        words(v.note ?? ''),
      ]];
    }),
  };
}
