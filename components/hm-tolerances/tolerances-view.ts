import type { Distribution } from '../../src/tolerance/draw.ts';
import type { InputChoices } from '../../src/tolerance/inputs.ts';

/** What the project remembers of the tolerance panel. */
export interface TolerancesView {
  count?: string;
  seed?: string;
  distribution?: Distribution;
  tolerances?: 'all' | 'stated';
  /** paths of figures beside the usual ones */ figures?: string[];
  /** other tolerances and distributions of single inputs */ inputs?: InputChoices;
  /** paths of the figures that are drawn */ shown?: string[];
}
