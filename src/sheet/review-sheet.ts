import type { Design } from '../design/types.ts';
import { drawPlate, type PlateOptions } from '../drawing/plate.ts';
import type { Variant } from '../drawing/marks/variants.ts';
import type { Drawing, Shape } from '../drawing/shapes.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { assumptionSentences, CAUTIONS } from './assumptions.ts';
import { pagesOf, paragraph, sectionHeight, type Piece, type Room, type Section } from './flow.ts';
import { printedUnits } from './lines.ts';
import { sheetLook, type Paper, type SheetLook, type SheetStyle } from './look.ts';
import { placed } from './place-drawing.ts';
import { requirementTable, resultTables } from './result-tables.ts';
import { sourceTables } from './source-tables.ts';
import { layerTable, variableTable } from './stack-tables.ts';
import { tableSection, type SheetTable } from './table.ts';
import { titleBlock, titleBlockHeight } from './title-block.ts';

/** How the plate looks on the page, which it keeps on the sheet. */
export type SheetPlate = Partial<Pick<PlateOptions, 'depth' | 'window' | 'energyWindow' | 'shading' | 'vacuum' | 'levels' | 'hidden'>>;

export interface SheetInput {
  design: Design;
  result: Result;
  /** judged rows; those of the result where absent */ requirements?: readonly RequirementResult[];
  /** over which tolerances they were judged; "all" by default */ tolerances?: Tolerances;
  /** values that the result was solved with instead of the design's own: variables by name, and "temperature" */ set?: Readonly<Record<string, string>>;
  /** the design's own title where absent */ title?: string;
  author: string;
  /** as the person writes it; nothing here reads a clock */ date: string;
  revision: string;
  style: SheetStyle;
  paper: Paper;
  plate?: SheetPlate;
  /** results laid over the plate for comparison */ variants?: readonly Variant[];
  /** of random draws behind figures of the result */ seed?: number;
}

/**
 * The review sheet of a design: pages with the plate, the layer table, requirements, results, assumptions, parameters with their sources, and on each page the title block with
 * the cautions. The same input gives the same drawings.
 *
 * @throws {RangeError} unknown style or paper
 */
export function reviewSheet(input: SheetInput): Drawing[] {
  const look = sheetLook(input.style, input.paper);
  const title = input.title?.trim() || input.design.title || 'Untitled design';
  const caution = CAUTIONS.join(' ');
  const room: Room = {
    x: look.margin + look.inset, y: look.margin + look.inset, width: look.width - 2 * (look.margin + look.inset),
    height: look.height - 2 * look.margin - 1.5 * look.inset - titleBlockHeight(look, caution),
  };
  const sections = sectionsOf(input, look, room);
  const plate = plateOf(input, look, room, sections);
  const pages = pagesOf([{ title: '', pieces: [plate.piece] }, ...sections], room, look);
  const { program, model, presets, design } = input.result.provenance;
  return pages.map((shapes, i): Drawing => {
    const block = titleBlock({ title, author: input.author, date: input.date, revision: input.revision, page: i + 1, pages: pages.length, program: `Halfmark ${program}, model ${model}`, parameters: presets, design, caution }, look);
    return {
      width: look.width, height: look.height, background: look.style.ground, font: look.font, shapes: [...shapes, ...block],
      gradients: i === 0 ? plate.drawing.gradients : [], clips: i === 0 ? plate.drawing.clips : [],
      title: `Review sheet: ${title}, page ${i + 1} of ${pages.length}`,
      description: i === 0 ? `${plate.description} ${caution}` : `Page ${i + 1} of the review sheet of ${title}. ${caution}`,
    };
  });
}

/** Of the notes on a sheet, characters. */
const MOST_NOTES = 20_000;
const MOST_PARAGRAPHS = 60;

