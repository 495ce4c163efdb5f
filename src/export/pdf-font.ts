/**
 * Reading a TrueType font and cutting it down to the glyphs that a document shows. Source of the formats: OpenType specification 1.9, chapters cmap, glyf, head, hhea, hmtx,
 * loca, maxp.
 */

/** Font units per em, glyph numbers and advances. */
export interface TrueTypeFont {
  unitsPerEm: number;
  /** font units */ ascent: number;
  descent: number;
  /** left, bottom, right, top, font units */ box: [number, number, number, number];
  /** number of a character's glyph; 0 where the font has none */ glyphOf(codePoint: number): number;
  /** font units */ advanceOf(glyph: number): number;
  /** the font with these glyphs only, renumbered in their order with the empty-box glyph first; what they are composed of comes behind */
  subset(glyphs: readonly number[]): Uint8Array;
}

/** Tables that the hints of the glyphs refer to. */
const HINTS = ['cvt ', 'fpgm', 'prep'];

/** @throws {RangeError} no TrueType outlines in it */
export function readFont(file: Uint8Array): TrueTypeFont {
  // Node's own byte arrays share their memory with their slices; a plain one copies.
  const bytes = new Uint8Array(file.buffer, file.byteOffset, file.byteLength);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const tables = new Map<string, { at: number; length: number }>();
  for (let i = 0; i < view.getUint16(4); i++) {
    const row = 12 + 16 * i;
    tables.set(String.fromCharCode(...bytes.subarray(row, row + 4)), { at: view.getUint32(row + 8), length: view.getUint32(row + 12) });
  }
  const table = (tag: string): { at: number; length: number } => {
    const found = tables.get(tag);
    if (!found) throw new RangeError(`the font has no table ${tag.trim()}`);
    return found;
  };
  const [head, hhea, hmtx, loca, glyf] = ['head', 'hhea', 'hmtx', 'loca', 'glyf'].map(table);
  const glyphs = view.getUint16(table('maxp').at + 4);
  const advances = view.getUint16(hhea.at + 34);
  const long = view.getInt16(head.at + 50) === 1;
  const offset = (glyph: number): number => (long ? view.getUint32(loca.at + 4 * glyph) : 2 * view.getUint16(loca.at + 2 * glyph));
  const outline = (glyph: number): Uint8Array => bytes.subarray(glyf.at + offset(glyph), glyf.at + offset(glyph + 1));
  const advanceOf = (glyph: number): number => view.getUint16(hmtx.at + 4 * Math.min(glyph, advances - 1));
  const bearingOf = (glyph: number): number => (glyph < advances ? view.getInt16(hmtx.at + 4 * glyph + 2) : view.getInt16(hmtx.at + 4 * advances + 2 * (glyph - advances)));
  const map = characterMap(view, table('cmap').at);

  return {
    unitsPerEm: view.getUint16(head.at + 18),
    ascent: view.getInt16(hhea.at + 4),
    descent: view.getInt16(hhea.at + 6),
    box: [36, 38, 40, 42].map((at) => view.getInt16(head.at + at)) as [number, number, number, number],
    glyphOf: (codePoint) => {
      const glyph = map(codePoint);
      return glyph < glyphs ? glyph : 0;
    },
    advanceOf,
    subset(wanted) {
      const kept = [0, ...wanted];
      const numbers = new Map(kept.map((glyph, i) => [glyph, i]));
      const outlines: Uint8Array[] = [];
      // `kept` grows by the parts of composed glyphs as they are met.
      for (let i = 0; i < kept.length; i++) {
        outlines.push(withParts(outline(kept[i]), (part) => {
          if (!numbers.has(part)) numbers.set(part, kept.push(part) - 1);
          return numbers.get(part)!;
        }));
      }
      const metrics = new Uint8Array(4 * kept.length);
      const metricsView = new DataView(metrics.buffer);
      kept.forEach((glyph, i) => {
        metricsView.setUint16(4 * i, advanceOf(glyph));
        metricsView.setInt16(4 * i + 2, bearingOf(glyph));
      });
      const copied = (tag: string): Uint8Array => bytes.slice(table(tag).at, table(tag).at + table(tag).length);
      const places = new Uint8Array(4 * (outlines.length + 1));
      const padded = outlines.map((o) => o.length + ((4 - (o.length % 4)) % 4));
      padded.reduce((at, length, i) => {
        new DataView(places.buffer).setUint32(4 * (i + 1), at + length);
        return at + length;
      }, 0);
      const glyphData = new Uint8Array(padded.reduce((a, b) => a + b, 0));
      outlines.reduce((at, o, i) => {
        glyphData.set(o, at);
        return at + padded[i];
      }, 0);
      return fontFile([
        ...HINTS.filter((tag) => tables.has(tag)).map((tag): [string, Uint8Array] => [tag, copied(tag)]),
        ['glyf', glyphData],
        ['head', withUint16(copied('head'), 50, 1)],
        ['hhea', withUint16(copied('hhea'), 34, kept.length)],
        ['hmtx', metrics],
        ['loca', places],
        ['maxp', withUint16(copied('maxp'), 4, kept.length)],
      ]);
    },
  };
}

