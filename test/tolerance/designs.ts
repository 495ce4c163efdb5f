import type { Design } from '../../src/design/types.ts';

/** A silicon diode with two toleranced variables in one thickness, a contact of given height, and requirements over a range. */
export const toleranced: Design = {
  format: 'halfmark-design/1', title: 'toleranced',
  variables: [
    { name: 'tcore', value: '300 nm', tolerance: '10 %' },
    { name: 'tskin', value: '100 nm', tolerance: '8 nm' },
    { name: 'Nn', value: '2e17 cm^-3', tolerance: '20 %' },
  ],
  conditions: { temperature: '300 K', temperatureRange: ['-40 degC', '125 degC'] },
  top: { kind: 'barrier', barrier: '0.55 eV' },
  layers: [
    { name: 'n', material: 'Si', thickness: 'tcore + 2*tskin', dopants: [{ dopant: 'P', concentration: 'Nn' }] },
    { name: 'p', material: 'Si', thickness: '1 um', dopants: [{ dopant: 'B', concentration: '1e16 cm^-3' }] },
  ],
  bottom: { kind: 'neutral' },
  requirements: [
    { quantity: 'barrierN', of: 'top', max: '0.55 eV' },
    { quantity: 'electronDensity', of: 'n', min: '1.5e17 cm^-3', over: 'temperatureRange' },
  ],
};
