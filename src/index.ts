/** The library's public names: read a design, solve it, draw it, write it. */
export { readDesign, checkDesign, type DesignReading } from './design/read.ts';
export { writeDesign } from './design/write.ts';
export { complaintLine, type Complaint } from './design/complaint.ts';
export { solveDesign, type SolveDesignOptions, type SolvedAnswer } from './result/solve-design.ts';
export type { Design } from './design/types.ts';
export type { Answer, Result } from './result/types.ts';
export { judge, judging, type JudgeOptions, type Judgement } from './requirements/judge.ts';
export { size, sizeSteps, type SizedAnswer, type SizeOptions, type SizeResult } from './requirements/size.ts';
export { rankMetals, type MetalRow, type RankOptions, type Ranking } from './contacts/rank-metals.ts';
export { closeUps, type CloseUp, type CloseUpAnswer, type CloseUpOptions } from './contacts/close-up.ts';
export { drawCloseUp } from './drawing/contact-closeup.ts';
