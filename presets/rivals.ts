import rows from './rivals.json' with { type: 'json' };

/** Another published value of what a preset has, or a law of several values that belong together. */
export interface RivalPreset {
  of: { list: 'materials' | 'dopants' | 'metals'; id: string; host?: string };
  /** by path inside the entry, as a person would type it; "gap.formula" for a law of another form */ values: Readonly<Record<string, string>>;
  /** key of sources.json */ source: string;
  checked: 'page' | 'memory' | 'computed';
  confidence: 'high' | 'medium' | 'low';
  note?: string;
}

/** Another published band offset of a pair: edge of `second` less that of `first`. */
export interface RivalOffset {
  first: string;
  second: string;
  deltaEv?: { constant?: string; perX?: string };
  deltaEc?: { constant?: string; perX?: string };
  source: string;
  checked: RivalPreset['checked'];
  confidence: RivalPreset['confidence'];
  note?: string;
}

export const rivals: { readonly values: readonly RivalPreset[]; readonly offsets: readonly RivalOffset[] } = rows as never;
