import { InputError } from '../design/complaint.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { PROGRAM_VERSION } from '../version.ts';
import { check } from './check.ts';
import { EXIT, UsageError, type Command, type Streams } from './command.ts';
import { compute } from './compute.ts';
import { draw } from './draw.ts';
import { commandHelp, helpText } from './help.ts';
import { metals } from './metals.ts';
import { sheet } from './sheet.ts';
import { size } from './size.ts';
import { sweep } from './sweep.ts';
import { vary } from './vary.ts';
import { writeWhole } from './write-file.ts';

export const COMMANDS: Readonly<Record<string, Command>> = { compute, check, size, metals, draw, sheet, sweep, vary };

/** The command line. Everything goes through `streams`, so that it can be tried without a process. */
export async function run(args: readonly string[], streams: Streams): Promise<number> {
  const [name, ...rest] = args;
  if (name === '--version') {
    streams.out(`${PROGRAM_VERSION}\n`);
    return EXIT.done;
  }
  try {
    if (name === undefined || name === '--help' || name === '-h' || (name === 'help' && rest.length === 0)) {
      streams.out(helpText(Object.values(COMMANDS)));
      return name === undefined ? EXIT.wrongInput : EXIT.done;
    }
    const command = commandOf(name === 'help' ? rest[0] : name);
    if (name === 'help' || rest.includes('--help') || rest.includes('-h')) {
      streams.out(commandHelp(command));
      return EXIT.done;
    }
    return await (/\s-o /.test(command.usage) ? command.run(rest, streams) : printing(command, rest, streams));
  } catch (error) {
    if (error instanceof UsageError) streams.error(oneLine(error.message));
    else if (error instanceof InputError) {
      const more = error.complaints.length - 1;
      streams.error(oneLine(`${error.message.split('\n')[0]}${more > 0 ? ` (and ${more} more)` : ''}`));
    } else throw error;
    return EXIT.wrongInput;
  }
}

function commandOf(name: string): Command {
  if (!Object.hasOwn(COMMANDS, name)) throw new UsageError(`there is no command ${quoted(name)}${didYouMean(name, Object.keys(COMMANDS))}; "halfmark help" lists them`);
  return COMMANDS[name];
}

/** A command that prints: with -o into a file, which appears when it is whole, and not at all where nothing was printed. */
async function printing(command: Command, args: readonly string[], streams: Streams): Promise<number> {
  const { output, rest } = takeOutput(args);
  if (output === null) return command.run(rest, streams);
  let printed = '';
  const code = await command.run(rest, { ...streams, out: (text) => void (printed += text) });
  if (printed !== '') await writeWhole(output, printed);
  return code;
}

function takeOutput(args: readonly string[]): { output: string | null; rest: string[] } {
  const rest: string[] = [];
  let output: string | null = null;
  for (let i = 0; i < args.length; i++) {
    const inline = /^--output=(.*)$/s.exec(args[i])?.[1];
    if (args[i] !== '-o' && args[i] !== '--output' && inline === undefined) {
      rest.push(args[i]);
      continue;
    }
    const value = inline ?? args[++i];
    if (value === undefined || value === '') throw new UsageError(`${args[i - 1] ?? '-o'} takes the name of a file`);
    output = value === '-' ? null : value;
  }
  return { output, rest };
}

const oneLine = (text: string): string => `halfmark: ${text.replace(/[\r\n\u2028\u2029]+/g, ' ')}\n`;
