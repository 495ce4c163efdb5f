import type { Distribution } from '../../src/tolerance/draw.ts';

/** What the project remembers of the tolerance panel. */
export interface TolerancesView {
  count?: string;
  seed?: string;
  distribution?: Distribution;
  tolerances?: 'all' | 'stated';
  /** paths of the figures that are drawn */ shown?: string[];
}
