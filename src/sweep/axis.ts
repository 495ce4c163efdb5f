import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { KINDS } from '../quantity/kinds.ts';
import { normalise } from '../quantity/normalise.ts';
import { readQuantity } from '../quantity/read-quantity.ts';
import { quoted } from '../quantity/wording.ts';
import { findPlace, isComplaint, unitFactor, type SweepPlace } from './places.ts';

/** What is asked of one axis, as typed. */
export interface AxisRequest {
  /** "temperature", a variable, or a place such as "layers[0].thickness" */ variable: string;
  from: string;
  to: string;
  /** at least 2 */ points: number;
  scale?: 'linear' | 'log';
}

/** An axis that has been read. */
export interface Axis {
  place: SweepPlace;
  /** unit of the values, as typed where that is one unit; '' for a pure number */ unit: string;
  scale: 'linear' | 'log';
  values: number[];
  /** each value as a person would type it, e.g. for --set */ texts: string[];
}

/** More points than this in a whole sweep ask for another tool. */
export const MOST_POINTS = 100_000;
/** Values between the ends are rounded to so many digits: 0.3, not 0.30000000000000004. */
const DIGITS = 12;

/**
 * Reads an axis and says all that is wrong with it; nothing is solved. Complaints have the paths "variable", "from", "to", "points".
 *
 * Ends keep the unit that they were typed in. A temperature runs in kelvin, as differences of degC and of K are the same but their ratios are not.
 */
export function readAxis(design: Design, request: AxisRequest, set: Readonly<Record<string, string>> = {}): { ok: true; axis: Axis } | { ok: false; complaints: Complaint[] } {
  const complaints: Complaint[] = [];
  const wrong = (path: string, message: string): void => void complaints.push({ path, message });
  const place = findPlace(design, request.variable);
  const { points, scale = 'linear' } = request;
  if (!Number.isInteger(points) || points < 2) wrong('points', `is ${quoted(points)}; a sweep takes 2 points or more`);
  else if (points > MOST_POINTS) wrong('points', `is ${points}, more than the ${MOST_POINTS} that are taken; ask for fewer, or for several sweeps`);
  if (isComplaint(place)) return { ok: false, complaints: [place, ...complaints] };
  const { temperature: _, ...overrides } = set;
  const { scope } = readVariables(design.variables ?? [], overrides);
  const ends = [request.from, request.to].map((text, i) => {
    const reading = readQuantity(place.kind === 'number' && text.trim() !== '' && Number.isFinite(Number(text)) ? Number(text) : text, place.kind, scope);
    if (!reading.ok) wrong(i === 0 ? 'from' : 'to', reading.message);
    return reading.ok ? reading.value : NaN;
  });
  const [from, to] = ends;
  if (from === to) wrong('to', `is ${quoted(request.to)}, the same as the beginning: an empty sweep; move one end`);
  if (from > to) wrong('from', `runs down from ${quoted(request.from)} to ${quoted(request.to)}; put the lower end first: from ${quoted(request.to)} to ${quoted(request.from)}`);
  if (scale === 'log' && from <= 0) wrong('from', `is ${quoted(request.from)}; a logarithmic sweep begins above zero: give a small positive value, or sweep on a linear scale`);
  if (complaints.length > 0) return { ok: false, complaints };
  const unit = unitOf(request, place);
  const factor = unit === '' ? 1 : (unitFactor(unit, place.kind) as number);
  const values = spaced(endIn(request.from, from, unit, factor), endIn(request.to, to, unit, factor), points, scale);
  return { ok: true, axis: { place, unit, scale, values, texts: values.map((v) => (unit === '' ? plainText(v) : `${plainText(v)} ${unit}`)) } };
}

/** Every digit of a number, in the shorter of its two notations: "1e18", "0.3". */
function plainText(value: number): string {
  const exponent = value.toExponential().replace('e+', 'e');
  return exponent.length < String(value).length ? exponent : String(value);
}

/** The unit that both ends were typed in, else that of the beginning, else the likeliest of its kind. */
function unitOf({ from, to }: AxisRequest, place: SweepPlace): string {
  const units = KINDS[place.kind].units as readonly string[];
  if (place.kind === 'temperature') return 'K';
  const typed = [from, to].map((text) => /^[-+]?[\d.]+(?:[eE][-+]?\d+)?\s*(\S.*)$/.exec(normalise(text))?.[1]);
  return typed.find((unit) => unit !== undefined && units.includes(unit)) ?? units[0] ?? '';
}

/** The number as typed where it bears this unit, so that it does not come back as a neighbour of itself. */
function endIn(text: string, value: number, unit: string, factor: number): number {
  const typed = /^([-+]?[\d.]+(?:[eE][-+]?\d+)?)\s*(.*)$/.exec(normalise(text));
  return typed && typed[2] === unit ? Number(typed[1]) : Number((value / factor).toPrecision(DIGITS));
}

/** Both ends exactly as given, the points between rounded. */
export function spaced(from: number, to: number, points: number, scale: 'linear' | 'log'): number[] {
  return Array.from({ length: points }, (_, i) => {
    if (i === 0) return from;
    if (i === points - 1) return to;
    const u = i / (points - 1);
    return Number((scale === 'log' ? from * (to / from) ** u : from + (to - from) * u).toPrecision(DIGITS));
  });
}
