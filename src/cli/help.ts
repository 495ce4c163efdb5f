import type { Command } from './command.ts';

/** Options that every command which prints takes besides its own. */
const EVERY = ['-o OUT, --output OUT', 'write what would be printed into a file, whole or not at all; - prints it'] as const;

/** The list of all commands. */
export function helpText(commands: readonly Command[]): string {
  return `${[
    'Band diagrams, Fermi levels and contacts of a layer stack, from a design file.', '',
    ...commands.map((c) => `  halfmark ${c.usage}\n      ${c.summary}`), '',
    '"halfmark COMMAND --help" explains the options of one command; "halfmark --version" prints the version.',
    'FILE is a design in JSON, or - for standard input. NAME is a variable of the design, or temperature.', '',
    ...EXITS,
  ].join('\n')}\n`;
}

const EXITS = [
  'Exit codes: 0 done, 1 a requirement is not met, 2 the input is wrong (one line on standard error says where and how to mend it), 3 no accepted answer,',
  '130 stopped by Ctrl-C (sweep, vary and size print what is known by then, marked as partial).',
];

/** One command: its usage, its options in a column, its notes. */
export function commandHelp({ usage, summary, options, notes }: Command): string {
  const own = /\s-o /.test(usage) ? [] : [EVERY];
  const rows = [...options, ...own, ['--help', 'print this'] as const];
  const width = Math.max(...rows.map(([option]) => option.length));
  return `${[`halfmark ${usage}`, '', `${summary[0].toUpperCase()}${summary.slice(1)}.`, '', ...rows.map(([option, words]) => `  ${option.padEnd(width)}  ${words}`), '', ...(notes === '' ? [] : [notes, '']), ...EXITS].join('\n')}\n`;
}
