import type { Paper } from '../../src/sheet/look.ts';

/** Of the printed page, mm; a hair less than the paper, so that no rounding makes an empty page between two. */
const SIZES: Record<Paper, [width: number, height: number]> = { A4: [297, 209.8], letter: [279.4, 215.7] };

/**
 * Prints SVG pages, one a sheet of paper, from this very document: its own content stands aside while it is printed. No window is opened, so that no browser blocks it.
 *
 * @param pages  well-formed SVG files
 */
export function printPages(pages: readonly string[], paper: Paper): void {
  const [width, height] = SIZES[paper];
  const look = new CSSStyleSheet();
  look.replaceSync(`
    @page { size: ${paper} landscape; margin: 0; }
    .hm-printed { display: none; }
    @media print {
      html, body { margin: 0 !important; padding: 0 !important; background: none !important; }
      body > :not(.hm-printed) { display: none !important; }
      .hm-printed { display: block; }
      .hm-printed > div { width: ${width}mm; height: ${height}mm; overflow: hidden; break-after: page; print-color-adjust: exact; -webkit-print-color-adjust: exact; }
      .hm-printed > div:last-child { break-after: auto; }
      .hm-printed svg { display: block; }
    }`);
  const holder = document.createElement('div');
  holder.className = 'hm-printed';
  // Read as XML, not as markup of the page: what a name holds stays text.
  for (const text of pages) {
    const svg = document.importNode(new DOMParser().parseFromString(text, 'image/svg+xml').documentElement, true);
    svg.setAttribute('width', '100%');
    svg.setAttribute('height', '100%');
    const page = document.createElement('div');
    page.append(svg);
    holder.append(page);
  }
  document.adoptedStyleSheets.push(look);
  document.body.append(holder);
  const clear = (): void => {
    holder.remove();
    document.adoptedStyleSheets = document.adoptedStyleSheets.filter((sheet) => sheet !== look);
  };
  window.addEventListener('afterprint', clear, { once: true });
  try {
    window.print();
  } catch (error) {
    clear();
    throw error;
  }
}
