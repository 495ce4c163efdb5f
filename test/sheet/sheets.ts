import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { judge } from '../../src/requirements/judge.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { RequirementResult, Result } from '../../src/result/types.ts';
import { reviewSheet, type SheetInput } from '../../src/sheet/review-sheet.ts';
import type { Drawing, TextShape } from '../../src/drawing/shapes.ts';
import { plainText } from '../../src/drawing/shapes.ts';

export function solved(design: Design, set: Record<string, string> = {}): Result {
  const answer = solveDesign(design, { set });
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

export function judgedRows(design: Design): RequirementResult[] {
  const judgement = judge(design);
  if (judgement.kind !== 'judged') throw new Error(JSON.stringify(judgement));
  return judgement.requirements;
}

export function starter(id: string): Design {
  return structuredClone(starters.find((s) => s.id === id)!.design);
}

const solvedOnce = new Map<string, { design: Design; result: Result }>();
const judgedOnce = new Map<string, RequirementResult[]>();

/** A starter with its result. */
export function solvedStarter(id: string): { design: Design; result: Result } {
  if (!solvedOnce.has(id)) {
    const design = starter(id);
    solvedOnce.set(id, { design, result: solved(design) });
  }
  return solvedOnce.get(id)!;
}

/** The input of a starter's sheet; solved and judged once. */
export function inputOf(id: string, more: Partial<SheetInput> = {}): SheetInput {
  const of = solvedStarter(id);
  if (!judgedOnce.has(id)) judgedOnce.set(id, judgedRows(of.design));
  return { ...of, requirements: judgedOnce.get(id)!, author: 'A. Author', date: '2026-12-01', revision: 'B', style: 'screen', paper: 'A4', ...more };
}

export const sheetOf = (id: string, more: Partial<SheetInput> = {}): Drawing[] => reviewSheet(inputOf(id, more));

export function textsOf(page: Drawing): TextShape[] {
  return page.shapes.filter((s): s is TextShape => s.kind === 'text');
}

/** All words of the pages, lines of a cell joined by spaces. */
export function allText(pages: readonly Drawing[]): string {
  return pages.flatMap((page) => textsOf(page).map((t) => plainText(t.runs))).join(' ');
}

/** A stack of ten layers with two dopants and a variable each. */
export function tenLayers(): Design {
  const design = starter('pn-diode');
  design.title = 'Ten layers';
  design.variables = Array.from({ length: 10 }, (_, i) => ({ name: `N${i}`, value: `${i + 1}e17 cm^-3`, tolerance: '10 %' }));
  design.layers = Array.from({ length: 10 }, (_, i) => ({
    name: `layer ${i}`, material: i % 2 === 0 ? 'GaAs' : 'AlGaAs', thickness: '50 nm', ...(i % 2 === 0 ? {} : { x: '0.3' }),
    dopants: [{ dopant: 'Si', concentration: `N${i}` }, { dopant: 'C', concentration: '1e15 cm^-3' }],
  }));
  design.top = { kind: 'barrier', metal: 'Au' };
  design.bottom = { kind: 'neutral' };
  design.interfaces = [];
  design.requirements = [];
  return design;
}
