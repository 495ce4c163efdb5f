/**
 * The part of Markdown that the help pages are written in, read into blocks. Whatever is not understood stays text: nothing of a page becomes code or a foreign element.
 */
export type Inline = { kind: 'text' | 'code' | 'strong'; text: string } | { kind: 'link'; text: string; to: string };
export type Block =
  | { kind: 'heading'; level: number; text: Inline[] }
  | { kind: 'paragraph'; text: Inline[] }
  | { kind: 'list'; ordered: boolean; items: Inline[][] }
  | { kind: 'code'; text: string }
  | { kind: 'picture'; words: string; file: string }
  | { kind: 'table'; head: Inline[][]; rows: Inline[][][] };

export function readMarkdown(source: string): Block[] {
  const lines = source.replace(/\r/g, '').split('\n');
  const blocks: Block[] = [];
  let at = 0;
  /** Lines from here on, as long as they fit. */
  const take = (fits: (line: string) => boolean): string[] => {
    const from = at;
    while (at < lines.length && fits(lines[at])) at++;
    return lines.slice(from, at);
  };
  while (at < lines.length) {
    const line = lines[at];
    const heading = /^(#{1,4}) (.+)$/.exec(line);
    const picture = /^!\[([^\]]*)\]\(([^)]+)\)$/.exec(line);
    if (line.trim() === '') at++;
    else if (line.startsWith('```')) {
      at++;
      blocks.push({ kind: 'code', text: take((l) => !l.startsWith('```')).join('\n') });
      at++;
    } else if (heading) {
      blocks.push({ kind: 'heading', level: heading[1].length, text: inline(heading[2]) });
      at++;
    } else if (picture) {
      blocks.push({ kind: 'picture', words: picture[1], file: picture[2] });
      at++;
    } else if (line.startsWith('|')) {
      const [head, , ...rows] = take((l) => l.startsWith('|')).map((l) => l.replace(/^\||\|\s*$/g, '').split('|').map((cell) => inline(cell.trim())));
      blocks.push({ kind: 'table', head, rows });
    } else if (ITEM.test(line)) {
      const ordered = /^\d/.test(line);
      blocks.push({ kind: 'list', ordered, items: take((l) => ITEM.test(l)).map((l) => inline(l.replace(ITEM, ''))) });
    } else blocks.push({ kind: 'paragraph', text: inline(take((l) => l.trim() !== '' && !STARTS.test(l)).join(' ')) });
  }
  return blocks;
}

const ITEM = /^(?:- |\d+\. )/;
/** A line that ends a paragraph. */
const STARTS = /^(?:```|#{1,4} |!\[|\||- |\d+\. )/;

/** `code`, **strong** and [words](place); the rest is text. */
export function inline(text: string): Inline[] {
  const parts: Inline[] = [];
  let from = 0;
  for (const found of text.matchAll(/`([^`]+)`|\*\*([^*]+)\*\*|\[([^\]]+)\]\(([^)\s]+)\)/g)) {
    if (found.index > from) parts.push({ kind: 'text', text: text.slice(from, found.index) });
    if (found[1] !== undefined) parts.push({ kind: 'code', text: found[1] });
    else if (found[2] !== undefined) parts.push({ kind: 'strong', text: found[2] });
    else parts.push({ kind: 'link', text: found[3], to: found[4] });
    from = found.index + found[0].length;
  }
  if (from < text.length) parts.push({ kind: 'text', text: text.slice(from) });
  return parts;
}
