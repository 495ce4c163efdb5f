/** What every figure that rests on a mobility leaves out; said wherever such a figure is asked for away from room temperature. */
export const MOBILITY_NOTE = 'Mobilities are those of 300 K at every temperature: away from it, resistivities and sheet resistances follow the number of carriers alone.';

/** Fields of a layer in the result, and quantities of a requirement, that rest on a mobility. */
const FIELDS: ReadonlySet<string> = new Set(['mobility_cm2_Vs', 'mobility_n_cm2_Vs', 'mobility_p_cm2_Vs', 'resistivity_ohm_cm', 'sheet_ohm', 'resistivity', 'sheetResistance']);

/** @param name  a figure's path, such as "layers.cap.sheet_ohm", or a requirement's quantity */
export function restsOnMobility(name: string): boolean {
  return FIELDS.has(name.slice(name.lastIndexOf('.') + 1));
}

/** K, what the mobilities are of. */
const ROOM_K = 300;

/** @returns the note, where one of the figures rests on a mobility and one of its temperatures (K) is another than room temperature */
export function mobilityNotes(asked: readonly { name: string; temperatures_K: readonly number[] }[]): string[] {
  return asked.some(({ name, temperatures_K }) => restsOnMobility(name) && temperatures_K.some((T) => T !== ROOM_K)) ? [MOBILITY_NOTE] : [];
}