function sectionsOf(input: SheetInput, look: SheetLook, room: Room): Section[] {
  const { design, result, set = {}, tolerances = 'all' } = input;
  const requirements = input.requirements ?? result.requirements ?? [];
  const judged = requirements.length > 0;
  const section = (table: SheetTable): Section => tableSection(table, look, room.width);
  const maybe = (table: SheetTable | null): Section[] => (table ? [section(table)] : []);
  const sentences = (title: string, texts: readonly string[]): Section => ({ title, pieces: texts.map((text) => paragraph(text, look, room.width, { lead: '–' })) });
  const { temperatureRange } = design.conditions;
  const temperature = set.temperature ?? design.conditions.temperature;
  const unjudged = (design.requirements ?? []).length;
  return [
    section(layerTable(design, result, set, judged && tolerances === 'all')),
    ...maybe(requirementTable(requirements, { temperature: printedUnits(temperature), range: temperatureRange ? temperatureRange.map(printedUnits).join(' to ') : null })),
    ...(judged || unjudged === 0 ? [] : [sentences('Requirements', [`The design states ${unjudged} ${unjudged === 1 ? 'requirement, which was' : 'requirements, which were'} not judged for this sheet.`])]),
    ...maybe(variableTable(design, set)),
    ...resultTables(result).map(section),
    ...maybe(variantTable(input.variants ?? [])),
    sentences('Conditions and assumptions', assumptionSentences(design, result, { set, tolerances, judged, seed: input.seed ?? null })),
    sentences('Validity: where this design strains the model', result.warnings.length === 0 ? ['Nothing was found.'] : result.warnings.map(printedUnits)),
    ...(design.notes?.trim() ? [sentences('Notes', notesOf(design.notes))] : []),
    ...sourceTables(design, result).map(section),
  ];
}

/** Paragraphs of the notes; what would fill more than some pages ends in an ellipsis. */
function notesOf(notes: string): string[] {
  const paragraphs = notes.slice(0, MOST_NOTES).split(/\n\s*\n/).filter((text) => text.trim() !== '');
  const whole = notes.length <= MOST_NOTES && paragraphs.length <= MOST_PARAGRAPHS;
  return whole ? paragraphs : [...paragraphs.slice(0, MOST_PARAGRAPHS), '… (the rest stands in the design file)'];
}

/** The other results on the plate, so that each can be found again. */
function variantTable(variants: readonly Variant[]): SheetTable | null {
  if (variants.length === 0) return null;
  return {
    title: 'Laid over the plate',
    columns: [{ heading: 'Name', align: 'start' }, { heading: 'Title', align: 'start', wide: true }, { heading: 'Temperature', unit: 'K', align: 'end' }, { heading: 'Design', align: 'start' }],
    rows: variants.map(({ name, result }) => [[[{ text: name }], [{ text: result.title }], [{ text: String(Number(result.conditions.temperature_K.toPrecision(6))) }], [{ text: result.provenance.design }]]]),
  };
}

/** The plate takes what the layer table (and the requirements, if both fit) leave of the first page, within bounds. */
function plateOf({ result, plate, variants, title, design, requirements }: SheetInput, look: SheetLook, room: Room, sections: Section[]): { piece: Piece; drawing: ReturnType<typeof placed>; description: string } {
  const [least, most] = look.plateShare.map((share) => share * room.height);
  const gap = 14;
  let height = least;
  const beside = (requirements ?? result.requirements ?? []).length > 0 ? [1, 2] : [1];
  for (const count of beside) {
    const rest = room.height - sections.slice(0, count).reduce((sum, s) => sum + sectionHeight(s, room, look) + gap, 0);
    if (rest >= least) height = Math.min(rest, most);
  }
  const shown = drawPlate(title?.trim() ? { ...result, title: title.trim() } : { ...result, title: result.title || design.title }, { ...plate, variants: variants ? [...variants] : undefined, style: look.plate, width: room.width, height, frame: 'full', prefix: 'sheet-plate' });
  // Its own fonts give way to the sheet's; its ground is the sheet's already.
  const drawing = placed(shown, room.x, room.y);
  const shapes: Shape[] = drawing.shapes;
  return { piece: { height, draw: () => shapes }, drawing, description: shown.description };
}
