import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import type { Result } from '../result/types.ts';

/** The rows of a result that figures are read from. */
export type FigureRows = Pick<Result, 'layers' | 'junctions' | 'contacts'>;

/** A number of a result, by its path. */
export interface Figure {
  /** "layers.cap.sheet_ohm", "junctions.0.builtin_V", "contacts.top.barrier_n_eV" */ path: string;
  /** "cap: sheet resistance" */ words: string;
  /** '' for a pure number */ unit: string;
  /** a figure that spans decades: its axis is logarithmic */ log: boolean;
  /** null where it does not apply, or where the solver does not stand behind one */ read(result: FigureRows): number | null;
}

interface Field {
  key: string;
  words: string;
  unit: string;
  log?: boolean;
  /** in a sweep that names no figures */ usual?: boolean;
}

/** One row a numeric field of the result's layers, junctions and contacts. */
const LAYER_FIELDS: readonly Field[] = [
  { key: 'ec_minus_ef_eV', words: 'Ec - EF', unit: 'eV', usual: true },
  { key: 'ef_minus_ev_eV', words: 'EF - Ev', unit: 'eV' },
  { key: 'n_cm3', words: 'electrons', unit: 'cm^-3', log: true, usual: true },
  { key: 'p_cm3', words: 'holes', unit: 'cm^-3', log: true, usual: true },
  { key: 'ni_cm3', words: 'intrinsic density', unit: 'cm^-3', log: true },
  { key: 'gap_eV', words: 'gap', unit: 'eV' },
  { key: 'affinity_eV', words: 'affinity', unit: 'eV' },
  { key: 'thickness_nm', words: 'thickness', unit: 'nm' },
  { key: 'x', words: 'composition x', unit: '' },
  { key: 'debye_nm', words: 'Debye length', unit: 'nm', log: true },
  { key: 'mobility_cm2_Vs', words: 'mobility of the majority', unit: 'cm^2/(V s)' },
  { key: 'mobility_n_cm2_Vs', words: 'mobility of electrons', unit: 'cm^2/(V s)' },
  { key: 'mobility_p_cm2_Vs', words: 'mobility of holes', unit: 'cm^2/(V s)' },
  { key: 'resistivity_ohm_cm', words: 'resistivity', unit: 'ohm cm', log: true },
  { key: 'sheet_ohm', words: 'sheet resistance', unit: 'ohm', log: true, usual: true },
  { key: 'nc_cm3', words: 'Nc', unit: 'cm^-3', log: true },
  { key: 'nv_cm3', words: 'Nv', unit: 'cm^-3', log: true },
  { key: 'boltzmann.ec_minus_ef_eV', words: 'Ec - EF of the textbook', unit: 'eV' },
  { key: 'boltzmann.n_cm3', words: 'electrons of the textbook', unit: 'cm^-3', log: true },
  { key: 'boltzmann.p_cm3', words: 'holes of the textbook', unit: 'cm^-3', log: true },
];
const DOPANT_FIELDS: readonly Field[] = [
  { key: 'fraction', words: 'ionised share', unit: '' },
  { key: 'fraction_depleted', words: 'ionised share where depleted', unit: '' },
  { key: 'concentration_cm3', words: 'active concentration', unit: 'cm^-3', log: true },
  { key: 'ionised_cm3', words: 'ionised', unit: 'cm^-3', log: true },
  { key: 'level_eV', words: 'depth of the level', unit: 'eV' },
];
const JUNCTION_FIELDS: readonly Field[] = [
  { key: 'builtin_V', words: 'built-in potential', unit: 'V', usual: true },
  { key: 'delta_ec_eV', words: 'conduction band offset', unit: 'eV' },
  { key: 'delta_ev_eV', words: 'valence band offset', unit: 'eV' },
  { key: 'sheet_charge_cm2', words: 'sheet charge', unit: 'cm^-2' },
  { key: 'peak_field_V_cm', words: 'peak field', unit: 'V/cm', log: true, usual: true },
  { key: 'depletion_above_nm', words: 'depletion above', unit: 'nm' },
  { key: 'depletion_below_nm', words: 'depletion below', unit: 'nm' },
  { key: 'depletion_approximation_above_nm', words: 'depletion above by the approximation', unit: 'nm' },
  { key: 'depletion_approximation_below_nm', words: 'depletion below by the approximation', unit: 'nm' },
  { key: 'capacitance_F_cm2', words: 'capacitance', unit: 'F/cm^2', log: true, usual: true },
];
const CONTACT_FIELDS: readonly Field[] = [
  { key: 'barrier_n_eV', words: 'barrier for electrons', unit: 'eV', usual: true },
  { key: 'barrier_p_eV', words: 'barrier for holes', unit: 'eV', usual: true },
  { key: 'lowering_eV', words: 'image-force lowering', unit: 'eV' },
  { key: 'surface_field_V_cm', words: 'surface field', unit: 'V/cm' },
  { key: 'e00_meV', words: 'E00', unit: 'meV', log: true },
  { key: 'depletion_nm', words: 'depletion', unit: 'nm', usual: true },
  { key: 'saturation_A_cm2', words: 'saturation current density', unit: 'A/cm^2', log: true },
  { key: 'rho_c_ohm_cm2', words: 'contact resistivity', unit: 'ohm cm^2', log: true, usual: true },
  { key: 'rho_c_n_ohm_cm2', words: 'contact resistivity of electrons', unit: 'ohm cm^2', log: true },
  { key: 'rho_c_p_ohm_cm2', words: 'contact resistivity of holes', unit: 'ohm cm^2', log: true },
  { key: 'rho_c_closed_form_ohm_cm2', words: 'contact resistivity by the closed form', unit: 'ohm cm^2', log: true },
  { key: 'rho_c_floor_ohm_cm2', words: 'least contact resistivity of this doping', unit: 'ohm cm^2', log: true },
];

