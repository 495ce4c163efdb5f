/** Physical constants, SI 2019 exact values and CODATA 2018 (Tiesinga et al., Rev. Mod. Phys. 93, 025010, 2021), in solver units. */

/** Boltzmann constant, eV/K (exact, from the SI values of k and e). */
export const BOLTZMANN = 8.617333262e-5;
/** Elementary charge, C (exact). */
export const ELEMENTARY_CHARGE = 1.602176634e-19;
/** Planck constant, J s (exact). */
export const PLANCK = 6.62607015e-34;
/** Electric constant, F/cm. */
export const EPSILON_0 = 8.8541878128e-14;
/** Electron mass, kg. */
export const ELECTRON_MASS = 9.1093837015e-31;
