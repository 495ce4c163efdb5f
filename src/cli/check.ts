import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { mobilityNotes } from '../result/mobility-note.ts';
import type { RequirementResult } from '../result/types.ts';
import { verdictLine } from '../requirements/verdict.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, SET, TOLERANCES, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { judged, tolerancesOf } from './judged.ts';
import { solved } from './solved.ts';

const usage = 'check FILE [--set NAME=VALUE ...] [--tolerances all|stated|none]';

/** Judges the requirements of a design over their temperatures and tolerances, one line each. */
export const check: Command = {
  usage,
  summary: 'judge the requirements in their worst case, one line each',
  options: [SET, TOLERANCES],
  notes: 'Ends with 1 where a requirement is not met, with 3 where one cannot be judged: a script or a pipeline can hold a design file to its requirements.',
  async run(args, streams) {
    const { file, set, options } = parseArguments(args, usage, { '--tolerances': 'tolerances' });
    const tolerances = tolerancesOf(options.tolerances);
    const design = await readDesignFile(file, streams);
    // The design as it stands must have an accepted answer; why it has none is said once, not once a requirement.
    if (solved(design, set, streams) === null) return EXIT.noAnswer;
    const rows = judged(design, set, tolerances);
    if (rows.length === 0) streams.error('halfmark: this design has no requirements; there is nothing to judge\n');
    for (const row of rows) streams.out(`${verdictLine(row)}\n`);
    for (const note of notesOf(design, set, rows)) streams.error(`halfmark: ${note}\n`);
    if (rows.some((row) => row.judged && !row.met)) return EXIT.requirementNotMet;
    return rows.every((row) => row.met) ? EXIT.done : EXIT.noAnswer;
  },
};

/** What the judged figures leave out at their temperatures. */
function notesOf(design: Design, set: Record<string, string>, rows: readonly RequirementResult[]): string[] {
  const reading = toStack(design, set);
  if (!reading.ok) return [];
  const nominal = [reading.stack.temperature];
  return mobilityNotes(rows.map(({ quantity, over }) => ({ name: quantity, temperatures_K: over === 'temperatureRange' ? (reading.temperatureRange ?? nominal) : nominal })));
}
