import { describe, expect, it } from 'vitest';
import { printedUnits } from '../../src/quantity/printed-units.ts';
import { brokenLines, heldTogether, lineWidth, oneLine } from '../../src/sheet/lines.ts';

describe('lines of a text', () => {
  it('break at spaces and none is wider than the room', () => {
    const lines = brokenLines('one two three four five six seven eight nine ten', 10, 80);
    expect(lines.length).toBeGreaterThan(2);
    for (const line of lines) expect(lineWidth(line, 10)).toBeLessThanOrEqual(80);
    expect(lines.join(' ')).toBe('one two three four five six seven eight nine ten');
  });

  it('break a word that is wider than the room, first behind its hyphens and slashes', () => {
    expect(brokenLines('modulation-doped/channel', 10, 75)).toEqual(['modulation-', 'doped/channel']);
    const hash = 'sha256:0123456789abcdef0123456789abcdef';
    const lines = brokenLines(hash, 10, 60);
    expect(lines.join('')).toBe(hash);
    for (const line of lines) expect(lineWidth(line, 10)).toBeLessThanOrEqual(60);
  });

  it('keep a number with its unit and its sign', () => {
    for (let room = 30; room < 120; room += 5) {
      for (const line of brokenLines('limit ≤ 30 nm or 2 cm²/(V s) at 77 K', 10, room)) {
        if (room > 75) expect(line).not.toMatch(/(^| )(30|2|77)$|^(nm|K|s\))|≤$/);
        expect(line).not.toContain('\u00a0');
      }
    }
  });

  it('end in an ellipsis where there are more than may be', () => {
    const lines = brokenLines('word '.repeat(100), 10, 80, 3);
    expect(lines).toHaveLength(3);
    expect(lines[2].endsWith('…')).toBe(true);
    expect(lineWidth(lines[2], 10)).toBeLessThanOrEqual(80);
    expect(oneLine('a very long title that cannot fit', 10, 60)).toMatch(/…$/);
    expect(oneLine('short', 10, 60)).toBe('short');
  });

  it('leave out what could deceive or break a reader', () => {
    expect(brokenLines('a\u202eb\u0000c\td', 10, 500)).toEqual(['abc d']);
  });
});

describe('a typed quantity in print', () => {
  it('has raised exponents, a real minus, and the signs of its units', () => {
    expect(printedUnits('1e+19 cm^-3')).toBe('1e19 cm⁻³');
    expect(printedUnits('9400 cm^2/(V s)')).toBe('9400 cm²/(V s)');
    expect(printedUnits('0.2 um')).toBe('0.2 µm');
    expect(printedUnits('1e-6 ohm cm^2')).toBe('1e−6 Ω cm²');
    expect(printedUnits('-40 degC')).toBe('−40 °C');
    expect(printedUnits('(m_hh^1.5 + m_lh^1.5)^(2/3)')).toBe('(m_hh^1.5 + m_lh^1.5)^(2/3)');
    expect(printedUnits('Ncap-2')).toBe('Ncap-2');
    expect(printedUnits('It was 1e17 cm^-3.')).toBe('It was 1e17 cm⁻³.');
  });

  it('keeps a heading of two symbols on one line', () => {
    expect(brokenLines(heldTogether('Textbook Ec − EF'), 10, lineWidth('Textbook Ec', 10))).toEqual(['Textbook', 'Ec − EF']);
  });
});
