/**
 * Throws unless the text is a well-formed XML document by the rules that our writer can break: one root, tags closed in order, attributes quoted and not repeated,
 * only the five named entities, every character a Char of XML 1.0. Returns the elements met, in order.
 */
export function wellFormed(xml: string): { name: string; attributes: Record<string, string> }[] {
  const elements: { name: string; attributes: Record<string, string> }[] = [];
  const open: string[] = [];
  let roots = 0;
  let i = 0;
  const fail = (why: string): never => {
    throw new Error(`${why} at ${i}: ${xml.slice(Math.max(0, i - 30), i + 30)}`);
  };
  const name = (): string => {
    const start = i;
    while (i < xml.length && /[A-Za-z0-9_:.-]/.test(xml[i])) i++;
    return i > start ? xml.slice(start, i) : fail('no name');
  };
  const spaces = (): boolean => {
    const start = i;
    while (/\s/.test(xml[i] ?? '')) i++;
    return i > start;
  };
  const text = (end: string): string => {
    let out = '';
    while (i < xml.length && xml[i] !== end) {
      const code = xml.codePointAt(i)!;
      const legal = code === 9 || code === 10 || code === 13 || (code >= 0x20 && code < 0xd800) || (code >= 0xe000 && code < 0xfffe) || code >= 0x10000;
      if (!legal) fail(`character ${code.toString(16)} is not allowed`);
      if (xml[i] === '<') fail('"<" in an attribute');
      if (xml[i] === '&') {
        const entity = ['&amp;', '&lt;', '&gt;', '&quot;', '&#39;'].find((e) => xml.startsWith(e, i)) ?? fail('unknown entity');
        out += { '&amp;': '&', '&lt;': '<', '&gt;': '>', '&quot;': '"', '&#39;': "'" }[entity];
        i += entity.length;
        continue;
      }
      const glyph = String.fromCodePoint(code);
      out += glyph;
      i += glyph.length;
    }
    return out;
  };
  while (i < xml.length) {
    const words = text('<');
    if (open.length === 0 && words.trim() !== '') fail('text outside the root');
    if (i >= xml.length) break;
    i++;
    if (xml[i] === '/') {
      i++;
      const closing = name();
      if (open.pop() !== closing || xml[i] !== '>') fail(`</${closing}> closes nothing`);
      i++;
      continue;
    }
    const element = { name: name(), attributes: {} as Record<string, string> };
    if (open.length === 0 && ++roots > 1) fail('a second root');
    while (spaces() && xml[i] !== '>' && xml[i] !== '/') {
      const key = name();
      if (xml[i] !== '=' || xml[i + 1] !== '"') fail('attribute without a quoted value');
      if (Object.hasOwn(element.attributes, key)) fail(`${key} twice`);
      i += 2;
      element.attributes[key] = text('"');
      if (xml[i] !== '"') fail('no closing quote');
      i++;
    }
    elements.push(element);
    if (xml.startsWith('/>', i)) i += 2;
    else if (xml[i] === '>') {
      open.push(element.name);
      i++;
    } else fail('no end of the tag');
  }
  if (open.length > 0 || roots !== 1) fail(`not closed: ${open.join(', ')}`);
  return elements;
}
