import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';
import { zlibSync } from 'fflate';

/**
 * The objects of a PDF file and their table of places (ISO 32000-1:2008, 7.3 to 7.5). No clock and no machine enters: streams are compressed by a library of our own choice, since
 * the built-in compressors differ from one machine to the next, and the file's identifier is the hash of its content.
 */
export class PdfObjects {
  private readonly bodies: (Uint8Array | null)[] = [];

  /** Number of an object whose body comes later. */
  reserve(): number {
    return this.bodies.push(null);
  }

  set(number: number, body: string): void {
    this.bodies[number - 1] = latin(body);
  }

  add(body: string): number {
    const number = this.reserve();
    this.set(number, body);
    return number;
  }

  /** @param entries  of its dictionary besides length and filter, "/Type /XObject" */
  stream(content: string | Uint8Array, entries = ''): number {
    const packed = zlibSync(typeof content === 'string' ? latin(content) : content, { level: 9 });
    const number = this.reserve();
    this.bodies[number - 1] = joined([latin(`<< ${entries} /Filter /FlateDecode /Length ${packed.length} >>\nstream\n`), packed, latin('\nendstream')]);
    return number;
  }

  file(root: number, info: number): Uint8Array {
    // The second line tells programs that carry files that this one is not text.
    const parts: Uint8Array[] = [latin('%PDF-1.7\n'), new Uint8Array([0x25, 0xe2, 0xe3, 0xcf, 0xd3, 0x0a])];
    let at = parts[0].length + parts[1].length;
    const places: number[] = [];
    this.bodies.forEach((body, i) => {
      if (!body) throw new Error(`object ${i + 1} of the PDF has no body`);
      const part = joined([latin(`${i + 1} 0 obj\n`), body, latin('\nendobj\n')]);
      places.push(at);
      parts.push(part);
      at += part.length;
    });
    const id = bytesToHex(sha256(joined(parts))).slice(0, 32);
    const rows = places.map((place) => `${String(place).padStart(10, '0')} 00000 n \n`).join('');
    parts.push(latin(`xref\n0 ${places.length + 1}\n0000000000 65535 f \n${rows}trailer\n<< /Size ${places.length + 1} /Root ${root} 0 R /Info ${info} 0 R /ID [<${id}> <${id}>] >>\nstartxref\n${at}\n%%EOF\n`));
    return joined(parts);
  }
}

/** Text of a document's properties, as UTF-16 with its mark. */
export function pdfText(text: string): string {
  let hex = 'FEFF';
  for (let i = 0; i < text.length; i++) hex += text.charCodeAt(i).toString(16).padStart(4, '0').toUpperCase();
  return `<${hex}>`;
}

/** A number as PDF writes it: no exponent, no needless digits. */
export function pdfNumber(value: number, decimals = 3): string {
  if (!Number.isFinite(value)) throw new RangeError(`no number for a PDF: ${value}`);
  const text = value.toFixed(decimals);
  return (text.includes('.') ? text.replace(/\.?0+$/, '') : text).replace(/^-0$/, '0');
}

function latin(text: string): Uint8Array {
  const out = new Uint8Array(text.length);
  for (let i = 0; i < text.length; i++) out[i] = text.charCodeAt(i);
  return out;
}

function joined(parts: Uint8Array[]): Uint8Array {
  const out = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}
