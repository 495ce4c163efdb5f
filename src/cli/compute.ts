import { parseArguments } from './arguments.ts';
import { EXIT, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { judged } from './judged.ts';
import { solved } from './solved.ts';

const usage = 'compute FILE [--set NAME=VALUE ...]';

/** Solves a design and prints the result as JSON. */
export const compute: Command = {
  usage,
  summary: 'solve the stack, print the result as JSON',
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
