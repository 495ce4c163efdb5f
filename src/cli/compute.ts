import { parseArguments } from './arguments.ts';
import { EXIT, SET, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { judged } from './judged.ts';
import { solved } from './solved.ts';

const usage = 'compute FILE [--set NAME=VALUE ...]';

/** Solves a design and prints the result as JSON. */
export const compute: Command = {
  usage,
  summary: 'solve the stack, print the result as JSON',
  options: [SET],
  notes: 'The requirements in the result are judged over their temperatures and all tolerances; one that is not met does not change the exit code ("check" does that).',
  async run(args, streams) {
    const { file, set } = parseArguments(args, usage);
    const design = await readDesignFile(file, streams);
    const result = solved(design, set, streams);
    if (result === null) return EXIT.noAnswer;
    result.requirements = judged(design, set);
    streams.out(`${JSON.stringify(result, null, 1)}\n`);
    return EXIT.done;
  },
};
