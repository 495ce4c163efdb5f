import type { Design } from '../../src/design/types.ts';
import { isoLines } from '../../src/map/iso-lines.ts';
import { mapAxes, regimeMap } from '../../src/map/regime-map.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { chunkOf, CHUNK, variationJob } from '../../src/tolerance/variations.ts';
import { ASSUMPTIONS, doped, layer } from '../solver/stack-fixtures.ts';

type Ratio = (calls: number, body: () => void, rounds?: number) => number;

const five: Design = {
  format: 'halfmark-design/1', title: 'five layers', conditions: { temperature: '300 K' },
  variables: [{ name: 'Ncap', value: '1e19 cm^-3', tolerance: '10 %' }, { name: 'tbase', value: '200 nm', tolerance: '10 nm' }],
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

/** Map and tolerance run: goals are 1e7 for a map, and 8e4 for a variation, which is 10,000 on two cores in 4 s where Math.exp takes 10 ns. */
export function longRows(ratio: Ratio): { name: string; timesExp: number }[] {
  const mapped = layer('n', 100, [doped('donor', 1e17), doped('acceptor', 1e16)]);
  const map = regimeMap(mapped, ASSUMPTIONS, mapAxes());
  if (!map) throw new Error('no map');
  return [
    { name: 'regime map of a layer, 200 x 200', timesExp: ratio(1, () => void regimeMap(mapped, ASSUMPTIONS, mapAxes()), 7) },
    { name: 'a line of one value on it', timesExp: ratio(1, () => void isoLines(map.bandDistance, 200, 200, 3), 7) },
    { name: 'variation of five layers, no resistivity', timesExp: variation(ratio, ['layers.cap.sheet_ohm', 'junctions.2.builtin_V', 'contacts.top.depletion_nm']) },
    { name: 'the same with the contact resistivity', timesExp: variation(ratio, ['contacts.top.rho_c_ohm_cm2']) },
  ];
}

function variation(ratio: Ratio, figures: string[]): number {
  const planned = planVariations(five, { count: 10_000, seed: 1, figures });
  if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
  const job = variationJob(planned.plan);
  let chunk = 0;
  while (chunkOf(planned.plan, chunk).kind !== 'draws') chunk++;
  return ratio(CHUNK, () => void job.run(chunk++), 11);
}
