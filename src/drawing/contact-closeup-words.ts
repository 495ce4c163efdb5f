import { energyText } from './figures.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import { decimalText, figureText } from '../result/figure-text.ts';
import { closedFormRatio } from '../result/ledger-contacts.ts';
import type { CarrierCloseUp, CloseUp, Compared } from '../contacts/close-up.ts';

const REGIMES = { thermionic: 'thermionic emission', 'thermionic-field': 'thermionic-field emission', field: 'field emission' } as const;
const KINDS: Record<Compared['transmission'], string> = { wkb: 'WKB', kemble: 'Kemble', exact: 'exact' };
const SOURCES = { given: 'given', measured: 'measured', pinned: 'from pinning', ideal: 'work function less affinity' } as const;

export function regimeWords(transport: CloseUp['transport']): string {
  return transport === null ? 'no regime' : REGIMES[transport];
}

export function transmissionWords(kind: Compared['transmission']): string {
  return KINDS[kind];
}

/** "Ti on cap" */
export function closeUpTitle({ metal, layer, side }: CloseUp): string {
  return `${metal ?? 'Metal'} on ${layer}, ${side} contact`;
}

/** The carrier that makes up the current, and what shows it. */
export function carrierShown(closeUp: CloseUp): { words: 'electrons' | 'holes'; curve: CarrierCloseUp | null } {
  const [majority, minority] = closeUp.majority === 'n' ? (['electrons', 'holes'] as const) : (['holes', 'electrons'] as const);
  const rho = { electrons: closeUp.rho_c_n_ohm_cm2, holes: closeUp.rho_c_p_ohm_cm2 };
  const less = rho[minority] !== null && (rho[majority] === null || (rho[minority] as number) < (rho[majority] as number)) && closeUp[minority] !== null;
  const words = less || closeUp[majority] === null ? (closeUp[minority] === null ? majority : minority) : majority;
  return { words, curve: closeUp[words] };
}

/** A figure of a contact from near. */
export interface CloseUpFigure {
  column: PanelColumn<'nearContact'>;
  name: string;
  text: string;
  /** the number behind the text, in its unit; null of words */ value: number | null;
  note?: string;
}

/** Figures with their names, in the order in which they are asked for. */
export function closeUpFigures(c: CloseUp): CloseUpFigure[] {
  const rows: CloseUpFigure[] = [];
  const add = (column: CloseUpFigure['column'], name: string, text: string, value: number | null, note?: string | null): void => void rows.push({ column, name, text, value, ...(note == null ? {} : { note }) });
  const rho = (column: CloseUpFigure['column'], name: string, value: number | null, note?: string | null): void => add(column, name, value === null ? '–' : `${figureText(value)} Ω cm²`, value, note);
  const source = c.barrier_source === null ? null : SOURCES[c.barrier_source];
  add('barrierN', 'Barrier for electrons', `${decimalText(c.barrier_n_eV)} eV`, c.barrier_n_eV, source);
  add('barrierP', 'Barrier for holes', `${decimalText(c.barrier_p_eV)} eV`, c.barrier_p_eV, source);
  add('lowering', 'Image-force lowering', c.lowering_eV === null ? 'off' : energyText(c.lowering_eV), c.lowering_eV, c.lowering_eV === null ? null : 'closed form, from the surface field');
  add('transport', 'Transport', regimeWords(c.transport), null, c.e00_over_kT === null ? null : `E00/kT ${figureText(c.e00_over_kT, 2)}`);
  add('e00', 'E00', c.e00_meV === null ? '–' : `${figureText(c.e00_meV)} meV`, c.e00_meV);
  rho('rhoC', 'Contact resistivity', c.rho_c_ohm_cm2, c.rho_c_error === null ? null : `${transmissionWords(c.transmission)}; quadrature good to ${errorText(c.rho_c_error)}`);
  rho('rhoCn', 'of electrons', c.rho_c_n_ohm_cm2);
  rho('rhoCp', 'of holes', c.rho_c_p_ohm_cm2);
  rho('rhoCFloor', 'Its floor', c.rho_c_floor_ohm_cm2, 'the majority without any barrier');
  rho('rhoCClosed', 'Closed form', c.rho_c_closed_form_ohm_cm2, c.closed_form === null ? null : `${REGIMES[c.closed_form]}, depletion approximation, no image force`);
  const ratio = closedFormRatio(c);
  add('closedRatio', 'Solved / closed form', figureText(ratio), ratio);
  add('saturation', 'Saturation current', c.saturation_A_cm2 === null ? '–' : `${figureText(c.saturation_A_cm2)} A/cm²`, c.saturation_A_cm2);
  const where = passageWords(c);
  if (where !== null) add('passage', 'Passes at', where, carrierShown(c).curve?.peak_eV ?? null);
  return rows;
}

