import type { TableId } from '../result/ledger.ts';
import type { PanelAsked } from './panel-figures.ts';
import type { Step } from './step.ts';

/** Which figure of the ledger is asked for. */
export interface Asked {
  table: TableId;
  /** row of the result's list */ index: number;
  /** id of the ledger's column */ column: string;
}

/** Any figure whose workings can be asked for: of the ledger, or of a panel with what it knows. */
export type Question = Asked | PanelAsked;

/** What a simpler formula would give. */
export interface Simpler {
  /** "Boltzmann statistics, every dopant ionised" */ words: string;
  steps: Step[];
  /** simpler less what is in force, in the figure's unit, as text */ difference: string;
}

/** Another published value of the same thing, with what it would give. */
export interface Rival {
  words: string;
  /** as printed, with its unit */ value: string;
  source: string;
}

export interface Workings {
  asked: Question;
  /** "Ec − EF of drift" */ title: string;
  words: string;
  /** lines as the ledger shows them; an en dash where there is no figure */ value: string[];
  unit: string;
  steps: Step[];
  /** what the lines do not say; why there is no figure */ remarks: string[];
  /** in force, a sentence each */ assumptions: string[];
  simpler: Simpler | null;
  accuracy: string;
  rivals: Rival[];
}

/** What a table's part of the workings adds to a figure. */
export interface Found {
  steps: Step[];
  remarks?: string[];
  simpler?: Simpler | null;
  rivals?: Rival[];
  /** which assumptions bear on it */ rests: readonly Rests[];
  /** read from the solution of the whole stack, whose mesh error counts */ solved?: boolean;
  /** its own accuracy, said beside that of the mesh */ accuracy?: string;
}

export type Rests = 'carriers' | 'bands' | 'alignment' | 'stack' | 'image force' | 'transmission';
