import { html, nothing, type TemplateResult } from 'lit';
import type { Distribution } from '../../src/tolerance/draw.ts';
import type { InputRow } from '../../src/tolerance/input-rows.ts';
import type { InputChoice } from '../../src/tolerance/inputs.ts';
import '../hm-field/hm-field.ts';

/** What a person does to a row. */
export interface RowWishes {
  /** another tolerance; null: what it was without this run's */ tolerance(row: InputRow, text: string | null): void;
  distribution(row: InputRow, distribution: Distribution | null): void;
}

/** What the run will move, a row each: its tolerance as a field, its ends, and how it is drawn. */
export function inputTable(rows: readonly InputRow[], distribution: Distribution, complaints: ReadonlyMap<string, string>, wishes: RowWishes): TemplateResult {
  const changed = rows.filter((row) => row.changed || row.distribution !== null).length;
  const wrong = rows.some((row) => (row.complaint ?? complaints.get(row.label) ?? null) !== null);
  return html`<details ?open=${wrong}>
    <summary>What is drawn: ${rows.length} input${rows.length === 1 ? '' : 's'}${changed > 0 ? `, ${changed} changed for this run` : ''}</summary>
    <div class="scroll" role="region" aria-label="Inputs of the tolerance run" tabindex="0">
      <table class="inputs">
        <thead><tr><th scope="col">Input</th><th scope="col" class="words">Tolerance, to both sides</th><th scope="col" class="words">From, to</th><th scope="col" class="words">Drawn</th></tr></thead>
        <tbody>${rows.map((row) => inputRow(row, distribution, row.complaint ?? complaints.get(row.label) ?? null, wishes))}</tbody>
      </table>
    </div>
    <p class="doc">A variable's tolerance is the design's own; that of any other row holds for this run only. "0 %" leaves an input where it is.</p>
  </details>`;
}

function inputRow(row: InputRow, distribution: Distribution, complaint: string | null, wishes: RowWishes): TemplateResult {
  const { label, variable, tolerance, changed, usual, span } = row;
  return html`<tr>
    <th scope="row">${label}</th>
    <td class=${complaint === null ? 'words' : 'words refused'}>
      <hm-field label-hidden label="Tolerance of ${label}" .value=${tolerance} .complaint=${complaint} @field-accept=${(e: CustomEvent<string>) => wishes.tolerance(row, e.detail.trim() === '' ? null : e.detail)}></hm-field>
      <span class="doc">${variable !== null ? 'stated' : changed ? html`this run <button type="button" aria-label="Tolerance of ${label} back to ${usual}" @click=${() => wishes.tolerance(row, null)}>back to ${usual}</button>` : 'usual'}</span>
    </td>
    <td class="words">${complaint !== null ? '–' : span === null ? 'stays where it is' : `${span[0]} to ${span[1]}`}</td>
    <td class="words">
      <select aria-label="How ${label} is drawn" @change=${(e: Event) => wishes.distribution(row, chosen((e.target as HTMLSelectElement).value))}>
        <option value="" .selected=${row.distribution === null}>${distribution}, as above</option>
        <option value="normal" .selected=${row.distribution === 'normal'}>normal</option>
        <option value="uniform" .selected=${row.distribution === 'uniform'}>uniform</option>
      </select>
    </td>
  </tr>`;
}

const chosen = (value: string): Distribution | null => (value === 'normal' || value === 'uniform' ? value : null);

/** The remembered choices with one changed; a choice without content goes. */
export function withChoice(choices: Readonly<Record<string, InputChoice>>, label: string, change: { tolerance?: string | null; distribution?: Distribution | null }): Record<string, InputChoice> {
  const { [label]: before = {}, ...rest } = choices;
  const after: InputChoice = { ...before };
  if (change.tolerance === null) delete after.tolerance;
  else if (change.tolerance !== undefined) after.tolerance = change.tolerance;
  if (change.distribution === null) delete after.distribution;
  else if (change.distribution !== undefined) after.distribution = change.distribution;
  return Object.keys(after).length === 0 ? rest : { ...rest, [label]: after };
}

/** Figures that a person added to the usual ones, and a menu of the others. */
export function addedFigures(all: readonly { path: string; words: string; unit: string }[], usual: ReadonlySet<string>, added: readonly string[], complaint: string | null, change: (added: string[]) => void): TemplateResult {
  const byPath = new Map(all.map((figure) => [figure.path, figure]));
  const others = all.filter(({ path }) => !usual.has(path) && !added.includes(path));
  return html`<div class="row">
    <span>Figures: the usual ones${added.length > 0 ? ', and' : ''}</span>
    ${added.length === 0 ? nothing : html`<ul class="figures" aria-label="Figures added">${added.map((path) => html`<li><button type="button" aria-label="Leave out ${byPath.get(path)?.words}" @click=${() => change(added.filter((other) => other !== path))}>${byPath.get(path)?.words} <span aria-hidden="true">×</span></button></li>`)}</ul>`}
    <label>add a figure <select class="add" @change=${(e: Event) => {
      const menu = e.target as HTMLSelectElement;
      if (menu.value !== '') change([...added, menu.value]);
      menu.value = '';
    }}>
      <option value="" selected>choose</option>
      ${others.map(({ path, words, unit }) => html`<option value=${path}>${words}${unit === '' ? '' : ` (${unit})`}</option>`)}
    </select></label>
    ${complaint === null ? nothing : html`<span class="wrong">${complaint}</span>`}
  </div>`;
}
