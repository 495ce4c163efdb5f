import { isMet, type SizingNode, type SizingNodes } from './sizing-nodes.ts';

/** Slopes between neighbours are taken this much steeper for what lies between the nodes. */
const SAFETY = 1.5;

/**
 * The cell of the scan that most likely hides a change of verdict, or -1 where none may: with the slope of each score bounded by what was seen beside the cell,
 * a score can fall to (f_a + f_b)/2 - L h/2 inside it and rise to (f_a + f_b)/2 + L h/2 (Piyavskii, USSR Comput. Math. Math. Phys. 12, 57, 1972;
 * Shubert, SIAM J. Numer. Anal. 9, 379, 1972; both from memory). Where both ends meet everything, one score that can fall below zero is
 * enough; where neither does, every score has to be able to reach zero.
 *
 * @param least  width below which no cell is divided any more, in u
 */
export function suspectCell({ list }: SizingNodes, least: number): number {
  let suspect = -1;
  let most = 0;
  for (let c = 0; c + 1 < list.length; c++) {
    const [a, b] = [list[c], list[c + 1]];
    const h = b.u - a.u;
    if (h <= least || isMet(a) !== isMet(b)) continue;
    const reach = isMet(a) ? fall(list, c) : rise(list, c);
    // Of two suspects the wider cell, where more can hide, then the one further across.
    const weight = reach > 0 ? h + 1e-3 * Math.min(1, reach) : 0;
    if (weight > most) {
      most = weight;
      suspect = c;
    }
  }
  return suspect;
}

/** How far below zero a score may fall inside a cell that is met at both ends; not above zero where none can. */
function fall(list: readonly SizingNode[], c: number): number {
  const [a, b] = [list[c], list[c + 1]];
  let most = -Infinity;
  for (let i = 0; i < a.scores.length; i++) {
    const middle = ((a.scores[i] as number) + (b.scores[i] as number)) / 2;
    most = Math.max(most, (steepest(list, c, i) * (b.u - a.u)) / 2 - middle);
  }
  return most;
}

/** How far above zero the least score may rise inside a cell that is met at neither end; not above zero where it cannot. */
function rise(list: readonly SizingNode[], c: number): number {
  const [a, b] = [list[c], list[c + 1]];
  const h = b.u - a.u;
  let least = Infinity;
  for (let i = 0; i < a.scores.length; i++) {
    const [fa, fb] = [a.scores[i], b.scores[i]];
    if (fa === null && fb === null) return -1;
    const slope = steepest(list, c, i);
    const reach = fa === null ? (fb as number) + slope * h : fb === null ? fa + slope * h : (fa + fb) / 2 + (slope * h) / 2;
    least = Math.min(least, reach);
  }
  return least;
}

/** Steepest slope of score i in the cell and its neighbours, with the safety. */
function steepest(list: readonly SizingNode[], c: number, i: number): number {
  let most = 0;
  for (let d = Math.max(0, c - 1); d <= Math.min(list.length - 2, c + 1); d++) {
    const [a, b] = [list[d], list[d + 1]];
    const [fa, fb] = [a.scores[i], b.scores[i]];
    if (fa !== null && fb !== null) most = Math.max(most, Math.abs(fb - fa) / (b.u - a.u));
  }
  return SAFETY * most;
}
