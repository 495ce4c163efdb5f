import { inflateSync } from 'node:zlib';

/** A text on a page, as a reader of PDF finds it: pt, y up. */
export interface FoundText {
  text: string;
  x: number;
  y: number;
}

export interface FoundPage {
  width: number;
  height: number;
  texts: FoundText[];
  content: string;
}

/** Objects of a PDF by number, from its table of places; fails where a place is wrong. */
export function objectsOf(bytes: Uint8Array): Map<number, { body: string; stream: Buffer | null }> {
  const file = Buffer.from(bytes);
  const text = file.toString('latin1');
  const start = Number(/startxref\s+(\d+)\s+%%EOF\s*$/.exec(text)![1]);
  const table = /^xref\n0 (\d+)\n((?:\d{10} \d{5} [nf] \n)+)trailer/.exec(text.slice(start))!;
  const rows = table[2].trimEnd().split('\n');
  if (rows.length !== Number(table[1])) throw new Error('the table of places is not as long as it says');
  const out = new Map<number, { body: string; stream: Buffer | null }>();
  rows.forEach((row, number) => {
    if (number === 0) return;
    const at = Number(row.slice(0, 10));
    const head = `${number} 0 obj\n`;
    if (!text.startsWith(head, at)) throw new Error(`object ${number} is not where the table says`);
    const length = /\/Length (\d+) >>\nstream\n/.exec(text.slice(at, at + 4000));
    const streamAt = text.indexOf('stream\n', at);
    const end = text.indexOf('endobj', at);
    if (length && streamAt >= 0 && streamAt < end) {
      const from = streamAt + 'stream\n'.length;
      out.set(number, { body: text.slice(at + head.length, streamAt), stream: inflateSync(file.subarray(from, from + Number(length[1]))) });
    } else out.set(number, { body: text.slice(at + head.length, end), stream: null });
  });
  return out;
}

/** Pages with their texts, read through each font's own map from codes to characters. */
export function readPdf(bytes: Uint8Array): FoundPage[] {
  const objects = objectsOf(bytes);
  const get = (number: string | number) => objects.get(Number(number))!;
  const root = get(/\/Root (\d+) 0 R/.exec(Buffer.from(bytes).toString('latin1'))![1]);
  const tree = get(/\/Pages (\d+) 0 R/.exec(root.body)![1]);
  const kids = [...tree.body.matchAll(/(\d+) 0 R/g)].map((m) => get(m[1]));
  return kids.map((page) => {
    const [, width, height] = /\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec(page.body)!;
    const maps = new Map([...page.body.matchAll(/\/(F\d) (\d+) 0 R/g)].map(([, name, number]) => [name, mapOf(get(/\/ToUnicode (\d+) 0 R/.exec(get(number).body)![1]).stream!.toString('latin1'))]));
    const content = get(/\/Contents (\d+) 0 R/.exec(page.body)![1]).stream!.toString('latin1');
    const texts: FoundText[] = [];
    const mark = /\/(F\d) [\d.]+ Tf\n(\S+) (\S+) (\S+) (\S+) (\S+) (\S+) Tm\n<([0-9A-F]*)> Tj/g;
    for (const [, font, , , , , x, y, codes] of content.matchAll(mark)) {
      texts.push({ text: (codes.match(/.{4}/g) ?? []).map((code) => maps.get(font)!.get(code) ?? '\ufffd').join(''), x: 0.75 * Number(x), y: Number(height) - 0.75 * Number(y) });
    }
    return { width: Number(width), height: Number(height), texts, content };
  });
}

function mapOf(cmap: string): Map<string, string> {
  return new Map([...cmap.matchAll(/^<([0-9A-F]{4})> <([0-9A-F]+)>$/gm)].map(([, code, units]) => [code, String.fromCharCode(...units.match(/.{4}/g)!.map((unit) => Number.parseInt(unit, 16)))]));
}

/** An element with what it holds: further elements, or its words; of a figure the words that stand for it. */
export type Told = [type: string, content: string | Told[]];

/** The tree of a tagged PDF, its words read from the marked pieces of the pages; fails where a piece's page and the tree do not agree. */
export function structureOf(bytes: Uint8Array): Told[] {
  const objects = objectsOf(bytes);
  const body = (number: string): string => objects.get(Number(number))!.body;
  const root = body(/\/Root (\d+) 0 R/.exec(Buffer.from(bytes).toString('latin1'))![1]);
  const tree = body(/\/StructTreeRoot (\d+) 0 R/.exec(root)![1]);
  const parents = new Map([...tree.matchAll(/(\d+) \[((?:\d+ 0 R ?)*)\]/g)].map(([, page, list]) => [Number(page), [...list.matchAll(/(\d+) 0 R/g)].map((m) => m[1])]));
  const told = (number: string): Told => {
    const element = body(number);
    const type = /\/S \/(\w+)/.exec(element)![1];
    const alt = /\/Alt <FEFF([0-9A-F]*)>/.exec(element);
    if (alt) return [type, alt[1].match(/.{4}/g)!.map((unit) => String.fromCharCode(Number.parseInt(unit, 16))).join('')];
    const kids = /\/K \[([^\]]*)\]/.exec(element)?.[1] ?? '';
    const elements = [...kids.matchAll(/(\d+) 0 R/g)].map((m) => told(m[1]));
    if (elements.length > 0) return [type, elements];
    const page = /\/Pg (\d+) 0 R/.exec(element)?.[1];
    if (page === undefined) return [type, ''];
    const words = kids.trim().split(/ +/).map((mark) => {
      const index = Number(/\/StructParents (\d+)/.exec(body(page))![1]);
      if (parents.get(index)?.[Number(mark)] !== number) throw new Error(`mark ${mark} of page ${index} is of another element`);
      return markedText(objects, page, Number(mark));
    });
    return [type, words.join('')];
  };
  const [, document] = told(/\/K \[(\d+) 0 R\]/.exec(tree)![1]);
  return document as Told[];
}

function markedText(objects: ReturnType<typeof objectsOf>, page: string, mark: number): string {
  const { body } = objects.get(Number(page))!;
  const content = objects.get(Number(/\/Contents (\d+) 0 R/.exec(body)![1]))!.stream!.toString('latin1');
  const piece = new RegExp(`/\\w+ << /MCID ${mark} >> BDC\\n([^]*?)EMC\\n`).exec(content)![1];
  const maps = new Map([...body.matchAll(/\/(F\d) (\d+) 0 R/g)].map(([, name, number]) => [name, mapOf(objects.get(Number(/\/ToUnicode (\d+) 0 R/.exec(objects.get(Number(number))!.body)![1]))!.stream!.toString('latin1'))]));
  let font = '';
  let text = '';
  for (const [, name, codes] of piece.matchAll(/\/(F\d) [\d.]+ Tf|<([0-9A-F]*)> Tj/g)) {
    if (name !== undefined) font = name;
    else text += (codes.match(/.{4}/g) ?? []).map((code) => maps.get(font)!.get(code) ?? '\ufffd').join('');
  }
  return text;
}