/** Character to glyph by the fullest Unicode subtable: format 12, else format 4. */
function characterMap(view: DataView, cmap: number): (codePoint: number) => number {
  let best: { at: number; format: number } | null = null;
  for (let i = 0; i < view.getUint16(cmap + 2); i++) {
    const platform = view.getUint16(cmap + 4 + 8 * i);
    const at = cmap + view.getUint32(cmap + 8 + 8 * i);
    const format = view.getUint16(at);
    if ((platform === 0 || platform === 3) && (format === 4 || format === 12) && format > (best?.format ?? 0)) best = { at, format };
  }
  if (!best) throw new RangeError('the font has no Unicode character map');
  const { at, format } = best;
  if (format === 12) {
    const groups = view.getUint32(at + 12);
    return (code) => {
      for (let g = 0; g < groups; g++) {
        const row = at + 16 + 12 * g;
        if (code >= view.getUint32(row) && code <= view.getUint32(row + 4)) return view.getUint32(row + 8) + code - view.getUint32(row);
      }
      return 0;
    };
  }
  const twice = view.getUint16(at + 6);
  return (code) => {
    for (let s = 0; s < twice; s += 2) {
      const end = view.getUint16(at + 14 + s);
      if (code > end) continue;
      const start = view.getUint16(at + 16 + twice + s);
      if (code < start) return 0;
      const delta = view.getUint16(at + 16 + 2 * twice + s);
      const place = at + 16 + 3 * twice + s;
      const range = view.getUint16(place);
      if (range === 0) return (code + delta) & 0xffff;
      const glyph = view.getUint16(place + range + 2 * (code - start));
      return glyph === 0 ? 0 : (glyph + delta) & 0xffff;
    }
    return 0;
  };
}

const [WORDS, SCALE, MORE, SCALE_XY, TWO_BY_TWO] = [0x0001, 0x0008, 0x0020, 0x0040, 0x0080];

/** An outline with the numbers of its parts replaced, if it is composed of others. */
function withParts(outline: Uint8Array, numberOf: (glyph: number) => number): Uint8Array {
  const copy = outline.slice();
  if (copy.length === 0) return copy;
  const view = new DataView(copy.buffer);
  if (view.getInt16(0) >= 0) return copy;
  for (let at = 10, flags = MORE; flags & MORE; ) {
    flags = view.getUint16(at);
    view.setUint16(at + 2, numberOf(view.getUint16(at + 2)));
    at += 4 + (flags & WORDS ? 4 : 2) + (flags & SCALE ? 2 : flags & SCALE_XY ? 4 : flags & TWO_BY_TWO ? 8 : 0);
  }
  return copy;
}

function withUint16(table: Uint8Array, at: number, value: number): Uint8Array {
  new DataView(table.buffer).setUint16(at, value);
  return table;
}

/** Tables in the order of their tags behind their directory, with checksums. */
function fontFile(tables: [string, Uint8Array][]): Uint8Array {
  const sorted = [...tables].sort(([a], [b]) => (a < b ? -1 : 1));
  const log = Math.floor(Math.log2(sorted.length));
  const padded = sorted.map(([, data]) => data.length + ((4 - (data.length % 4)) % 4));
  const out = new Uint8Array(12 + 16 * sorted.length + padded.reduce((a, b) => a + b, 0));
  const view = new DataView(out.buffer);
  view.setUint32(0, 0x00010000);
  [sorted.length, 16 * 2 ** log, log, 16 * (sorted.length - 2 ** log)].forEach((value, i) => view.setUint16(4 + 2 * i, value));
  let at = 12 + 16 * sorted.length;
  let headAt = 0;
  sorted.forEach(([tag, data], i) => {
    if (tag === 'head') {
      headAt = at;
      new DataView(data.buffer).setUint32(8, 0);
    }
    out.set(data, at);
    const row = 12 + 16 * i;
    [...tag].forEach((letter, c) => view.setUint8(row + c, letter.charCodeAt(0)));
    view.setUint32(row + 4, checksum(view, at, padded[i]));
    view.setUint32(row + 8, at);
    view.setUint32(row + 12, data.length);
    at += padded[i];
  });
  view.setUint32(headAt + 8, (0xb1b0afba - checksum(view, 0, out.length)) >>> 0);
  return out;
}

function checksum(view: DataView, from: number, length: number): number {
  let sum = 0;
  for (let at = from; at < from + length; at += 4) sum = (sum + view.getUint32(at)) >>> 0;
  return sum;
}
