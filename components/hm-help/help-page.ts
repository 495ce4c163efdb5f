import { html, nothing, type TemplateResult } from 'lit';
import type { Block, Inline } from '../../src/help/markdown.ts';
import { HELP_PICTURES } from '../../src/help/pages.ts';

/** The blocks of a help page as elements. A link to another page of the help goes there; anything but those is shown as its words. */
export function helpPage(blocks: readonly Block[], known: (file: string) => boolean, go: (file: string) => void): TemplateResult[] {
  const words = (parts: readonly Inline[]): unknown[] =>
    parts.map((part) => {
      if (part.kind === 'code') return html`<code>${part.text}</code>`;
      if (part.kind === 'strong') return html`<strong>${part.text}</strong>`;
      if (part.kind === 'link' && known(part.to)) return html`<button type="button" class="go" @click=${() => go(part.to)}>${part.text}</button>`;
      return part.text;
    });
  return blocks.map((block) => {
    switch (block.kind) {
      case 'heading':
        return block.level === 1 ? html`<h3 tabindex="-1">${words(block.text)}</h3>` : html`<h4>${words(block.text)}</h4>`;
      case 'paragraph':
        return html`<p>${words(block.text)}</p>`;
      case 'list': {
        const items = block.items.map((item) => html`<li>${words(item)}</li>`);
        return block.ordered ? html`<ol>${items}</ol>` : html`<ul>${items}</ul>`;
      }
      case 'code':
        return html`<pre tabindex="0" role="group" aria-label="Equations">${block.text}</pre>`;
      case 'picture':
        return html`${block.file in HELP_PICTURES ? html`<img src=${HELP_PICTURES[block.file]} alt=${block.words} loading="lazy" />` : nothing}`;
      case 'table':
        return html`<div class="table" tabindex="0" role="group" aria-label="Table"><table>
          <thead><tr>${block.head.map((cell) => html`<th scope="col">${words(cell)}</th>`)}</tr></thead>
          <tbody>${block.rows.map((row) => html`<tr>${row.map((cell) => html`<td>${words(cell)}</td>`)}</tr>`)}</tbody>
        </table></div>`;
    }
  });
}
