import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { inflateSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { markSvg } from '../../src/offline/mark.ts';
import { markPixels, markPng } from '../../src/tools/icon-png.ts';

const at = (pixels: Uint8Array, side: number, column: number, row: number): number[] => [...pixels.subarray(3 * (row * side + column), 3 * (row * side + column) + 3)];

describe('the mark', () => {
  it('is what the page shows as its icon', () => {
    expect(readFileSync(join(import.meta.dirname, '../../components/shared/icon.svg'), 'utf8')).toBe(markSvg());
  });

  it('is filled to the half, with the level across, in the colours of the palette', () => {
    const pixels = markPixels(320);
    expect(at(pixels, 320, 0, 0)).toEqual([0xfb, 0xfa, 0xf6]);
    expect(at(pixels, 320, 160, 80)).toEqual([0xfb, 0xfa, 0xf6]);
    expect(at(pixels, 320, 160, 240)).toEqual([0x5b, 0x3f, 0xa8]);
    expect(at(pixels, 320, 150, 160)).toEqual([0x1f, 0x24, 0x30]);
    expect(at(pixels, 320, 100, 152)).toEqual([0xfb, 0xfa, 0xf6]);
  });

  it('covers the same area at any size: edges between pixels are mixed, not moved', () => {
    const darkness = (side: number): number => markPixels(side).reduce((sum, value) => sum + (255 - value), 0) / side ** 2;
    // Rounding to whole values is half a step a pixel at most, and evens out.
    for (const side of [32, 47, 192]) expect(Math.abs(darkness(side) / darkness(320) - 1)).toBeLessThan(2e-3);
  });

  it('keeps to the middle where a system cuts icons to a shape of its own', () => {
    const side = 100;
    const pixels = markPixels(side, 0.6);
    for (let row = 0; row < side; row++) {
      for (let column = 0; column < side; column++) {
        if (Math.hypot(column + 0.5 - side / 2, row + 0.5 - side / 2) > 0.4 * side) expect(at(pixels, side, column, row)).toEqual([0xfb, 0xfa, 0xf6]);
      }
    }
  });

  it('is a PNG file that holds these pixels', () => {
    const png = Buffer.from(markPng(48));
    expect([...png.subarray(0, 8)]).toEqual([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10]);
    expect(png.readUInt32BE(16)).toBe(48);
    const length = png.readUInt32BE(33);
    expect(png.toString('latin1', 37, 41)).toBe('IDAT');
    const rows = inflateSync(png.subarray(41, 41 + length));
    const pixels = Buffer.concat(Array.from({ length: 48 }, (_, row) => rows.subarray(row * 145 + 1, (row + 1) * 145)));
    expect(pixels.equals(markPixels(48))).toBe(true);
  });
});
