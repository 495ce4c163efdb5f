import { crc32, deflateSync } from 'node:zlib';
import { MARK_SIDE, markParts } from '../offline/mark.ts';
import { styleOf } from '../drawing/styles.ts';

const channels = (colour: string): number[] => [1, 3, 5].map((i) => Number.parseInt(colour.slice(i, i + 2), 16));

/** How much of the pixel from `at` to `at + 1` lies between two edges, 0..1. */
const covered = (at: number, from: number, to: number): number => Math.max(0, Math.min(at + 1, to) - Math.max(at, from));

/**
 * The mark as a picture, RGB row by row. Rectangles on whole axes are antialiased exactly: by the share of each pixel that they cover.
 * @param side  px
 * @param share  of the side that the mark takes; the rest is ground. Systems that cut icons to a shape of their own keep the middle 80 % (W3C, Web Application Manifest, "maskable").
 */
export function markPixels(side: number, share = 1): Uint8Array {
  const scale = (side * share) / MARK_SIDE;
  const offset = (side * (1 - share)) / 2;
  const ground = channels(styleOf('light').ground);
  const pixels = Float32Array.from({ length: side * side * 3 }, (_, i) => ground[i % 3]);
  const parts = markParts();
  const edges = (list: number[]): number[] => [...new Set(list)].sort((a, b) => a - b);
  const columns = edges(parts.flatMap(({ x, width }) => [x, x + width]));
  const rows = edges(parts.flatMap(({ y, height }) => [y, y + height]));
  // All edges together cut the picture into cells of one colour each, which do not overlap: their shares of a pixel add up.
  for (let i = 0; i + 1 < columns.length; i++) {
    for (let j = 0; j + 1 < rows.length; j++) {
      const top = parts.findLast(({ x, y, width, height }) => x <= columns[i] && columns[i + 1] <= x + width && y <= rows[j] && rows[j + 1] <= y + height);
      if (top !== undefined) paint(pixels, side, [columns[i], columns[i + 1], rows[j], rows[j + 1]].map((edge) => offset + edge * scale), channels(top.fill).map((value, c) => value - ground[c]));
    }
  }
  return Uint8Array.from(pixels, Math.round);
}

/** Adds `change` to every pixel in the measure in which the cell covers it. */
function paint(pixels: Float32Array, side: number, [left, right, top, bottom]: number[], change: number[]): void {
  for (let row = Math.floor(top); row < bottom; row++) {
    for (let column = Math.floor(left); column < right; column++) {
      const cover = covered(column, left, right) * covered(row, top, bottom);
      for (let c = 0; c < 3; c++) pixels[3 * (row * side + column) + c] += change[c] * cover;
    }
  }
}

/** The mark as a PNG file (ISO/IEC 15948): 8 bits a channel, no filter. */
export function markPng(side: number, share = 1): Uint8Array {
  const pixels = markPixels(side, share);
  const rows = new Uint8Array(side * (1 + 3 * side));
  for (let row = 0; row < side; row++) rows.set(pixels.subarray(3 * side * row, 3 * side * (row + 1)), row * (1 + 3 * side) + 1);
  const head = Buffer.alloc(13);
  head.writeUInt32BE(side, 0);
  head.writeUInt32BE(side, 4);
  head.set([8, 2, 0, 0, 0], 8);
  return Buffer.concat([Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]), chunk('IHDR', head), chunk('IDAT', deflateSync(rows, { level: 9 })), chunk('IEND', Buffer.alloc(0))]);
}

function chunk(type: string, data: Uint8Array): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  out.set(body, 4);
  out.writeUInt32BE(crc32(body), body.length + 4);
  return out;
}
