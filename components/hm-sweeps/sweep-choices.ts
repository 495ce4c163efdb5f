import type { Design } from '../../src/design/types.ts';
import type { Result } from '../../src/result/types.ts';
import { setTemperature, setVariable } from '../../src/state/commands/index.ts';
import type { AxisRequest } from '../../src/sweep/axis.ts';
import { figuresOf, type Figure } from '../../src/sweep/figures.ts';
import { findPlace, isComplaint, sweepNames, type SweepPlace } from '../../src/sweep/places.ts';
import { unitOf } from '../shared/typed-text.ts';
import type { AxisView, FilmView } from './sweeps-view.ts';

/** Figures that a first sweep shows, by what they are: the first of each in the stack. */
const FIRST_FIGURES = ['rho_c_ohm_cm2', 'ec_minus_ef_eV', 'sheet_ohm', 'builtin_V'];

/** What a film goes through. */
export const TEMPERATURE: readonly Pick<SweepPlace, 'name' | 'put'>[] = [{ name: 'temperature', put: (design, text) => ({ design, set: { temperature: text } }) }];

/** What is remembered, if it is of this version of the page and of something that this design has. */
export function heldAxis(design: Design, held: unknown): AxisView | null {
  if (!hasTexts(held, ['variable', 'from', 'to', 'points'])) return null;
  const axis = held as unknown as AxisView;
  return isComplaint(findPlace(design, axis.variable)) ? null : { ...axis, log: axis.log === true };
}

export function heldFilm(held: unknown): FilmView | null {
  return hasTexts(held, ['from', 'to', 'frames']) ? { ...(held as unknown as FilmView), log: (held as { log?: unknown }).log === true } : null;
}

function hasTexts(held: unknown, keys: readonly string[]): held is Record<string, unknown> {
  return typeof held === 'object' && held !== null && keys.every((key) => typeof (held as Record<string, unknown>)[key] === 'string');
}

/** The menu of what can be swept. */
export function axisOptions(design: Design): { value: string; text: string }[] {
  return sweepNames(design).flatMap((name) => {
    const place = findPlace(design, name);
    if (isComplaint(place)) return [];
    const variable = design.variables?.some((row) => row.name === name);
    return [{ value: name, text: variable ? `variable ${name}` : place.words }];
  });
}

/** A first axis over a quantity: a variable's or the temperature's own range, else a factor of three to both sides of the value. */
export function axisAbout(design: Design, variable: string): AxisView {
  const { temperatureRange } = design.conditions;
  const ends = variable === 'temperature' ? (temperatureRange ?? ['77 K', '400 K']) : (design.variables?.find((row) => row.name === variable)?.range ?? endsAbout(textAt(design, variable)));
  const place = findPlace(design, variable);
  const log = !isComplaint(place) && (place.kind === 'density' || place.kind === 'sheetDensity') && Number.parseFloat(ends[0]) > 0;
  return { variable, from: ends[0], to: ends[1], points: '41', log };
}

export function filmAbout(design: Design): FilmView {
  const { from, to } = axisAbout(design, 'temperature');
  return { from, to, frames: '41', log: false };
}

function endsAbout(text: string): [string, string] {
  const unit = unitOf(text) ?? '';
  const value = Number.parseFloat(text);
  const write = (v: number): string => `${Number(v.toPrecision(3)).toString().replace('e+', 'e')}${unit === '' ? '' : ` ${unit}`}`;
  // A share or a composition ends at one.
  if (unit === '') return value > 0 && value <= 1 ? [write(value / 3), write(Math.min(1, value * 3))] : ['0', '1'];
  return Number.isFinite(value) && value !== 0 ? (value > 0 ? [write(value / 3), write(value * 3)] : [write(value * 3), write(value / 3)]) : ['', ''];
}

/** The text that stands in the design for a quantity; '' where there is none. */
export function textAt(design: Design, name: string): string {
  if (name === 'temperature') return design.conditions.temperature;
  const variable = design.variables?.find((row) => row.name === name);
  if (variable) return variable.value;
  let at: unknown = design;
  for (const step of name.replace(/\[(\d+)\]/g, '.$1').split('.')) at = at !== null && typeof at === 'object' && Object.hasOwn(at, step) ? (at as Record<string, unknown>)[step] : undefined;
  return typeof at === 'string' || typeof at === 'number' ? String(at) : '';
}

export const axisRequest = ({ variable, from, to, points, log }: AxisView): AxisRequest => ({ variable, from, to, points: points.trim() === '' ? NaN : Number(points), scale: log ? 'log' : 'linear' });

/** A few figures for a sweep that has named none: of those that the design's own result has, where there is one. */
export function firstFigures(design: Design, result: Result | null): Figure[] {
  const usual = figuresOf(design, 'usual').filter((figure) => result === null || figure.read(result) !== null);
  return FIRST_FIGURES.flatMap((key) => usual.find(({ path }) => path.endsWith(`.${key}`)) ?? []).slice(0, 3);
}

/** The design with a value of the sweep put in. */
export function putIntoDesign(design: Design, place: Pick<SweepPlace, 'name' | 'put'>, text: string): Design {
  if (place.name === 'temperature') return setTemperature(design, text);
  const variable = design.variables?.findIndex(({ name }) => name === place.name) ?? -1;
  return variable >= 0 ? setVariable(design, variable, { value: text }) : place.put(design, text).design;
}

/** All of a design that decides what a sweep finds, as text: what is swept and what is only written is left out. */
export function sweepBasis(design: Design, places: readonly Pick<SweepPlace, 'name' | 'put'>[]): string {
  // What was swept may be gone from the design.
  const blank = places.reduce((d, place) => (isComplaint(findPlace(d, place.name)) ? d : putIntoDesign(d, place, '')), design);
  const { title: _t, notes: _n, requirements: _r, ...rest } = blank;
  return JSON.stringify(rest);
}
