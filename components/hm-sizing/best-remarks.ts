import { html, nothing, type TemplateResult } from 'lit';
import { requirementWords, standingWords, unansweredWords, verdictWords } from '../../src/requirements/verdict.ts';
import type { RequirementResult } from '../../src/result/types.ts';

/** What stands against a value once all tolerances count; that everything is met is told too, so that nobody has to wonder. */
export function widerRemark(text: string, rows: readonly RequirementResult[]): TemplateResult {
  const missed = rows.filter(({ met }) => !met);
  if (missed.length === 0) return html`<p class="met">Judged with all tolerances: everything is met at ${text} as well.</p>`;
  return html`<p class="not-met">Judged with all tolerances, as under Requirements: not met at ${text}.</p>
    <ul>${missed.map((row) => html`<li>${requirementWords(row)}: ${missWords(row)}</li>`)}</ul>`;
}

function missWords(row: RequirementResult): string {
  const how = row.judged ? standingWords(row) : verdictWords(row);
  const blank = row.unanswered === null ? '' : `; ${unansweredWords(row, ['corner', 'corners'])}`;
  return `${how}${row.at === null ? '' : ` at ${row.at.words}`}${blank}`;
}

/** What the figures carry at the best value: it can meet everything and still be more than can be made. */
export function cautionList(text: string, cautions: readonly string[]): TemplateResult | typeof nothing {
  if (cautions.length === 0) return nothing;
  return html`<p class="cautions">${cautions.length === 1 ? 'One caution' : `${cautions.length} cautions`} at ${text}:</p>
    <ul>${cautions.map((caution) => html`<li>${caution}</li>`)}</ul>`;
}
