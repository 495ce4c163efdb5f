import type { ProfileResult, Result } from '../result/types.ts';
import { numberCell, textCell } from './text-cell.ts';

/** Columns in their order, with the unit in the heading. */
const COLUMNS: [heading: string, key: Exclude<keyof ProfileResult, 'layer'>][] = [
  ['depth (nm)', 'z_nm'],
  ['Ec (eV)', 'ec_eV'],
  ['Ev (eV)', 'ev_eV'],
  ['EF (eV)', 'ef_eV'],
  ['vacuum level (eV)', 'vacuum_eV'],
  ['potential (V)', 'potential_V'],
  ['field (V/cm)', 'field_V_cm'],
  ['n (cm^-3)', 'n_cm3'],
  ['p (cm^-3)', 'p_cm3'],
  ['ionised donors (cm^-3)', 'ionised_donors_cm3'],
  ['ionised acceptors (cm^-3)', 'ionised_acceptors_cm3'],
  ['net charge (q cm^-3)', 'charge_cm3'],
];

/**
 * Every mesh node of the profile as CSV after RFC 4180: a heading row with units, lines ended by CR LF, numbers with all their digits and a decimal point. An interface
 * stands twice, once for each side; the layer's number and name tell which.
 */
export function profileCsv(result: Result): string {
  const { profile } = result;
  const rows = [[...COLUMNS.map(([heading]) => heading), 'layer', 'layer name'].map(quoted).join(',')];
  for (let i = 0; i < profile.z_nm.length; i++) {
    const layer = profile.layer[i];
    const cells = COLUMNS.map(([, key]) => numberCell(profile[key][i]));
    rows.push([...cells, String(layer + 1), quoted(textCell(result.layers[layer]?.name ?? ''))].join(','));
  }
  return `${rows.join('\r\n')}\r\n`;
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
