/**
 * The quantities of a result, each once: which field of the result it is, its heading (symbols of the field where there are such), what it means in words, and the unit in which it is
 * shown. Tables, exports and workings take their words from here.
 */
export interface Quantity {
  /** key in the result's row */ field: string;
  heading: string;
  words: string;
  /** as shown; empty for words and pure numbers */ unit: string;
  kind: 'words' | 'figure';
}

export type QuantityTable = 'layers' | 'junctions' | 'contacts';

export const QUANTITIES = {
  layers: {
    material: { field: 'material', heading: 'Material', words: 'material and composition', unit: '', kind: 'words' },
    thickness: { field: 'thickness_nm', heading: 'Thickness', words: 'thickness', unit: 'nm', kind: 'figure' },
    regime: { field: 'regime', heading: 'Regime', words: 'type and regime of the neutral layer', unit: '', kind: 'words' },
    ecMinusEf: { field: 'ec_minus_ef_eV', heading: 'Ec − EF', words: 'conduction band edge above the Fermi level in the neutral layer', unit: 'eV', kind: 'figure' },
    efMinusEv: { field: 'ef_minus_ev_eV', heading: 'EF − Ev', words: 'Fermi level above the valence band edge in the neutral layer', unit: 'eV', kind: 'figure' },
    n: { field: 'n_cm3', heading: 'n', words: 'electrons in the neutral layer', unit: 'cm⁻³', kind: 'figure' },
    p: { field: 'p_cm3', heading: 'p', words: 'holes in the neutral layer', unit: 'cm⁻³', kind: 'figure' },
    ionised: { field: 'ionised', heading: 'Ionised, neutral / depleted', words: 'share of each active dopant that is ionised: in the neutral layer / where the layer is depleted; copied and sorted: share of all in the neutral layer', unit: '%', kind: 'figure' },
    textbook: { field: 'boltzmann', heading: 'Textbook Ec − EF is off by', words: 'what Boltzmann statistics with every dopant ionised would give for Ec − EF, less the figure in force', unit: 'meV', kind: 'figure' },
    debye: { field: 'debye_nm', heading: 'Debye length', words: 'screening length of both carriers', unit: 'nm', kind: 'figure' },
    mobility: { field: 'mobility_cm2_Vs', heading: 'Mobility', words: 'mobility of the majority carrier', unit: 'cm²/(V s)', kind: 'figure' },
    resistivity: { field: 'resistivity_ohm_cm', heading: 'Resistivity', words: 'resistivity of the neutral layer', unit: 'Ω cm', kind: 'figure' },
    sheet: { field: 'sheet_ohm', heading: 'Sheet resistance', words: 'sheet resistance of the neutral layer, depletion left out', unit: 'Ω/sq', kind: 'figure' },
    gap: { field: 'gap_eV', heading: 'Gap', words: 'band gap', unit: 'eV', kind: 'figure' },
    affinity: { field: 'affinity_eV', heading: 'Affinity', words: 'electron affinity', unit: 'eV', kind: 'figure' },
    ni: { field: 'ni_cm3', heading: 'ni', words: 'intrinsic density', unit: 'cm⁻³', kind: 'figure' },
    nc: { field: 'nc_cm3', heading: 'Nc', words: 'effective density of states of the conduction band', unit: 'cm⁻³', kind: 'figure' },
    nv: { field: 'nv_cm3', heading: 'Nv', words: 'effective density of states of the valence band', unit: 'cm⁻³', kind: 'figure' },
  },
  junctions: {
    builtin: { field: 'builtin_V', heading: 'Built-in', words: 'built-in potential: neutral potential below less that above', unit: 'V', kind: 'figure' },
    deltaEc: { field: 'delta_ec_eV', heading: 'ΔEc', words: 'step of the conduction band edge, below less above', unit: 'eV', kind: 'figure' },
    deltaEv: { field: 'delta_ev_eV', heading: 'ΔEv', words: 'step of the valence band edge, below less above', unit: 'eV', kind: 'figure' },
    class: { field: 'class', heading: 'Line-up', words: 'line-up of the two gaps', unit: '', kind: 'words' },
    sheetCharge: { field: 'sheet_charge_cm2', heading: 'Sheet charge', words: 'fixed charge on the interface, polarisation included, in units of +q', unit: 'q cm⁻²', kind: 'figure' },
    peakField: { field: 'peak_field_V_cm', heading: 'Peak field', words: 'largest field beside the interface', unit: 'kV/cm', kind: 'figure' },
    depletionAbove: { field: 'depletion_above_nm', heading: 'Depleted above', words: 'depletion width in the layer above; the depletion approximation beside it', unit: 'nm', kind: 'figure' },
    depletionBelow: { field: 'depletion_below_nm', heading: 'Depleted below', words: 'depletion width in the layer below; the depletion approximation beside it', unit: 'nm', kind: 'figure' },
    capacitance: { field: 'capacitance_F_cm2', heading: 'Capacitance', words: 'depletion capacitance at zero bias', unit: 'nF/cm²', kind: 'figure' },
  },
  contacts: {
    kind: { field: 'kind', heading: 'Kind', words: 'kind of contact, or its metal', unit: '', kind: 'words' },
    barrierN: { field: 'barrier_n_eV', heading: 'φBn', words: 'barrier for electrons, without the image-force lowering', unit: 'eV', kind: 'figure' },
    barrierP: { field: 'barrier_p_eV', heading: 'φBp', words: 'barrier for holes, without the image-force lowering', unit: 'eV', kind: 'figure' },
    source: { field: 'barrier_source', heading: 'Barrier', words: 'where the barrier comes from', unit: '', kind: 'words' },
    rhoC: { field: 'rho_c_ohm_cm2', heading: 'Contact resistivity', words: 'specific contact resistivity at zero bias through the solved barrier, both carriers', unit: 'Ω cm²', kind: 'figure' },
    rhoCClosed: { field: 'rho_c_closed_form_ohm_cm2', heading: 'Closed form', words: 'contact resistivity by the textbook’s closed form of the regime: majority alone, depletion approximation, no image force', unit: 'Ω cm²', kind: 'figure' },
    closedRatio: { field: 'rho_c_closed_form_ohm_cm2', heading: 'Solved / closed', words: 'how many times the solved contact resistivity is that of the closed form: how wrong the textbook would be', unit: '', kind: 'figure' },
    rhoCFloor: { field: 'rho_c_floor_ohm_cm2', heading: 'Its floor', words: 'least contact resistivity that the majority carriers allow, without any barrier (ballistic limit)', unit: 'Ω cm²', kind: 'figure' },
    rhoCn: { field: 'rho_c_n_ohm_cm2', heading: 'of electrons', words: 'contact resistivity of electrons alone', unit: 'Ω cm²', kind: 'figure' },
    rhoCp: { field: 'rho_c_p_ohm_cm2', heading: 'of holes', words: 'contact resistivity of holes alone', unit: 'Ω cm²', kind: 'figure' },
    saturation: { field: 'saturation_A_cm2', heading: 'Saturation current', words: 'thermionic emission of the majority carriers over the lowered barrier', unit: 'A/cm²', kind: 'figure' },
    lowering: { field: 'lowering_eV', heading: 'Lowering', words: 'image-force lowering', unit: 'eV', kind: 'figure' },
    surfaceField: { field: 'surface_field_V_cm', heading: 'Surface field', words: 'field just inside the semiconductor, along the depth', unit: 'kV/cm', kind: 'figure' },
    depletion: { field: 'depletion_nm', heading: 'Depleted', words: 'depletion width under the contact', unit: 'nm', kind: 'figure' },
    e00: { field: 'e00_meV', heading: 'E00', words: 'characteristic energy of tunnelling', unit: 'meV', kind: 'figure' },
    transport: { field: 'transport', heading: 'Transport', words: 'how carriers pass the barrier', unit: '', kind: 'words' },
  },
} satisfies Record<QuantityTable, Record<string, Quantity>>;

/** What a column of the ledger takes from its quantity. */
export function columnOf<T extends QuantityTable>(table: T, id: keyof (typeof QUANTITIES)[T] & string): { id: string; heading: string; words: string; unit: string; kind: Quantity['kind'] } {
  const { heading, words, unit, kind } = QUANTITIES[table][id] as Quantity;
  return { id, heading, words, unit, kind };
}
