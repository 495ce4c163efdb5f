import { check } from './check.ts';
import { compute } from './compute.ts';
import { draw } from './draw.ts';
import { metals } from './metals.ts';
import { sweep } from './sweep.ts';
import { vary } from './vary.ts';
import { sheet } from './sheet.ts';
import { size } from './size.ts';
import { EXIT, UsageError, type Command, type Streams } from './command.ts';
import { InputError } from '../design/complaint.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { PROGRAM_VERSION } from '../version.ts';

const COMMANDS: Readonly<Record<string, Command>> = { compute, check, size, metals, draw, sheet, sweep, vary };

/** The command line. Everything goes through `streams`, so that it can be tried without a process. */
export async function run(args: readonly string[], streams: Streams): Promise<number> {
  const [name, ...rest] = args;
  if (name === undefined || name === '--help' || name === 'help') {
    streams.out(help());
    return name === undefined ? EXIT.wrongInput : EXIT.done;
  }
  if (name === '--version') {
    streams.out(`${PROGRAM_VERSION}\n`);
    return EXIT.done;
  }
  try {
    if (!Object.hasOwn(COMMANDS, name)) throw new UsageError(`there is no command ${quoted(name)}${didYouMean(name, Object.keys(COMMANDS))}; "halfmark help" lists them`);
    return await COMMANDS[name].run(rest, streams);
  } catch (error) {
    if (error instanceof UsageError) streams.error(oneLine(error.message));
    else if (error instanceof InputError) {
      const more = error.complaints.length - 1;
      streams.error(oneLine(`${error.message.split('\n')[0]}${more > 0 ? ` (and ${more} more)` : ''}`));
    } else throw error;
    return EXIT.wrongInput;
  }
}

const oneLine = (text: string): string => `halfmark: ${text.replace(/[\r\n\u2028\u2029]+/g, ' ')}\n`;

function help(): string {
  return `${['Band diagrams, Fermi levels and contacts of a layer stack, from a design file.', '', ...Object.values(COMMANDS).map((c) => `  halfmark ${c.usage}\n      ${c.summary}`), '',
    'FILE is a design in JSON, or - for standard input. NAME is a variable of the design, or temperature.',
    'Exit codes: 0 done, 1 a requirement is not met, 2 the input is wrong, 3 no accepted answer.'].join('\n')}\n`;
}
