/** What the project remembers of the sizing panel. What stands there may be of another version of the page. */
export interface SizingView {
  /** name of the variable */ variable?: string;
  /** which tolerances count; by default all */ tolerances?: 'stated' | 'none';
  /** how the range is gone through; by default as the quantity suggests */ scale?: 'linear' | 'log';
}
