import { didYouMean, quoted } from '../quantity/wording.ts';
import { UsageError } from './command.ts';

export interface Parsed {
  file: string;
  set: Record<string, string>;
  options: Record<string, string>;
}

/**
 * Reads FILE, `--set NAME=VALUE` (any number) and the options that a command knows.
 *
 * @param known  options that take a value, e.g. { '-o': 'output', '--style': 'style' }
 * @param flags  options that take none, e.g. { '--json': 'json' }; where one is given, its name's value is "true"
 * @throws {UsageError}
 */
export function parseArguments(args: readonly string[], usage: string, known: Readonly<Record<string, string>> = {}, flags: Readonly<Record<string, string>> = {}): Parsed {
  let file: string | null = null;
  const set: Record<string, string> = {};
  const options: Record<string, string> = {};
  for (let i = 0; i < args.length; i++) {
    const [name, inline] = /^--[a-z-]+=/.test(args[i]) ? [args[i].slice(0, args[i].indexOf('=')), args[i].slice(args[i].indexOf('=') + 1)] : [args[i], undefined];
    if (name === '--set') {
      const pair = inline ?? args[++i];
      const at = pair?.indexOf('=') ?? -1;
      if (pair === undefined || at < 1) throw new UsageError(`--set takes NAME=VALUE, such as --set temperature="77 K"`);
      Object.defineProperty(set, pair.slice(0, at).trim(), { value: pair.slice(at + 1).trim(), enumerable: true, configurable: true, writable: true });
    } else if (Object.hasOwn(known, name)) {
      const value = inline ?? args[++i];
      if (value === undefined) throw new UsageError(`${name} takes a value; usage: halfmark ${usage}`);
      options[known[name]] = value;
    } else if (Object.hasOwn(flags, name)) {
      if (inline !== undefined) throw new UsageError(`${name} takes no value; usage: halfmark ${usage}`);
      options[flags[name]] = 'true';
    } else if (name.startsWith('-') && name !== '-') {
      throw new UsageError(`there is no option ${quoted(name)}${didYouMean(name, ['--set', ...Object.keys(known), ...Object.keys(flags)])}; usage: halfmark ${usage}`);
    } else if (file !== null) {
      throw new UsageError(`two files are named, ${quoted(file)} and ${quoted(name)}; one is read`);
    } else file = name;
  }
  if (file === null) throw new UsageError(`no FILE is named; usage: halfmark ${usage}`);
  return { file, set, options };
}
