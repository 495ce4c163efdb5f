import type { Design } from '../../src/design/types.ts';

/** Eleven tolerances: two stated ones and the defaults of what no variable moves. */
export const FIVE_LAYERS: Design = {
  format: 'halfmark-design/1', title: 'five layers', conditions: { temperature: '300 K' },
  variables: [{ name: 'Ncap', value: '1e19 cm^-3', tolerance: '10 %', range: ['1e18 cm^-3', '1e20 cm^-3'] }, { name: 'tbase', value: '200 nm', tolerance: '10 nm' }],
  top: { kind: 'barrier', barrier: '0.6 eV' },
  layers: [
    { name: 'cap', material: 'Si', thickness: '40 nm', dopants: [{ dopant: 'P', concentration: 'Ncap' }] },
    { name: 'spacer', material: 'Si', thickness: '20 nm', dopants: [{ dopant: 'P', concentration: '1e16 cm^-3' }] },
    { name: 'base', material: 'Si', thickness: 'tbase', dopants: [{ dopant: 'B', concentration: '3e17 cm^-3' }] },
    { name: 'drift', material: 'Si', thickness: '500 nm', dopants: [{ dopant: 'P', concentration: '1e16 cm^-3' }] },
    { name: 'contact', material: 'Si', thickness: '300 nm', dopants: [{ dopant: 'P', concentration: '1e18 cm^-3' }] },
  ],
  bottom: { kind: 'neutral' },
};
