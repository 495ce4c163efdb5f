/**
 * Text as it may stand on paper: breaks and tabs become spaces; controls, lone surrogates, the two characters that are none, and those that turn the direction of what
 * follows, by which a name could rewrite the label beside it, are left out. The same are left out of SVG files.
 */
export function printable(text: string): string {
  let out = '';
  for (const glyph of text) {
    const code = glyph.codePointAt(0)!;
    if (glyph === '\t' || glyph === '\n' || glyph === '\r' || code === 0x2028 || code === 0x2029) out += ' ';
    else if (code < 0x20 || (code >= 0x7f && code < 0xa0) || (code >= 0xd800 && code < 0xe000) || code === 0xfffe || code === 0xffff) continue;
    else if (code === 0x200e || code === 0x200f || (code >= 0x202a && code <= 0x202e) || (code >= 0x2066 && code <= 0x2069)) continue;
    else out += glyph;
  }
  return out;
}
