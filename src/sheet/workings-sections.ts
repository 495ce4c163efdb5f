import type { Part } from '../drawing/shapes.ts';
import type { Origin } from '../workings/known.ts';
import { mathText, mn, mo, mrow, signOf, type MathNode } from '../workings/math.ts';
import { shown, type ShownStep, type Step } from '../workings/step.ts';
import { originText } from '../workings/text.ts';
import type { Workings } from '../workings/workings.ts';
import { paragraph, type Piece, type Room, type Section } from './flow.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import type { SheetLook } from './look.ts';
import { mathBox, type MathBox } from './set-math.ts';
import { tableSection, type SheetTable } from './table.ts';

/**
 * How chosen figures come about, a section each: the formulas as they are set, every symbol with its value and where it stands.
 *
 * @param works  those cited on the sheet: one of them is named by its number
 */
export function workingsSections(all: readonly Workings[], works: readonly string[], room: Room, look: SheetLook): Section[] {
  return all.flatMap((workings) => sectionsOf(workings, works, room, look));
}

function sectionsOf(w: Workings, works: readonly string[], room: Room, look: SheetLook): Section[] {
  const value = `${w.value.join('; ')}${w.unit === '' ? '' : ` ${w.unit}`}`;
  const sentence = (text: string): Piece => paragraph(printedUnits(text), look, room.width);
  const after = [
    ...w.remarks,
    ...(w.assumptions.length > 0 ? [`Assumptions: ${w.assumptions.join(' ')}`] : []),
    ...(w.accuracy === '' ? [] : [`Accuracy: ${w.accuracy}`]),
    ...w.rivals.map(({ words, value: other, source }) => `Another published value. ${words}: ${other}${source === '' ? '' : ` (${source})`}.`),
  ];
  const [head, pieces] = stepPieces(w.steps, works, room, look);
  const main: Section = { title: `Workings: ${w.title} = ${printedUnits(value)}`, note: w.words, ...(head ? { head } : {}), pieces: [...pieces, ...after.map(sentence)] };
  if (!w.simpler) return [main];
  const [simplerHead, simplerPieces] = stepPieces(w.simpler.steps, works, room, look);
  return [main, { title: `By the simpler way: ${w.title}`, note: `${w.simpler.words}: ${w.simpler.difference}.`, ...(simplerHead ? { head: simplerHead } : {}), pieces: simplerPieces }];
}

/** A formula with its first symbol, so that neither is left alone; then a row a symbol, all in the columns of one table. */
function stepPieces(steps: readonly Step[], works: readonly string[], room: Room, look: SheetLook): [head: Piece | undefined, pieces: Piece[]] {
  const all = steps.map((step) => ({ ...shown(step), kind: step.kind }));
  const table = tableSection(symbolTable(all, works), look, room.width);
  let next = 0;
  const pieces = all.flatMap((step): Piece[] => {
    const rows = table.pieces.slice(next, (next += step.symbols.length));
    const note = step.note === '' ? [] : [paragraph(step.note, look, room.width, { size: look.small, fill: look.style.faint })];
    return [stacked([formulaPiece(step, room, look), ...rows.slice(0, 1)]), ...rows.slice(1), ...note];
  });
  return [next > 0 ? table.head : undefined, pieces];
}

const SIZE = 1.15;

function formulaPiece({ math, result, text, kind }: ShownStep & Pick<Step, 'kind'>, room: Room, look: SheetLook): Piece {
  const value = result === null ? '' : `${result.value}${result.known.unit === '' ? '' : ` ${printedUnits(result.known.unit)}`}`;
  const part: Part = { as: 'figure', alt: result === null ? text : `${text} → ${mathText(signOf(result.known.sign))} = ${value}` };
  // An equation says at which value its two sides are equal; a bare number comes out as it went in.
  const bare = result !== null && text.endsWith(` = ${value}`);
  const comes: MathNode = result === null || bare ? math : kind === 'equation' ? mrow(math, mo('→'), signOf(result.known.sign), mo('='), mn(value)) : mrow(math, mo('='), mn(value));
  const set = (size: number): MathBox => mathBox(comes, size, { fill: look.style.ink, part });
  const wide = set(SIZE * look.text);
  // Where the line is too short for the formula its letters shrink.
  const box = wide.width <= room.width ? wide : set((SIZE * look.text * room.width) / wide.width);
  // More room above than below: it belongs to what follows.
  const [above, below] = [0.9 * look.text, 0.35 * look.text];
  return { height: above + box.up + box.down + below, draw: (x, y) => box.draw(x, y + above + box.up) };
}

function symbolTable(steps: readonly ShownStep[], works: readonly string[]): SheetTable {
  return {
    title: '',
    columns: [{ heading: 'Symbol', align: 'start' }, { heading: 'Value', align: 'start' }, { heading: 'What it is', align: 'start', wide: true }, { heading: 'Where it stands', align: 'start', wide: true }],
    rows: steps.flatMap(({ symbols }) => symbols.map(({ known, value }) => [[
      [{ text: signText(known.sign) }],
      [{ text: `${value}${known.unit === '' ? '' : ` ${printedUnits(known.unit)}`}` }],
      [{ text: known.words }],
      [{ text: `${standsAt(known.origin, works)}${known.path === '' ? '' : `; ${known.path}`}`, faint: true }],
    ]])),
  };
}

function standsAt(origin: Origin, works: readonly string[]): string {
  const cited = origin.from === 'source' ? works.indexOf(origin.text) : -1;
  return cited < 0 || origin.from !== 'source' ? originText(origin) : originText({ ...origin, text: `[${cited + 1}]` });
}

/** "E_g" as Eg. */
const signText = (notation: string): string => notation.replace(/[_^()]/g, '');

/** Pieces that stay together. */
function stacked(pieces: readonly Piece[]): Piece {
  return {
    height: pieces.reduce((sum, piece) => sum + piece.height, 0),
    draw: (x, y) => {
      let at = y;
      return pieces.flatMap((piece) => {
        const shapes = piece.draw(x, at);
        at += piece.height;
        return shapes;
      });
    },
  };
}
