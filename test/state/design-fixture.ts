import type { Design } from '../../src/design/types.ts';

/** A small invented stack with one of everything that commands touch. A fresh copy at each call. */
export function designFixture(): Design {
  return {
    format: 'halfmark-design/1',
    title: 'three layers',
    variables: [{ name: 'Ncap', value: '1e19 cm^-3', tolerance: '10 %' }],
    conditions: { temperature: '300 K', temperatureRange: ['-40 degC', '125 degC'] },
    top: { kind: 'barrier', metal: 'Ti' },
    layers: [
      { name: 'cap', material: 'GaAs', thickness: '40 nm', dopants: [{ dopant: 'Si', concentration: '2*Ncap' }] },
      { name: 'spacer', material: 'AlGaAs', x: '0.3', thickness: '20 nm', dopants: [] },
      { name: 'buffer', material: 'GaAs', thickness: '1 um', dopants: [{ dopant: 'C', concentration: '1e15 cm^-3' }] },
    ],
    interfaces: [
      { above: 'cap', sheetCharge: '1e11 cm^-2' },
      { above: 'spacer', dEc: '-0.23 eV' },
    ],
    bottom: { kind: 'neutral' },
    requirements: [
      { quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' },
      { quantity: 'fullyDepleted', of: 'spacer', max: true },
    ],
  };
}
