import type { PlateOptions } from '../../src/drawing/plate.ts';

/** How a person looks at the plate; saved with the project, never undone. */
export interface PlateView {
  depth?: 'true' | 'even';
  /** nm */ window?: [number, number];
  /** eV */ energyWindow?: [number, number];
  shading?: PlateOptions['shading'];
  vacuum?: boolean;
  levels?: boolean;
  /** ids of dimension lines put away */ hidden?: string[];
  /** ids of dragged dimension lines with their offsets, px */ moved?: Record<string, [number, number]>;
  style?: PlateOptions['style'];
}

/** A view as it was saved, perhaps by another version of the page: what does not fit is left out. */
export function heldView(view: PlateView): PlateView {
  const oneOf = <T>(value: unknown, known: readonly T[]): T | undefined => (known.includes(value as T) ? (value as T) : undefined);
  const pair = (value: unknown): [number, number] | undefined => (Array.isArray(value) && value.length === 2 && value.every(Number.isFinite) && value[1] > value[0] ? (value as [number, number]) : undefined);
  const offset = (value: unknown): value is [number, number] => Array.isArray(value) && value.length === 2 && value.every(Number.isFinite);
  return {
    depth: oneOf(view.depth, ['true', 'even'] as const),
    window: pair(view.window),
    energyWindow: pair(view.energyWindow),
    shading: oneOf(view.shading, ['occupancy', 'carriers', 'none'] as const),
    vacuum: view.vacuum === true,
    levels: view.levels !== false,
    hidden: Array.isArray(view.hidden) ? view.hidden.filter((id) => typeof id === 'string') : [],
    moved: typeof view.moved === 'object' && view.moved !== null ? Object.fromEntries(Object.entries(view.moved).filter(([, v]) => offset(v))) : {},
    style: oneOf(view.style, ['light', 'dark', 'slide', 'journal'] as const),
  };
}
