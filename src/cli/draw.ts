import { drawPlate } from '../drawing/plate.ts';
import { svgText } from '../drawing/svg-text.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, SET, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { solved } from './solved.ts';
import { writeWhole } from './write-file.ts';

const STYLES = ['light', 'dark', 'slide', 'journal'] as const;
const DEPTHS = ['even', 'true'] as const;
const SHADINGS = ['occupancy', 'carriers', 'none'] as const;
const usage = 'draw FILE -o OUT.svg [--set NAME=VALUE ...] [--style light|dark|slide|journal] [--depth even|true] [--shading occupancy|carriers|none]';

/** Solves a design and writes its plate as SVG, by the page's own drawing code. */
export const draw: Command = {
  usage,
  summary: 'solve the stack, write the band diagram as SVG',
  options: [
    ['-o OUT.svg, --output OUT.svg', 'the file, written whole or not at all; - prints it'],
    SET,
    ['--style WORD', 'light (the default) or dark as on the screen, slide, or journal (black and white)'],
    ['--depth WORD', 'even: each layer gets room in proportion to the bending it holds (the default); true: to its thickness'],
    ['--shading WORD', 'occupancy (the default), carriers, or none'],
  ],
  notes: '',
  async run(args, streams) {
    const { file, set, options } = parseArguments(args, usage, { '-o': 'output', '--output': 'output', '--style': 'style', '--depth': 'depth', '--shading': 'shading' });
    const { output } = options;
    if (output === undefined) throw new UsageError('no output is named; write -o OUT.svg, or -o - for standard output');
    if (output !== '-' && !/\.svg$/i.test(output)) throw new UsageError(`${quoted(output)} does not end in .svg, the one form that is written`);
    const style = one('--style', options.style, STYLES);
    const depth = one('--depth', options.depth, DEPTHS);
    const shading = one('--shading', options.shading, SHADINGS);
    const result = solved(await readDesignFile(file, streams), set, streams);
    if (result === null) return EXIT.noAnswer;
    const svg = svgText(drawPlate(result, { width: 1200, height: 760, frame: 'full', style, depth, shading }));
    if (output === '-') streams.out(svg);
    else await writeWhole(output, svg);
    return EXIT.done;
  },
};

/** The first of `words` where nothing is said. */
function one<W extends string>(option: string, value: string | undefined, words: readonly W[]): W {
  if (value === undefined) return words[0];
  if ((words as readonly string[]).includes(value)) return value as W;
  throw new UsageError(`${option} is ${quoted(value)}; ${words.join(', ')} would do${didYouMean(value, words)}`);
}
