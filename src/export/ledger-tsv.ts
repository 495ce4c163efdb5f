import type { ContactResult, IonisedResult, JunctionResult, LayerResult, Result } from '../result/types.ts';
import { numberCell, textCell } from './text-cell.ts';

/** One column of a table: its heading with the unit, and its cell. */
type Column<Row> = [heading: string, cell: (row: Row) => string | number | boolean | null];

const LAYER_COLUMNS: Column<LayerResult>[] = [
  ['layer', (l) => l.name],
  ['material', (l) => l.material],
  ['x', (l) => l.x],
  ['thickness (nm)', (l) => l.thickness_nm],
  ['type', (l) => l.type],
  ['regime', (l) => l.regime],
  ['dopants', (l) => l.ionised.map(dopantText).join('; ')],
  ['gap (eV)', (l) => l.gap_eV],
  ['affinity (eV)', (l) => l.affinity_eV],
  ['Ec - EF (eV)', (l) => l.ec_minus_ef_eV],
  ['EF - Ev (eV)', (l) => l.ef_minus_ev_eV],
  ['n (cm^-3)', (l) => l.n_cm3],
  ['p (cm^-3)', (l) => l.p_cm3],
  ['ni (cm^-3)', (l) => l.ni_cm3],
  ['Debye length (nm)', (l) => l.debye_nm],
  ['mobility (cm^2/(V s))', (l) => l.mobility_cm2_Vs],
  ['resistivity (ohm cm)', (l) => l.resistivity_ohm_cm],
  ['sheet resistance (ohm)', (l) => l.sheet_ohm],
  ['fully depleted', (l) => l.fully_depleted],
  ['textbook Ec - EF (eV)', (l) => l.boltzmann.ec_minus_ef_eV],
  ['textbook error (eV)', (l) => l.boltzmann.ec_minus_ef_eV - l.ec_minus_ef_eV],
];

const JUNCTION_COLUMNS: Column<JunctionResult>[] = [
  ['above', (j) => j.above],
  ['below', (j) => j.below],
  ['built-in potential (V)', (j) => j.builtin_V],
  ['delta Ec (eV)', (j) => j.delta_ec_eV],
  ['delta Ev (eV)', (j) => j.delta_ev_eV],
  ['class', (j) => j.class],
  ['alignment', (j) => j.alignment],
  ['sheet charge (q cm^-2)', (j) => j.sheet_charge_cm2],
  ['peak field (V/cm)', (j) => j.peak_field_V_cm],
  ['depletion above (nm)', (j) => j.depletion_above_nm],
  ['depletion below (nm)', (j) => j.depletion_below_nm],
  ['depletion approximation above (nm)', (j) => j.depletion_approximation_above_nm],
  ['depletion approximation below (nm)', (j) => j.depletion_approximation_below_nm],
  ['capacitance (F/cm^2)', (j) => j.capacitance_F_cm2],
];

const CONTACT_COLUMNS: Column<ContactResult>[] = [
  ['contact', (c) => c.side],
  ['kind', (c) => c.kind],
  ['metal', (c) => c.metal],
  ['barrier of electrons (eV)', (c) => c.barrier_n_eV],
  ['barrier of holes (eV)', (c) => c.barrier_p_eV],
  ['barrier from', (c) => c.barrier_source],
  ['image-force lowering (eV)', (c) => c.lowering_eV],
  ['surface field (V/cm)', (c) => c.surface_field_V_cm],
  ['E00 (meV)', (c) => c.e00_meV],
  ['transport', (c) => c.transport],
  ['depletion (nm)', (c) => c.depletion_nm],
];

/**
 * The ledger as tables of tab-separated cells, an empty line between them: layers, junctions (if any), contacts. A heading row with units each; numbers with
 * all their digits, so that a spreadsheet rounds and not we; empty cells where a figure does not apply.
 */
export function ledgerTsv(result: Result): string {
  const tables = [table(LAYER_COLUMNS, result.layers), table(JUNCTION_COLUMNS, result.junctions), table(CONTACT_COLUMNS, result.contacts)];
  return tables.filter((text) => text !== '').join('\n');
}

function table<Row>(columns: Column<Row>[], rows: Row[]): string {
  if (rows.length === 0) return '';
  const lines = [columns.map(([heading]) => heading), ...rows.map((row) => columns.map(([, cell]) => written(cell(row))))];
  return lines.map((cells) => `${cells.join('\t')}\n`).join('');
}

function written(value: string | number | boolean | null): string {
  if (typeof value === 'string') return textCell(value);
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return numberCell(value);
}

function dopantText(row: IonisedResult): string {
  const share = Number((100 * row.fraction).toPrecision(4));
  return `${row.dopant ?? row.kind} ${row.concentration_cm3} cm^-3, ${share} % ionised`;
}
