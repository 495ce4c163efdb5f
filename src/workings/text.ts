import type { Origin } from './known.ts';
import { knownText, shown, type ShownStep } from './step.ts';
import type { Workings } from './workings.ts';

/** The workings as plain text, for the clipboard and the sheet. */
export function workingsText(w: Workings): string {
  const value = `${w.value.join('; ')}${w.unit === '' ? '' : ` ${w.unit}`}`;
  const parts = [
    `${w.title}: ${value}`,
    w.words,
    ...w.steps.map((step) => lines(shown(step))),
    ...w.remarks,
    ...(w.simpler ? [`By the simpler way (${w.simpler.words}), ${w.simpler.difference}:`, ...w.simpler.steps.map((step) => lines(shown(step)))] : []),
    ...(w.rivals.length > 0 ? [`Other values:\n${w.rivals.map((r) => `  ${r.words}: ${r.value}${r.source === '' ? '' : ` (${r.source})`}`).join('\n')}`] : []),
    ...(w.assumptions.length > 0 ? [`Assumptions: ${w.assumptions.join(' ')}`] : []),
    ...(w.accuracy === '' ? [] : [`Accuracy: ${w.accuracy}`]),
  ];
  return `${parts.join('\n\n')}\n`;
}

function lines({ text, symbols, result, note }: ShownStep): string {
  return [
    result === null ? text : `${text} → ${knownText(result.known, result.value)}`,
    ...symbols.map(({ known, value }) => `  ${known.words}: ${knownText(known, value)} [${originText(known.origin)}${known.path === '' ? '' : `; ${known.path}`}]`),
    ...(note === '' ? [] : [`  ${note}`]),
  ].join('\n');
}

const CHECKED = { page: 'seen in print', memory: 'from memory of the work', computed: 'derived' };

/** Where a value stands, in words. */
export function originText(origin: Origin): string {
  switch (origin.from) {
    case 'source':
      return `${origin.text}${origin.checked === null ? '' : `; ${CHECKED[origin.checked]}`}${origin.note === '' ? '' : `; ${origin.note}`}`;
    case 'own value':
      return origin.text === '' ? 'own value, no source given' : `own value: ${origin.text}`;
    case 'constant':
      return 'SI 2019 and CODATA 2018';
    case 'this design':
      return 'this design';
    case 'usual tolerance':
      return 'usual where the design states none: suppliers’ tables; Colaux et al., Analyst 2015; Stevie et al., SIMS XI 1998; Martin et al., Appl. Phys. Lett. 1994; Waldrop and Grant, Appl. Phys. Lett. 1996';
    case 'solved':
      return 'solved';
    case 'worked out':
      return 'worked out here';
  }
}
