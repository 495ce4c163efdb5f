/** One axis as typed. */
export interface AxisView {
  variable: string;
  from: string;
  to: string;
  points: string;
  log: boolean;
}

/** What the project remembers of the sweeps. What stands there may be of another version of the page. */
export interface SweepsView {
  first?: AxisView;
  /** null: one axis only */ second?: AxisView | null;
  /** paths of the figures; none: a few usual ones */ figures?: string[];
  /** path of the figure that a map of two axes shows */ shown?: string;
  film?: FilmView;
}

export interface FilmView {
  from: string;
  to: string;
  frames: string;
  log: boolean;
}
