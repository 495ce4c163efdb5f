import { ELEMENTARY_CHARGE } from '../../solver/constants.ts';

/** The kinds of quantity that a design asks for, each with the solver's unit (solver/units.ts) and an example for the person. */
export interface Kind {
  /** with its article: "a length" */ words: string;
  /** the solver's unit, in the notation that units.ts reads; empty for a pure number */ unit: string;
  /** what a person could type */ example: string;
  /** units that would fit, likeliest first */ units: readonly string[];
  /** another quantity that stands for this one: its unit, how much of the solver's unit one of it is, an example */ also?: { unit: string; size: number; example: string };
}

export const KINDS = {
  length: { words: 'a length', unit: 'cm', example: '200 nm', units: ['nm', 'um', 'angstrom', 'mm', 'cm'] },
  energy: { words: 'an energy', unit: 'eV', example: '0.6 eV', units: ['eV', 'meV'] },
  density: { words: 'a concentration', unit: 'cm^-3', example: '5e17 cm^-3', units: ['cm^-3', 'm^-3'] },
  sheetDensity: { words: 'a sheet density', unit: 'cm^-2', example: '1e12 cm^-2', units: ['cm^-2', 'm^-2'], also: { unit: 'C/cm^2', size: 1 / ELEMENTARY_CHARGE, example: '-0.034 C/m^2' } },
  temperature: { words: 'a temperature', unit: 'K', example: '300 K or 25 degC', units: ['K', 'degC'] },
  potential: { words: 'a voltage', unit: 'V', example: '0 V', units: ['V', 'mV'] },
  field: { words: 'a field', unit: 'V/cm', example: '3e5 V/cm', units: ['V/cm', 'kV/cm', 'MV/cm'] },
  mobility: { words: 'a mobility', unit: 'cm^2/(V s)', example: '1300 cm^2/(V s)', units: ['cm^2/(V s)'] },
  energyPerKelvin: { words: 'an energy per kelvin', unit: 'eV/K', example: '4.73e-4 eV/K', units: ['eV/K', 'meV/K'] },
  perEnergy: { words: 'a reciprocal energy', unit: 'eV^-1', example: '0.5 eV^-1', units: ['eV^-1'] },
  richardson: { words: 'a Richardson constant', unit: 'A/(cm^2 K^2)', example: '112 A/(cm^2 K^2)', units: ['A/(cm^2 K^2)'] },
  chargeDensity: { words: 'a charge per area', unit: 'C/cm^2', example: '-0.034 C/m^2', units: ['C/m^2', 'C/cm^2'] },
  stiffness: { words: 'a stiffness', unit: 'GPa', example: '106 GPa', units: ['GPa'] },
  energyLength: { words: 'an energy times a length', unit: 'eV cm', example: '3.1e-8 eV cm', units: ['eV cm'] },
  contactResistivity: { words: 'a contact resistivity', unit: 'ohm cm^2', example: '1e-6 ohm cm^2', units: ['ohm cm^2', 'ohm um^2', 'mohm cm^2'] },
  resistivity: { words: 'a resistivity', unit: 'ohm cm', example: '0.01 ohm cm', units: ['ohm cm'] },
  sheetResistance: { words: 'a sheet resistance', unit: 'ohm', example: '120 ohm', units: ['ohm', 'kohm'] },
  currentDensity: { words: 'a current density', unit: 'A/cm^2', example: '1e-6 A/cm^2', units: ['A/cm^2'] },
  capacitance: { words: 'a capacitance per area', unit: 'F/cm^2', example: '1e-7 F/cm^2', units: ['F/cm^2'] },
  number: { words: 'a pure number', unit: '', example: '0.3', units: [] },
} as const satisfies Record<string, Kind>;

export type KindName = keyof typeof KINDS;
