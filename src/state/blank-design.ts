import { DESIGN_FORMAT, type Design } from '../design/types.ts';

/** What a new project starts from: the least that can be solved and pulled about. */
export function blankDesign(title: string): Design {
  return {
    format: DESIGN_FORMAT,
    title,
    conditions: { temperature: '300 K' },
    top: { kind: 'neutral' },
    layers: [{ name: 'layer', material: 'Si', thickness: '1 um', dopants: [{ dopant: 'P', concentration: '1e16 cm^-3' }] }],
    bottom: { kind: 'neutral' },
  };
}
