import type { KindName } from '../quantity/kinds.ts';
import { NM_PER_CM } from '../../solver/units.ts';

/** What a quantity can be asked of. A junction goes by the name of the layer above it, a contact by "top" or "bottom". */
export type RequirementOf = 'layer' | 'junction' | 'contact';

/** A quantity that a requirement can set a limit to. How it is read from a result stands in src/requirements/quantities.ts. */
export interface RequirementQuantity {
  /** as a noun, without its article */ words: string;
  of: readonly RequirementOf[];
  /** kind of the limit's text; a flag's limit is true or false */ kind: KindName | 'flag';
  /** of the figure in a result and of `worst` and `limit` in its row */ unit: string;
  /** that unit's count in one solver unit of the kind */ perKind: number;
  /** the limit that is usual: largest or smallest allowed, or either. Both are accepted of every quantity. */ usual: 'max' | 'min' | 'either';
  /** "ratio": limit over worst (of a least limit: worst over limit), met from 1 up. "difference": limit less worst, met from 0 up. */
  margin: 'ratio' | 'difference';
  /** unit of a margin that is a difference */ marginUnit: string;
  /** a difference that weighs as much as a factor e, where margins of different sorts are compared (the best point of a sizing) */ step: number;
  doc: string;
}

/** kT at 300 K, eV: a factor e in carriers that have to pass a barrier. */
const THERMAL = 0.0259;

type Row = Pick<RequirementQuantity, 'words' | 'of' | 'kind' | 'unit' | 'usual' | 'doc'> & Partial<RequirementQuantity>;

function ratio(row: Row): RequirementQuantity {
  return { perKind: 1, margin: 'ratio', marginUnit: '', step: 1, ...row };
}

function difference(row: Row): RequirementQuantity {
  return { perKind: 1, margin: 'difference', marginUnit: row.unit, step: THERMAL, ...row };
}

const nm = { unit: 'nm', perKind: NM_PER_CM } as const;

export const REQUIREMENT_QUANTITIES = {
  contactResistivity: ratio({ words: 'contact resistivity', of: ['contact'], kind: 'contactResistivity', unit: 'ohm cm^2', usual: 'max', doc: 'specific contact resistivity at zero bias, both carriers in parallel' }),
  leakage: ratio({ words: 'saturation current density', of: ['contact'], kind: 'currentDensity', unit: 'A/cm^2', usual: 'max', doc: 'saturation current density of the contact' }),
  barrier: difference({ words: 'barrier', of: ['contact'], kind: 'energy', unit: 'eV', usual: 'either', doc: "barrier of the contact for the neighbouring layer's majority carriers, without the image-force lowering" }),
  barrierN: difference({ words: 'barrier for electrons', of: ['contact'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'barrier for electrons, without the image-force lowering' }),
  barrierP: difference({ words: 'barrier for holes', of: ['contact'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'barrier for holes, without the image-force lowering' }),
  bandBending: difference({ words: 'band bending', of: ['contact'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'conduction band edge at the contact less that of the neutral layer under it; positive is upward toward the contact' }),
  surfaceField: ratio({ words: 'surface field', of: ['contact'], kind: 'field', unit: 'V/cm', usual: 'max', doc: 'size of the field just inside the contact' }),
  sheetResistance: ratio({ words: 'sheet resistance', of: ['layer'], kind: 'sheetResistance', unit: 'ohm', usual: 'max', doc: 'sheet resistance of the layer, as if it were neutral throughout' }),
  resistivity: ratio({ words: 'resistivity', of: ['layer'], kind: 'resistivity', unit: 'ohm cm', usual: 'max', doc: 'resistivity of the neutral layer' }),
  carrierDensity: ratio({ words: 'carrier density', of: ['layer'], kind: 'density', unit: 'cm^-3', usual: 'min', doc: 'density of the majority carriers in the neutral layer' }),
  electronDensity: ratio({ words: 'electron density', of: ['layer'], kind: 'density', unit: 'cm^-3', usual: 'either', doc: 'density of electrons in the neutral layer' }),
  holeDensity: ratio({ words: 'hole density', of: ['layer'], kind: 'density', unit: 'cm^-3', usual: 'either', doc: 'density of holes in the neutral layer' }),
  ionisedShare: difference({ words: 'ionised share', of: ['layer'], kind: 'number', unit: '', usual: 'min', step: 0.1, doc: "least ionised share among the layer's dopants, in the neutral layer" }),
  degenerate: difference({ words: 'degenerate', of: ['layer'], kind: 'flag', unit: '', usual: 'either', marginUnit: 'kT', step: 1, doc: 'Fermi level closer than 3kT to a band; "min": true asks for it, "max": false forbids it; the margin counts kT from that mark' }),
  ecMinusEf: difference({ words: 'Ec - EF', of: ['layer'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'conduction band edge less Fermi level in the neutral layer; negative where the level lies in the band' }),
  efMinusEv: difference({ words: 'EF - Ev', of: ['layer'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'Fermi level less valence band edge in the neutral layer' }),
  solubility: ratio({ words: 'doping over its published solubility', of: ['layer'], kind: 'number', unit: '', usual: 'max', doc: 'largest active concentration of a dopant over the highest that was published; the worst of those dopants whose limit is known' }),
  depletedShare: ratio({ words: 'depleted share of the thickness', of: ['layer'], kind: 'number', unit: '', usual: 'max', doc: 'depletion widths from both sides over the thickness of the layer, 1 where nothing neutral is left' }),
  fullyDepleted: difference({ words: 'fully depleted', of: ['layer'], kind: 'flag', unit: '', usual: 'either', marginUnit: '', step: 0.1, doc: 'no neutral part is left in the layer; "max": false forbids it, "min": true asks for it; the margin is a share of the thickness' }),
  builtIn: difference({ words: 'built-in potential', of: ['junction'], kind: 'potential', unit: 'V', usual: 'either', doc: 'size of the difference of the neutral potentials on the two sides' }),
  depletionWidth: ratio({ words: 'depletion width', of: ['junction', 'contact'], kind: 'length', ...nm, usual: 'either', doc: 'of a junction on both sides together; of a contact in the layer under it' }),
  depletionAbove: ratio({ words: 'depletion width above', of: ['junction'], kind: 'length', ...nm, usual: 'either', doc: 'depletion width in the layer above the junction' }),
  depletionBelow: ratio({ words: 'depletion width below', of: ['junction'], kind: 'length', ...nm, usual: 'either', doc: 'depletion width in the layer below the junction' }),
  peakField: ratio({ words: 'peak field', of: ['junction'], kind: 'field', unit: 'V/cm', usual: 'max', doc: "largest field in the junction's own space charge" }),
  capacitance: ratio({ words: 'capacitance', of: ['junction'], kind: 'capacitance', unit: 'F/cm^2', usual: 'either', doc: 'depletion capacitance at zero bias' }),
  conductionOffset: difference({ words: 'conduction band offset', of: ['junction'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'conduction band edge below less that above' }),
  valenceOffset: difference({ words: 'valence band offset', of: ['junction'], kind: 'energy', unit: 'eV', usual: 'either', doc: 'valence band edge below less that above' }),
} as const satisfies Record<string, RequirementQuantity>;

export type RequirementQuantityName = keyof typeof REQUIREMENT_QUANTITIES;

export function requirementQuantity(name: RequirementQuantityName): RequirementQuantity {
  return REQUIREMENT_QUANTITIES[name];
}
