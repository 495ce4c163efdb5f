import { UsageError } from './command.ts';

/** Options that parseArguments does not know: those without a value, and those that may come several times. */
export interface Flags {
  rest: string[];
  flags: ReadonlySet<string>;
  repeated: Readonly<Record<string, string[]>>;
}

/**
 * Takes options out of the arguments before the others are read.
 *
 * @param known     without a value, e.g. "--log"
 * @param repeated  with a value, any number of times, e.g. "--figure"
 * @param valued    the other options, whose values are left alone
 * @throws {UsageError}
 */
export function takeFlags(args: readonly string[], known: readonly string[], repeated: readonly string[], valued: readonly string[]): Flags {
  const out: Flags & { flags: Set<string>; repeated: Record<string, string[]> } = { rest: [], flags: new Set(), repeated: Object.fromEntries(repeated.map((name) => [name, []])) };
  for (let i = 0; i < args.length; i++) {
    const [, name = args[i], inline] = /^(--[a-z-]+2?)=(.*)$/s.exec(args[i]) ?? [];
    if (known.includes(name)) {
      if (inline !== undefined) throw new UsageError(`${name} takes no value; write it alone`);
      out.flags.add(name);
    } else if (repeated.includes(name)) {
      const value = inline ?? args[++i];
      if (value === undefined) throw new UsageError(`${name} takes a value`);
      out.repeated[name].push(value);
    } else if (valued.includes(name) || name === '--set') {
      out.rest.push(name);
      const value = inline ?? args[++i];
      if (value !== undefined) out.rest.push(value);
    } else out.rest.push(args[i]);
  }
  return out;
}

/** "2/8" as [2, 8]. @throws {UsageError} */
export function shardOf(text: string): [index: number, count: number] {
  const found = /^(\d{1,6})\/(\d{1,6})$/.exec(text.trim());
  const [index, count] = found ? [Number(found[1]), Number(found[2])] : [0, 0];
  if (count < 1 || index < 1 || index > count) throw new UsageError(`--shard is '${text.slice(0, 40)}'; write the number of the part and of all parts, from 1/8 to 8/8`);
  return [index, count];
}

/** A whole number written plainly. @throws {UsageError} */
export function wholeNumber(option: string, text: string, example: string): number {
  if (!/^\d{1,16}$/.test(text.trim())) throw new UsageError(`${option} is '${text.slice(0, 40)}'; a whole number such as ${example} would do`);
  return Number(text);
}
