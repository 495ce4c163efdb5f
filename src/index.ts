/**
 * The library's public names: a design read, solved, swept, mapped, drawn within its tolerances, judged, sized, and put on paper. Functions return what is wrong as a value with its place and its
 * mend; only `designOf` throws it.
 */
export { check, designOf, draw, map, metals, sheetPdf, sheetSvgs, solve, sweep, vary, type Refused, type RunOptions, type SheetRequest } from './library.ts';
export { size, type SizedAnswer, type SizeOptions, type SizeResult } from './requirements/size.ts';
export { readDesign, checkDesign, type DesignReading } from './design/read.ts';
export { writeDesign } from './design/write.ts';
export { starters } from './design/starters/index.ts';
export { complaintLine, type Complaint } from './design/complaint.ts';
export { verdictLine } from './requirements/verdict.ts';
export { figuresOf, type Figure } from './sweep/figures.ts';
export { sweepNames } from './sweep/places.ts';
export { REGIMES, DEGENERACIES, type RegimeMap } from './map/regime-map.ts';
export { closeUps, type CloseUp, type CloseUpAnswer, type CloseUpOptions } from './contacts/close-up.ts';
export { drawCloseUp } from './drawing/contact-closeup.ts';
export type { Progress } from './batch/job.ts';
export type { MetalRow, RankAnswer, RankOptions, Ranking } from './contacts/rank-metals.ts';
export type { Design } from './design/types.ts';
export type { PlateOptions } from './drawing/plate.ts';
export type { FontFiles } from './export/pdf.ts';
export type { MapRequest } from './map/map-job.ts';
export type { JudgeOptions, Judgement } from './requirements/judge.ts';
export type { Answer, Result } from './result/types.ts';
export type { AxisRequest } from './sweep/axis.ts';
export type { SweepRequest, SweepResult } from './sweep/sweep.ts';
export type { VariationRequest } from './tolerance/plan.ts';
export type { VariationResult } from './tolerance/result.ts';
