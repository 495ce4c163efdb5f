import { checkDesign } from '../../src/design/read.ts';
import type { Design } from '../../src/design/types.ts';

/** A metal on a thin n layer over a lightly doped one, silicon: two dopings, two thicknesses and a barrier are uncertain. */
export function contactDesign(change: (design: Design) => void = () => {}): Design {
  const design: Design = {
    format: 'halfmark-design/1',
    title: 'metal on silicon',
    variables: [
      { name: 'Ncap', value: '5e19 cm^-3', tolerance: '10 %', range: ['1e18 cm^-3', '5e20 cm^-3'] },
      { name: 'tcap', value: '60 nm', tolerance: '3 nm', range: ['20 nm', '200 nm'] },
    ],
    conditions: { temperature: '300 K', temperatureRange: ['-40 degC', '125 degC'] },
    top: { kind: 'barrier', barrier: '0.55 eV', imageForce: false },
    layers: [
      { name: 'cap', material: 'Si', thickness: 'tcap', dopants: [{ dopant: 'P', concentration: 'Ncap' }] },
      { name: 'base', material: 'Si', thickness: '400 nm', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] },
    ],
    bottom: { kind: 'neutral' },
  };
  change(design);
  const reading = checkDesign(design);
  if (!reading.ok) throw new Error(reading.complaints.map((c) => `${c.path}: ${c.message}`).join('\n'));
  return reading.design;
}