const CONTACTS = ['top', 'bottom'] as const;

function figure(path: string, place: string, field: Field, holder: (result: FigureRows) => unknown): Figure {
  const keys = field.key.split('.');
  return { path: `${path}.${field.key}`, words: `${place}: ${field.words}`, unit: field.unit, log: field.log ?? false, read: (result) => numberAt(holder(result), keys) };
}

function numberAt(at: unknown, keys: readonly string[]): number | null {
  for (const key of keys) {
    if (at === null || typeof at !== 'object' || !Object.hasOwn(at, key)) return null;
    at = (at as Record<string, unknown>)[key];
  }
  return typeof at === 'number' && Number.isFinite(at) ? at : null;
}

/**
 * Every numeric figure that a result of this design can have, from one table.
 *
 * @param which  "usual": those of a sweep that names none
 */
export function figuresOf(design: Design, which: 'all' | 'usual' = 'all'): Figure[] {
  const out: Figure[] = [];
  const add = (fields: readonly Field[], path: string, place: string, holder: (result: FigureRows) => unknown): void => {
    for (const field of fields) if (which === 'all' || field.usual) out.push(figure(path, place, field, holder));
  };
  design.layers.forEach((layer, l) => {
    add(LAYER_FIELDS, `layers.${layer.name}`, layer.name, (r) => r.layers[l]);
    (layer.dopants ?? []).forEach((row, d) => add(DOPANT_FIELDS, `layers.${layer.name}.ionised.${d}`, `${layer.name} ${row.dopant ?? row.kind ?? 'dopant'}`, (r) => r.layers[l]?.ionised[d]));
  });
  design.layers.slice(0, -1).forEach((layer, i) => add(JUNCTION_FIELDS, `junctions.${i}`, `${layer.name} to ${design.layers[i + 1].name}`, (r) => r.junctions[i]));
  CONTACTS.forEach((side, c) => {
    if (which === 'usual' && design[side].kind === 'neutral') return;
    add(CONTACT_FIELDS, `contacts.${side}`, `${side} contact`, (r) => r.contacts[c]);
  });
  return out;
}

/**
 * Figures by their paths; a layer also by its index ("layers.0.n_cm3", "layers[0].n_cm3").
 *
 * @param paths  none gives the usual ones
 */
export function findFigures(design: Design, paths: readonly string[], place = 'figure'): { ok: true; figures: Figure[] } | { ok: false; complaints: Complaint[] } {
  if (paths.length === 0) return { ok: true, figures: figuresOf(design, 'usual') };
  const known = new Map(figuresOf(design).map((f) => [f.path, f]));
  const complaints: Complaint[] = [];
  const figures: Figure[] = [];
  for (const asked of paths) {
    const path = byName(design, asked.trim());
    const found = known.get(path);
    if (!found) complaints.push({ path: place, message: `there is no figure ${quoted(asked)}${didYouMean(path, [...known.keys()]) || mend(path, known)}` });
    else if (!figures.includes(found)) figures.push(found);
  }
  return complaints.length > 0 ? { ok: false, complaints } : { ok: true, figures };
}

function byName(design: Design, path: string): string {
  const dotted = path.replace(/\[(\d+)\]/g, '.$1');
  const found = /^layers\.(\d+)\.(.*)$/.exec(dotted);
  const layer = found && !design.layers.some((l) => l.name === found[1]) ? design.layers[Number(found[1])] : undefined;
  return layer && found ? `layers.${layer.name}.${found[2]}` : dotted;
}

/** The figures of the same place where that is known, else one of each sort. */
function mend(path: string, known: ReadonlyMap<string, Figure>): string {
  const place = path.split('.').slice(0, -1).join('.');
  const same = place === '' ? [] : [...known.keys()].filter((k) => k.startsWith(`${place}.`));
  const some = same.length > 0 ? same.slice(0, 6) : ['layers.', 'junctions.', 'contacts.'].flatMap((sort) => [...known.keys()].find((k) => k.startsWith(sort)) ?? []);
  return `; ${some.join(', ')} would do`;
}
