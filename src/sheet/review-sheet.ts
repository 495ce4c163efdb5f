import type { CloseUp } from '../contacts/close-up.ts';
import type { Design } from '../design/types.ts';
import { drawPlate, type PlateOptions } from '../drawing/plate.ts';
import type { Drawing } from '../drawing/shapes.ts';
import type { Corner } from '../requirements/corner.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import type { Workings } from '../workings/workings.ts';
import { assumptionSentences, CAUTIONS } from './assumptions.ts';
import { closeUpSections, comparisonSections, cornerSection } from './closer-looks.ts';
import { MOST_VARIANTS, type SheetVariant } from './comparison.ts';
import { pagesOf, paragraph, sectionHeight, type Piece, type Room, type Section } from './flow.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { sheetLook, type Paper, type SheetLook, type SheetStyle } from './look.ts';
import { picturePiece } from './pictures.ts';
import { requirementTable, resultTables } from './result-tables.ts';
import { parametersInUse } from './parameters.ts';
import { citedWorks, sourceTables } from './source-tables.ts';
import { layerTable, variableTable } from './stack-tables.ts';
import { tableSection, type SheetTable } from './table.ts';
import { titleBlock, titleBlockHeight } from './title-block.ts';
import { workingsSections } from './workings-sections.ts';

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
  /** up to three designs laid over this one on a plate of their own, with what differs and what was changed */ comparison?: { /** of this design beside the others */ base: string; variants: readonly SheetVariant[] };
  /** the plate where a requirement is at its worst */ corner?: Corner;
  /** metal contacts from near */ closeUps?: readonly CloseUp[];
  /** figures whose workings stand at the end */ workings?: readonly Workings[];
  /** of random draws behind figures of the result */ seed?: number;
}

/**
 * The review sheet of a design: pages with the plate, the layer table, requirements, results, assumptions, parameters with their sources, and on each page the title block with
 * the cautions. The same input gives the same drawings.
 *
 * @throws {RangeError} unknown style or paper; more designs than one plate tells apart
 */
export function reviewSheet(input: SheetInput): Drawing[] {
  const look = sheetLook(input.style, input.paper);
  if ((input.comparison?.variants.length ?? 0) > MOST_VARIANTS) throw new RangeError(`no more than ${MOST_VARIANTS} designs can be laid over the sheet's own`);
  const title = input.title?.trim() || input.design.title || 'Untitled design';
  const caution = CAUTIONS.join(' ');
  const room: Room = {
    x: look.margin + look.inset, y: look.margin + look.inset, width: look.width - 2 * (look.margin + look.inset),
    height: look.height - 2 * look.margin - 1.5 * look.inset - titleBlockHeight(look, caution),
  };
  const sections = sectionsOf(input, look, room);
  const plate = plateOf(input, look, room, sections);
  const pages = pagesOf([{ title: '', pieces: [plate] }, ...sections], room, look);
  const { program, model, presets, design } = input.result.provenance;
  return pages.map(({ shapes, gradients, clips, descriptions }, i): Drawing => {
    const block = titleBlock({ title, author: input.author, date: input.date, revision: input.revision, page: i + 1, pages: pages.length, program: `Halfmark ${program}, model ${model}`, parameters: presets, design, caution }, look);
    const seen = [...(i === 0 ? [] : [`Page ${i + 1} of the review sheet of ${title}.`]), ...descriptions];
    return {
      width: look.width, height: look.height, background: look.style.ground, font: look.font, shapes: [...shapes, ...block], gradients, clips,
      title: `Review sheet: ${title}, page ${i + 1} of ${pages.length}`,
      description: `${seen.join(' ')} ${caution}`,
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
    ...(input.comparison && input.comparison.variants.length > 0 ? comparisonSections({ name: input.comparison.base, design, result }, input.comparison.variants, input.plate ?? {}, room, look) : []),
    ...(input.corner ? [cornerSection(input.corner, result, input.plate ?? {}, room, look)] : []),
    ...closeUpSections(input.closeUps ?? [], room, look),
    sentences('Conditions and assumptions', assumptionSentences(design, result, { set, tolerances, judged, seed: input.seed ?? null })),
    sentences('Validity: where this design strains the model', result.warnings.length === 0 ? ['Nothing was found.'] : result.warnings.map(printedUnits)),
    ...(design.notes?.trim() ? [sentences('Notes', notesOf(design.notes))] : []),
    ...sourceTables(design, result).map(section),
    ...workingsSections(input.workings ?? [], citedWorks(parametersInUse(design, result)), room, look),
  ];
}

/** Paragraphs of the notes; what would fill more than some pages ends in an ellipsis. */
function notesOf(notes: string): string[] {
  const paragraphs = notes.slice(0, MOST_NOTES).split(/\n\s*\n/).filter((text) => text.trim() !== '');
  const whole = notes.length <= MOST_NOTES && paragraphs.length <= MOST_PARAGRAPHS;
  return whole ? paragraphs : [...paragraphs.slice(0, MOST_PARAGRAPHS), '… (the rest stands in the design file)'];
}

/** The plate takes what the layer table (and the requirements, if both fit) leave of the first page, within bounds. */
function plateOf({ result, plate, title, design, requirements }: SheetInput, look: SheetLook, room: Room, sections: Section[]): Piece {
  const [least, most] = look.plateShare.map((share) => share * room.height);
  const gap = 14;
  let height = least;
  const beside = (requirements ?? result.requirements ?? []).length > 0 ? [1, 2] : [1];
  for (const count of beside) {
    const rest = room.height - sections.slice(0, count).reduce((sum, s) => sum + sectionHeight(s, room, look) + gap, 0);
    if (rest >= least) height = Math.min(rest, most);
  }
  const shown = drawPlate(title?.trim() ? { ...result, title: title.trim() } : { ...result, title: result.title || design.title }, { ...plate, style: look.plate, width: room.width, height, frame: 'full', prefix: 'sheet-plate' });
  // Its own fonts give way to the sheet's; its ground is the sheet's already.
  return picturePiece(shown);
}
