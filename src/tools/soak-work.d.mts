/** Types of soak-work.mjs for the scenarios. */
import type { Browser } from 'puppeteer-core';

interface Counted {
  heap_MB: number;
  elements: number;
  listeners: number;
}
export const MOST_A_ROUND: Counted;
export function soak(
  browser: Browser,
  url: string,
  asked: { edits: number; undos: number; starters: number; sweeps: number; exports: number; rounds: number },
): Promise<{ rounds: (Counted & { seconds: number })[]; problems: string[]; growth: Counted }>;
