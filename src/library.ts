import { runHere, type Job, type Progress } from './batch/job.ts';
import { rankMetals, type RankAnswer, type RankOptions } from './contacts/rank-metals.ts';
import type { Complaint } from './design/complaint.ts';
import { readDesign } from './design/read.ts';
import type { Design } from './design/types.ts';
import { drawPlate, type PlateOptions } from './drawing/plate.ts';
import { svgText } from './drawing/svg-text.ts';
import type { FontFiles } from './export/pdf.ts';
import { sheetPdf as pdfOfPages, sheetSvgs as svgsOfPages } from './export/sheet-files.ts';
import { mapJob, planMap, type MapRequest } from './map/map-job.ts';
import type { RegimeMap } from './map/regime-map.ts';
import { judge, type JudgeOptions, type Judgement } from './requirements/judge.ts';
import { solveDesign, type SolveDesignOptions } from './result/solve-design.ts';
import type { Answer, Result } from './result/types.ts';
import { reviewSheet, type SheetInput } from './sheet/review-sheet.ts';
import { planSweep, sweepJob, sweepResult, type SweepRequest, type SweepResult } from './sweep/sweep.ts';
import { planVariations, type VariationRequest } from './tolerance/plan.ts';
import { variationResult, type VariationResult } from './tolerance/result.ts';
import { variationJob } from './tolerance/variations.ts';

/** What is wrong with a design or a request: where, and how to mend it. Nothing was solved. */
export interface Refused {
  kind: 'complaints';
  complaints: Complaint[];
}

/** How a long computation tells where it stands, and how it is stopped: what is known by then comes back, marked as partial. */
export interface RunOptions {
  signal?: AbortSignal;
  onProgress?(progress: Progress): void;
}

/**
 * A design out of its text, checked against the schema.
 *
 * @param text  the JSON document
 * @throws {Error} naming the place and the mend of the first complaint; `readDesign` returns all of them instead
 */
export function designOf(text: string): Design {
  const reading = readDesign(text);
  if (!reading.ok) throw new Error(`${reading.complaints[0].path}: ${reading.complaints[0].message}`);
  return reading.design;
}

/**
 * Solves a design.
 *
 * @param options  `set`: values of variables by name, and "temperature", for this run; `accuracy` of psi, V
 * @returns a result document ("halfmark-result/1"); or what is wrong with the design; or why there is no accepted answer, and then no figures
 */
export function solve(design: Design, options: Pick<SolveDesignOptions, 'set' | 'accuracy'> = {}): Answer {
  const answer = solveDesign(design, options);
  return answer.kind === 'result' ? { kind: 'result', result: answer.result } : answer;
}

/**
 * Figures along one axis, or two: a variable, the temperature, or a quantity at its place in the design.
 *
 * @returns values of each figure by point, the first axis running fastest; a point without an answer is a gap with its reason
 */
export async function sweep(design: Design, request: SweepRequest, options: RunOptions = {}): Promise<(SweepResult & { kind: 'swept' }) | Refused> {
  const planned = planSweep(design, request);
  if (!planned.ok) return { kind: 'complaints', complaints: planned.complaints };
  const values = await chunksOf(sweepJob(planned.plan), options);
  return { kind: 'swept', ...sweepResult(planned.plan, values) };
}

/**
 * Tolerance run: the design drawn within its tolerances many times, in this thread. The same request gives the same document, to the last digit, here, on the command line and on any number
 * of machines.
 *
 * @returns spreads of the figures, what moves each of them, and the share of the variations that meet the requirements
 */
export async function vary(design: Design, request: VariationRequest, options: RunOptions = {}): Promise<(VariationResult & { kind: 'varied' }) | Refused> {
  const planned = planVariations(design, request);
  if (!planned.ok) return { kind: 'complaints', complaints: planned.complaints };
  const values = await chunksOf(variationJob(planned.plan), options);
  return { kind: 'varied', ...variationResult(planned.plan, values) };
}

async function chunksOf<V>(job: Job<V>, { signal, onProgress }: RunOptions): Promise<Map<number, V>> {
  return (await runHere(job, { signal, onProgress })).values;
}

/**
 * Regime map of a layer: what its material would be at every doping and temperature.
 *
 * @param request  `layer` by its index; 200 x 200 from 1e12 to 1e21 cm^-3 and 4 to 1000 K unless it says otherwise
 * @returns codes of regime and degeneracy, Ec - EF (eV), Boltzmann's error (meV) and more, [rows x columns] from the coldest row
 */
export function map(design: Design, request: MapRequest): (RegimeMap & { kind: 'mapped' }) | Refused {
  const planned = planMap(design, request);
  if (!planned.ok) return { kind: 'complaints', complaints: planned.complaints };
  const found = mapJob(planned.plan).run(0);
  return found === null ? { kind: 'complaints', complaints: [{ path: `layers[${request.layer}]`, message: 'is an insulator, which has no map' }] } : { kind: 'mapped', ...found };
}

/** Judges the requirements of a design in their worst case over its temperature range and tolerances; `met` of each row says how it went. */
export function check(design: Design, options: JudgeOptions = {}): Judgement {
  return judge(design, options);
}

/** Ranks the metals of the presets and of the design on one end of the stack by their worst contact resistivity. */
export function metals(design: Design, options: RankOptions): RankAnswer {
  const steps = rankMetals(design, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** The plate of a result as SVG text. Sizes in px; 1200 x 760 with layer names, title and caption unless it says otherwise. */
export function draw(result: Result, options: Partial<PlateOptions> = {}): string {
  return svgText(drawPlate(result, { width: 1200, height: 760, frame: 'full', ...options }));
}

/** A review sheet as it is asked for: what is left out is empty, on the screen's style and A4. */
export type SheetRequest = Pick<SheetInput, 'design' | 'result'> & Partial<SheetInput>;

/** The review sheet as one PDF. @param fonts  the faces that are embedded, DejaVu Sans and its bold */
export function sheetPdf(request: SheetRequest, fonts: FontFiles): Uint8Array {
  const { design, result, author = '' } = request;
  return pdfOfPages(pagesOf(request), fonts, { title: request.title ?? design.title, author, provenance: result.provenance });
}

/** The review sheet as an SVG a page. */
export function sheetSvgs(request: SheetRequest): string[] {
  return svgsOfPages(pagesOf(request), 'sheet').map(({ text }) => text);
}

function pagesOf(request: SheetRequest): ReturnType<typeof reviewSheet> {
  return reviewSheet({ author: '', date: '', revision: '', style: 'screen', paper: 'A4', ...request });
}
