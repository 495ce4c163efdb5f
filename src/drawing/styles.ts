/** Looks as tables of values; marks read them and never ask which style it is. */
export type StyleName = 'light' | 'dark' | 'slide' | 'journal';

export interface Style {
  ground: string;
  ink: string;
  /** axes, interfaces, extension lines */ faint: string;
  conduction: string;
  valence: string;
  occupancy: string;
  choice: string;
  trouble: string;
  /** how much of `occupancy` a full state takes, 0..1: curves and texts must stay legible on it */ fullTint: number;
  textSize: number;
  smallSize: number;
  /** band edges, px */ edgeWidth: number;
  valenceWidth: number;
  thinWidth: number;
  fermiDash: string;
  fermiWidth: number;
  vacuumDash: string;
  font: string;
}

/** No font is loaded: the system's own by their names, since readers of SVG files do not know `system-ui`. */
const FONT = "-apple-system, 'Segoe UI', Roboto, 'Helvetica Neue', Arial, 'Liberation Sans', 'DejaVu Sans', sans-serif";

const LIGHT: Style = {
  ground: '#FBFAF6', ink: '#1F2430', faint: '#6B6F78', conduction: '#0B6E75', valence: '#A4502B', occupancy: '#5B3FA8', choice: '#B47A00', trouble: '#B3261E',
  fullTint: 0.34, textSize: 12, smallSize: 11, edgeWidth: 2, valenceWidth: 2, thinWidth: 0.8, fermiDash: '14 6', fermiWidth: 1.3, vacuumDash: '3 4', font: FONT,
};

const STYLES: Record<StyleName, Style> = {
  light: LIGHT,
  dark: {
    ...LIGHT,
    ground: '#14171C', ink: '#E6E3DA', faint: '#9A9C9F', conduction: '#4FB3B9', valence: '#E0906A', occupancy: '#A793E8', choice: '#E2B04A', trouble: '#F28B82', fullTint: 0.36,
  },
  slide: { ...LIGHT, ground: '#FFFFFF', textSize: 18, smallSize: 16, edgeWidth: 3.2, valenceWidth: 3.2, thinWidth: 1.2, fermiWidth: 2 },
  // Black and white: weight and dashes say what colour says elsewhere.
  journal: {
    ...LIGHT,
    ground: '#FFFFFF', ink: '#000000', faint: '#444444', conduction: '#000000', valence: '#000000', occupancy: '#000000', choice: '#000000', trouble: '#000000',
    fullTint: 0.24, edgeWidth: 2.2, valenceWidth: 1.1, fermiWidth: 1,
    font: "Helvetica, Arial, 'Liberation Sans', 'DejaVu Sans', sans-serif",
  },
};

export function styleOf(name: StyleName): Style {
  const style = Object.hasOwn(STYLES, name) ? STYLES[name] : undefined;
  if (!style) throw new RangeError(`unknown style: ${String(name)}`);
  return style;
}

/** `share` of `over` on `under`, both "#RRGGBB". Opaque colours, since some writers of PDF lose the opacity of a gradient's stops. */
export function mixed(under: string, over: string, share: number): string {
  let text = '#';
  for (let i = 1; i < 7; i += 2) {
    const a = Number.parseInt(under.slice(i, i + 2), 16);
    const b = Number.parseInt(over.slice(i, i + 2), 16);
    text += Math.round(a + (b - a) * share).toString(16).padStart(2, '0').toUpperCase();
  }
  return text;
}
