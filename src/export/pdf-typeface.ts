import { readFont, type TrueTypeFont } from './pdf-font.ts';
import { pdfNumber, type PdfObjects } from './pdf-objects.ts';

/** Code points in one block of a ToUnicode map. */
const ROWS = 100;

/**
 * One face of a document: hands out a code for every character that is shown, and writes itself with the glyphs of those. Codes go by characters, not by glyphs, so that a
 * character without a glyph in the face, shown as an empty box, can still be searched and copied.
 */
export class PdfTypeface {
  private readonly font: TrueTypeFont;
  private readonly codes = new Map<number, number>();

  /** @param name  of the font, without spaces */
  constructor(file: Uint8Array, private readonly name: string) {
    this.font = readFont(file);
  }

  /** Hexadecimal codes of a text, for `Tj`. */
  coded(text: string): string {
    let hex = '';
    for (const character of text) {
      const point = character.codePointAt(0)!;
      let code = this.codes.get(point);
      if (code === undefined) this.codes.set(point, (code = this.codes.size + 1));
      hex += fourDigits(code);
    }
    return `<${hex}>`;
  }

  /** Width of a text, of the font size. */
  width(text: string): number {
    let sum = 0;
    for (const character of text) sum += this.font.advanceOf(this.font.glyphOf(character.codePointAt(0)!));
    return sum / this.font.unitsPerEm;
  }

  /** Writes the face into a file. @returns number of its object */
  write(objects: PdfObjects): number {
    const { font } = this;
    const points = [...this.codes.keys()];
    const glyphs = [...new Set(points.map((p) => font.glyphOf(p)))].filter((g) => g !== 0);
    const thousandths = (units: number): string => pdfNumber((1000 * units) / font.unitsPerEm, 0);
    const subset = font.subset(glyphs);
    const file = objects.stream(subset, `/Length1 ${subset.length}`);
    // The tag in front of a subset's name must differ between subsets; it is made of what is in it.
    const name = `${tagOf(points)}+${this.name}`;
    const descriptor = objects.add(
      `<< /Type /FontDescriptor /FontName /${name} /Flags 4 /FontBBox [${font.box.map(thousandths).join(' ')}] /ItalicAngle 0 /Ascent ${thousandths(font.ascent)} /Descent ${thousandths(font.descent)} /CapHeight 729 /StemV 80 /FontFile2 ${file} 0 R >>`,
    );
    const toGlyph = new Uint8Array(2 * (points.length + 1));
    points.forEach((point, i) => new DataView(toGlyph.buffer).setUint16(2 * (i + 1), glyphs.indexOf(font.glyphOf(point)) + 1));
    const widths = points.map((point) => thousandths(font.advanceOf(font.glyphOf(point)))).join(' ');
    const descendant = objects.add(
      `<< /Type /Font /Subtype /CIDFontType2 /BaseFont /${name} /CIDSystemInfo << /Registry (Adobe) /Ordering (Identity) /Supplement 0 >> /FontDescriptor ${descriptor} 0 R /W [1 [${widths}]] /CIDToGIDMap ${objects.stream(toGlyph)} 0 R >>`,
    );
    return objects.add(`<< /Type /Font /Subtype /Type0 /BaseFont /${name} /Encoding /Identity-H /DescendantFonts [${descendant} 0 R] /ToUnicode ${objects.stream(toUnicode(points))} 0 R >>`);
  }
}

/** Map of codes to characters (Adobe technical note 5411). */
function toUnicode(points: number[]): string {
  const rows = points.map((point, i) => `<${fourDigits(i + 1)}> <${[...String.fromCodePoint(point)].flatMap((c) => c.split('')).map((unit) => fourDigits(unit.charCodeAt(0))).join('')}>`);
  const blocks: string[] = [];
  for (let i = 0; i < rows.length; i += ROWS) {
    const part = rows.slice(i, i + ROWS);
    blocks.push(`${part.length} beginbfchar\n${part.join('\n')}\nendbfchar`);
  }
  return `/CIDInit /ProcSet findresource begin
12 dict begin
begincmap
/CIDSystemInfo << /Registry (Adobe) /Ordering (UCS) /Supplement 0 >> def
/CMapName /Adobe-Identity-UCS def
/CMapType 2 def
1 begincodespacerange
<0000> <FFFF>
endcodespacerange
${blocks.join('\n')}
endcmap
CMapName currentdict /CMap defineresource pop
end
end
`;
}

function fourDigits(value: number): string {
  return value.toString(16).padStart(4, '0').toUpperCase();
}

/** Six capitals. */
function tagOf(points: number[]): string {
  let sum = 0;
  for (const point of points) sum = (Math.imul(sum, 31) + point) >>> 0;
  let tag = '';
  for (let i = 0; i < 6; i++) {
    tag += String.fromCharCode(65 + (sum % 26));
    sum = Math.floor(sum / 26);
  }
  return tag;
}
