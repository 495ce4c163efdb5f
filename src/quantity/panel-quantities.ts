import { columnOf } from './quantities.ts';

/**
 * The figures that stand in panels beside the ledger, each once: its heading and what it means. The panels, the workings and the tests that hold both against each other go through these
 * tables, so that a figure is either in all of them or in none. Units come with the value: a requirement's are those of its quantity.
 */
export interface PanelQuantity {
  heading: string;
  words: string;
}

/** A figure of a contact that the ledger has too bears the ledger's words. */
function ledger(id: 'barrierN' | 'barrierP' | 'rhoC' | 'rhoCn' | 'rhoCp' | 'saturation' | 'e00' | 'transport'): PanelQuantity {
  const { heading, words } = columnOf('contacts', id);
  return { heading, words };
}

export const PANEL_QUANTITIES = {
  /** of a requirement as judged */
  requirement: {
    worst: { heading: 'Worst', words: 'the figure where the requirement is hardest to meet, over its temperatures and all tolerances' },
    margin: { heading: 'Margin', words: 'how far the worst figure stays from the limit: as a ratio, met from 1 up, or as a difference, met from 0 up' },
    limit: { heading: 'Limit', words: 'the limit as the design states it, in the unit of the figure' },
    corner: { heading: 'Worst corner', words: 'temperature and tolerances at which the requirement is hardest to meet' },
  },
  /** of a sizing: of each interval, of the best value */
  sizing: {
    from: { heading: 'Lower end', words: 'the lowest value of the interval at which everything is met' },
    to: { heading: 'Upper end', words: 'the highest value of the interval at which everything is met' },
    best: { heading: 'Best value', words: 'where the least of all margins is largest' },
  },
  /** of a metal on a surface */
  metal: {
    barrierN: ledger('barrierN'),
    barrierP: ledger('barrierP'),
    rho: { heading: 'Contact resistivity', words: 'at the design’s temperature, nothing moved' },
    least: { heading: 'Least', words: 'least contact resistivity within the tolerances, at the design’s temperature' },
    most: { heading: 'Most', words: 'largest contact resistivity within the tolerances, at the design’s temperature' },
    worst: { heading: 'Worst', words: 'largest contact resistivity over temperatures and tolerances' },
    e00OverKt: { heading: 'E00/kT', words: 'characteristic energy of tunnelling over the thermal energy, which names the regime' },
  },
  /** of a contact seen from near */
  nearContact: {
    barrierN: ledger('barrierN'),
    barrierP: ledger('barrierP'),
    lowering: { heading: 'Image-force lowering', words: 'what the image force takes off the barrier, by the closed form' },
    transport: ledger('transport'),
    e00: ledger('e00'),
    rhoC: ledger('rhoC'),
    rhoCn: ledger('rhoCn'),
    rhoCp: ledger('rhoCp'),
    rhoCFloor: { heading: 'Its floor', words: 'least contact resistivity that the majority carriers allow, without any barrier' },
    rhoCClosed: { heading: 'Closed form', words: 'the textbook’s closed form of the regime' },
    closedRatio: { heading: 'Solved / closed form', words: 'how wrong the closed form would be' },
    saturation: ledger('saturation'),
    passage: { heading: 'Passes at', words: 'energy at which most of the current passes' },
  },
  /** of a figure over the variations of a tolerance run */
  spread: {
    mean: { heading: 'Mean', words: 'mean of the variations that have the figure' },
    sd: { heading: 'sd', words: 'standard deviation of the sample' },
    yield: { heading: 'Met', words: 'share of the variations that meet the requirement' },
    yieldLow: { heading: 'Least true share', words: 'lower end of the range in which the true share lies in 95 of 100 cases' },
    yieldHigh: { heading: 'Largest true share', words: 'upper end of the range in which the true share lies in 95 of 100 cases' },
    low: { heading: '2.5 %', words: 'value below which 2.5 % of the variations lie' },
    median: { heading: 'Median', words: 'value below which half of the variations lie' },
    high: { heading: '97.5 %', words: 'value below which 97.5 % of the variations lie' },
  },
} as const satisfies Record<string, Record<string, PanelQuantity>>;

export type PanelTable = keyof typeof PANEL_QUANTITIES;
export type PanelColumn<T extends PanelTable> = keyof (typeof PANEL_QUANTITIES)[T] & string;