/** "0.12 eV above EF; 80 % between 0.05 and 0.2 eV" */
function passageWords(c: CloseUp): string | null {
  const { words, curve } = carrierShown(c);
  if (curve === null || curve.peak_eV === null || curve.from_eV === null || curve.to_eV === null) return null;
  const [low, high] = [Math.min(curve.from_eV, curve.to_eV), Math.max(curve.from_eV, curve.to_eV)];
  const over = curve.overTop as number;
  const share = over > 0.995 ? 'all of it over the top' : over < 0.005 ? 'all of it by tunnelling' : `${Math.round(100 * over)} % over the top, the rest by tunnelling`;
  return `${words} mostly ${besideEf(curve.peak_eV)}; 80 % of the current between ${decimalText(low)} and ${decimalText(high)} eV; ${share}`;
}

function besideEf(e: number): string {
  return Math.abs(e) < 5e-4 ? 'at EF' : `${energyText(Math.abs(e))} ${e > 0 ? 'above' : 'below'} EF`;
}

/** "0.2 %", or "better than 0.001 %" */
export function errorText(share: number): string {
  return share < 1e-5 ? 'better than 0.001 %' : `${figureText(100 * share, 1)} %`;
}

/** For readers who cannot see the picture. */
export function describeCloseUp(c: CloseUp): string {
  const { words, curve } = carrierShown(c);
  const way = curve === null ? '' : ` ${words === 'electrons' ? 'The conduction band' : 'The valence band'} that they cross has its ${words === 'electrons' ? 'highest' : 'lowest'} point ${besideEf(curve.top_eV)}; the band edge inside lies ${besideEf(curve.edge_eV)}.`;
  const passes = passageWords(c);
  return `${closeUpTitle(c)} at ${Number(c.temperature_K.toPrecision(4))} K. Barrier of electrons ${decimalText(c.barrier_n_eV)} eV, of holes ${decimalText(c.barrier_p_eV)} eV. ${capital(regimeWords(c.transport))}.${way}${passes === null ? '' : ` ${capital(passes)}.`} ${c.rho_c_ohm_cm2 === null ? 'No contact resistivity' : `Contact resistivity ${figureText(c.rho_c_ohm_cm2)} ohm cm²`}.`;
}

const capital = (text: string): string => `${text.slice(0, 1).toUpperCase()}${text.slice(1)}`;

/** Rows of the picture's data: evenly over the energies, the peak among them. */
export interface PassageRow {
  energy_eV: number;
  transmission: number;
  occupancy: number;
  product: number;
  peak: boolean;
}

export function closeUpTable(c: CloseUp, rows = 24): PassageRow[] {
  const { curve } = carrierShown(c);
  if (curve === null) return [];
  const last = curve.energy_eV.length - 1;
  const peak = curve.peak_eV === null ? -1 : curve.energy_eV.indexOf(curve.peak_eV);
  const at = new Set(Array.from({ length: rows }, (_, i) => Math.round((last * i) / (rows - 1))));
  if (peak >= 0) at.add(peak);
  return [...at].sort((a, b) => a - b).map((i) => ({ energy_eV: curve.energy_eV[i], transmission: curve.transmission[i], occupancy: curve.occupancy[i], product: curve.product[i], peak: i === peak }));
}
