import type { CloseUp } from '../contacts/close-up.ts';
import { closeUpFigures, closeUpTitle } from '../drawing/contact-closeup-words.ts';
import { drawCloseUp } from '../drawing/contact-closeup.ts';
import { drawPlate, type PlateOptions } from '../drawing/plate.ts';
import type { Corner } from '../requirements/corner.ts';
import { requirementWords, standingWords, verdictWords } from '../requirements/verdict.ts';
import type { Design } from '../design/types.ts';
import { figureText } from '../result/figure-text.ts';
import type { Result } from '../result/types.ts';
import { changeSentences, differenceTable, originTable, type SheetVariant } from './comparison.ts';
import { paragraph, sectionHeight, type Room, type Section } from './flow.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import type { SheetLook } from './look.ts';
import { picturePiece } from './pictures.ts';
import { tableSection } from './table.ts';

/** Of the room of a page, what a further picture takes. */
const SHARE = 0.62;
/** Letters of a slide need more; so does a picture that nothing stands below. */
const WHOLE = 0.9;
/** A picture above its table: least share of the page. */
const LEAST = 0.45;

type PlateLook = Partial<Pick<PlateOptions, 'depth' | 'window' | 'energyWindow' | 'shading' | 'vacuum' | 'levels' | 'hidden'>>;

const heightOf = (look: SheetLook, room: Room): number => (look.plateShare[0] === 1 ? WHOLE : SHARE) * room.height;

/** Two to four designs on one plate, what differs in figures, and what was changed. */
export function comparisonSections(base: { name: string; design: Design; result: Result }, variants: readonly SheetVariant[], plate: PlateLook, room: Room, look: SheetLook): Section[] {
  const drawing = drawPlate({ ...base.result, title: '' }, {
    // Where lines are compared, the tint of one of the designs and its dimensions would speak for all.
    ...plate, shading: 'none', levels: false, variants: variants.map(({ name, result }) => ({ name, result })), base: base.name, remarks: [`Layers, temperature and dimensions are those of ${base.name}.`], style: look.plate, width: room.width, height: heightOf(look, room), frame: 'full', prefix: 'sheet-overlay',
  });
  return [
    { title: 'Variants laid over each other', pieces: [picturePiece(drawing)] },
    tableSection(originTable(base, variants), look, room.width),
    tableSection(differenceTable(base, variants), look, room.width),
    ...variants.map(({ name, design }): Section => ({ title: `Changes from ${base.name} to ${name}`, pieces: changeSentences(base.design, design).map((text) => paragraph(text, look, room.width, { lead: '–' })) })),
  ];
}

/** The plate where a requirement is at its worst, the nominal bands laid under it; all that is moved there stands below. */
export function cornerSection({ requirement, result }: Corner, nominal: Result, plate: PlateLook, room: Room, look: SheetLook): Section {
  const { tolerances, words: told } = requirement.at!;
  const words = printedUnits(cornerTitle(told, tolerances));
  const { worst } = requirement;
  const figure = worst === null || typeof worst === 'boolean' ? '' : ` There it is ${figureText(worst)}${requirement.unit === '' ? '' : ` ${printedUnits(requirement.unit)}`}; ${printedUnits(standingWords(requirement))}, ${verdictWords(requirement)}.`;
  const all = tolerances.map(({ name, words: amount }) => `${name} ${printedUnits(amount)}`).join(', ');
  const list = tolerances.length === 0 ? [] : [paragraph(`Moved within their tolerances in this picture: ${all}.`, look, room.width, { size: look.small })];
  const title = 'The plate at the worst corner of the requirements';
  const left = room.height - sectionHeight({ title, pieces: list }, room, look) - 12;
  const drawing = drawPlate({ ...result, title: `At the worst corner: ${words}` }, {
    ...plate, variants: [{ name: 'nominal', result: nominal }], base: 'worst corner', style: look.plate, width: room.width, height: Math.min(WHOLE * room.height, left), frame: 'full', prefix: 'sheet-corner',
    remarks: [`Worst corner of “${printedUnits(requirementWords(requirement))}”: ${words}.${figure}`],
  });
  return { title, pieces: [picturePiece(drawing), ...list] };
}

/**
 * What is moved in the picture, short enough for a title: what moves the requirement by its name, the rest by their number.
 *
 * @param told   the words of the corner
 * @param moved  all that is moved there
 */
export function cornerTitle(told: string, moved: readonly { name: string; words: string }[]): string {
  const named = told.replace(/, and \d+ more$/, '');
  const left = moved.filter(({ name, words }) => !`${named},`.includes(`, ${name} ${words},`)).length;
  return left === 0 ? named : `${named}, and ${left} more (listed below)`;
}

/** Each metal contact from near, with its figures. */
export function closeUpSections(closeUps: readonly CloseUp[], room: Room, look: SheetLook): Section[] {
  return closeUps.flatMap((closeUp): Section[] => {
    const table = tableSection({
      title: '',
      columns: [{ heading: 'Figure', align: 'start' }, { heading: 'Value', align: 'start' }, { heading: 'Remark', align: 'start', wide: true }],
      rows: closeUpFigures(closeUp).map(({ name, text, note }) => [[[{ text: name }], [{ text }], [{ text: note ?? '' }]]]),
    }, look, room.width);
    const title = `From near: ${closeUpTitle(closeUp)}`;
    const left = room.height - sectionHeight({ ...table, title }, room, look) - 24;
    // Where its table leaves too little, the picture has a page of its own.
    const apart = left < LEAST * room.height;
    const height = apart ? heightOf(look, room) : Math.min(left, heightOf(look, room));
    const notes = closeUp.notes.map((text) => paragraph(printedUnits(text), look, room.width, { lead: '–' }));
    const drawing = drawCloseUp(closeUp, { width: room.width, height, style: look.plate, prefix: `sheet-closeup-${closeUp.side}` });
    return [{ title, pieces: [picturePiece(drawing)] }, { ...table, title: apart ? `Figures of ${closeUpTitle(closeUp)}` : '', pieces: [...table.pieces, ...notes] }];
  });
}
