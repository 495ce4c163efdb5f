import { html, nothing, type TemplateResult } from 'lit';
import type { VariationResult, VariedFigureResult } from '../../src/tolerance/result.ts';
import { spreadFigures, yieldFigures } from '../../src/workings/panel-figures.ts';
import { figureAt, focusedFigure, how, walkFigures } from '../shared/how.ts';
import { figureWord, gapReasons, strongestWords } from './tolerance-words.ts';

/** How many variations meet each requirement, and all of them. */
export function yieldTable(result: VariationResult): TemplateResult | typeof nothing {
  const { figures, yield: all } = result;
  const required = figures.filter((figure) => figure.yield !== null);
  if (all === null || required.length === 0) return nothing;
  const row = (words: string, figure: VariedFigureResult | null): TemplateResult => {
    const y = (figure === null ? all : figure.yield)!;
    const figures = yieldFigures(result, figure);
    const cell = (column: (typeof figures)[number]['asked']['column']): TemplateResult => how(figureAt(figures, column)!, { walked: true });
    return html`<tr><th scope="row">${words}</th><td class=${y.met < y.of ? 'less' : ''}>${cell('yield')}</td><td>${y.met} of ${y.of}</td><td>${cell('yieldLow')} to ${cell('yieldHigh')}</td></tr>`;
  };
  return html`<h3>Yield</h3>
    <div class="scroll" role="region" aria-label="Yield, figures" tabindex="0">
      <table>
        <thead><tr><th scope="col">Requirement</th><th scope="col">Met</th><th scope="col">Variations</th><th scope="col">True share, 95 %</th></tr></thead>
        <tbody @keydown=${walkFigures} @focusin=${focusedFigure}>${required.map((figure) => row(figure.words, figure))} ${required.length > 1 ? row('all of them', null) : nothing}</tbody>
      </table>
    </div>`;
}

const COLUMNS = ['Nominal', 'Mean', 'sd', '2.5 %', 'Median', '97.5 %', 'Unit'];

/** Every figure's spread, with the input that moves it most. */
export function spreadTable(result: VariationResult): TemplateResult {
  const { figures, inputs } = result;
  return html`<div class="scroll" role="region" aria-label="Spreads, figures" tabindex="0">
    <table>
      <thead><tr><th scope="col">Figure</th>${COLUMNS.map((words) => html`<th scope="col">${words}</th>`)}<th scope="col" class="words">Moved most by, low end to high end</th></tr></thead>
      <tbody @keydown=${walkFigures} @focusin=${focusedFigure}>${figures.map((f) => html`<tr><th scope="row">${f.words}</th><td>${figureWord(f.nominal)}</td>${spreadCells(result, f)}<td>${f.unit}</td><td class="words">${strongestWords(f, inputs)}</td></tr>`)}</tbody>
    </table>
  </div>`;
}

const SPREAD = ['mean', 'sd', 'low', 'median', 'high'] as const;

function spreadCells(result: VariationResult, figure: VariedFigureResult): TemplateResult[] {
  const figures = spreadFigures(result, figure);
  return SPREAD.map((column) => {
    const found = figureAt(figures, column);
    return html`<td>${found === null ? '–' : how(found, { content: figureWord(found.value), walked: true })}</td>`;
  });
}

/** Variations without an answer, counted by reason. */
export function gapList(result: VariationResult): TemplateResult | typeof nothing {
  const reasons = gapReasons(result);
  if (reasons.length === 0) return nothing;
  return html`<h3>Without an answer: ${result.gaps.length}</h3>
    <p class="doc">They stay out of the spreads and count as not met.</p>
    <ul>${reasons.map(({ reason, count, first }) => html`<li>${count}: ${reason} (the first is variation ${first})</li>`)}</ul>`;
}
