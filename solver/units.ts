/**
 * The solver's units, and every conversion from and to others, named so that units cancel when read aloud.
 *
 * | quantity | unit | | quantity | unit |
 * |---|---|---|---|---|
 * | energy | eV | | potential | V |
 * | length | cm | | field | V/cm |
 * | density | cm^-3 | | sheet density | cm^-2 |
 * | temperature | K | | permittivity | F/cm |
 * | current density | A/cm^2 | | specific contact resistivity | ohm cm^2 |
 */
export const CM_PER_NM = 1e-7;
export const NM_PER_CM = 1e7;
export const CM_PER_UM = 1e-4;
export const M_PER_CM = 1e-2;
/** C/cm^2 in a C/m^2 */
export const C_CM2_PER_C_M2 = 1e-4;
/** m^-3 in a cm^-3 */
export const M3_PER_CM3 = 1e6;
/** F/m in a F/cm */
export const F_M_PER_F_CM = 100;
