import { html, nothing, type TemplateResult } from 'lit';
import type { VariationResult, VariedFigureResult } from '../../src/tolerance/result.ts';
import { figureWord, gapReasons, percent, strongestWords } from './tolerance-words.ts';

/** How many variations meet each requirement, and all of them. */
export function yieldTable({ figures, yield: all }: VariationResult): TemplateResult | typeof nothing {
  const required = figures.filter((figure) => figure.yield !== null);
  if (all === null || required.length === 0) return nothing;
  const row = (words: string, y: NonNullable<VariedFigureResult['yield']>): TemplateResult =>
    html`<tr><th scope="row">${words}</th><td class=${y.met < y.of ? 'less' : ''}>${percent(y.share)}</td><td>${y.met} of ${y.of}</td><td>${percent(y.low)} to ${percent(y.high)}</td></tr>`;
  return html`<h3>Yield</h3>
    <div class="scroll" role="region" aria-label="Yield, figures" tabindex="0">
      <table>
        <thead><tr><th scope="col">Requirement</th><th scope="col">Met</th><th scope="col">Variations</th><th scope="col">True share, 95 %</th></tr></thead>
        <tbody>${required.map((figure) => row(figure.words, figure.yield!))} ${required.length > 1 ? row('all of them', all) : nothing}</tbody>
      </table>
    </div>`;
}

const COLUMNS = ['Nominal', 'Mean', 'sd', '2.5 %', 'Median', '97.5 %', 'Unit'];

/** Every figure's spread, with the input that moves it most. */
export function spreadTable({ figures, inputs }: VariationResult): TemplateResult {
  const at = (figure: VariedFigureResult, p: number): number | null => figure.quantiles.find((q) => q.p === p)?.value ?? null;
  return html`<div class="scroll" role="region" aria-label="Spreads, figures" tabindex="0">
    <table>
      <thead><tr><th scope="col">Figure</th>${COLUMNS.map((words) => html`<th scope="col">${words}</th>`)}<th scope="col" class="words">Moved most by, low end to high end</th></tr></thead>
      <tbody>${figures.map((f) => html`<tr><th scope="row">${f.words}</th>${[f.nominal, f.mean, f.sd, at(f, 0.025), at(f, 0.5), at(f, 0.975)].map((value) => html`<td>${figureWord(value)}</td>`)}<td>${f.unit}</td><td class="words">${strongestWords(f, inputs)}</td></tr>`)}</tbody>
    </table>
  </div>`;
}

/** Variations without an answer, counted by reason. */
export function gapList(result: VariationResult): TemplateResult | typeof nothing {
  const reasons = gapReasons(result);
  if (reasons.length === 0) return nothing;
  return html`<h3>Without an answer: ${result.gaps.length}</h3>
    <p class="doc">They stay out of the spreads and count as not met.</p>
    <ul>${reasons.map(({ reason, count, first }) => html`<li>${count}: ${reason} (the first is variation ${first})</li>`)}</ul>`;
}
