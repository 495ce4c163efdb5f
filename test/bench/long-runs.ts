import { isoLines } from '../../src/map/iso-lines.ts';
import { mapAxes, regimeMap } from '../../src/map/regime-map.ts';
import { size } from '../../src/requirements/size.ts';
import { planSweep, sweepJob } from '../../src/sweep/sweep.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { chunkOf, CHUNK, variationJob } from '../../src/tolerance/variations.ts';
import { ASSUMPTIONS, doped, layer } from '../solver/stack-fixtures.ts';
import { FIVE_LAYERS } from './five-layers.ts';
import type { BenchRow, Ratio, Taken } from './ratio.ts';

/** A variation of this many Math.exp is 10,000 on two cores in 4 s where Math.exp takes 10 ns. */
const VARIATION = 8e4;

/** Map, tolerance run, sweep and sizing. */
export function longRows(ratio: Ratio): BenchRow[] {
  const mapped = layer('n', 100, [doped('donor', 1e17), doped('acceptor', 1e16)]);
  const map = regimeMap(mapped, ASSUMPTIONS, mapAxes());
  if (!map) throw new Error('no map');
  return [
    { name: 'regime map of a layer, 200 x 200', ...ratio(1, () => void regimeMap(mapped, ASSUMPTIONS, mapAxes()), 7), goal: 1e7 },
    { name: 'a line of one value on it', ...ratio(1, () => void isoLines(map.bandDistance, 200, 200, 3), 7) },
    { name: 'variation of five layers, no resistivity', ...variation(ratio, ['layers.cap.sheet_ohm', 'junctions.2.builtin_V', 'contacts.top.depletion_nm']), goal: VARIATION },
    { name: 'the same with the contact resistivity', ...variation(ratio, ['contacts.top.rho_c_ohm_cm2']), goal: VARIATION },
    { name: 'the same with all the usual figures', ...variation(ratio, []), goal: VARIATION },
    { name: 'point of a sweep of five layers, the usual figures', ...sweepPoint(ratio) },
    { name: 'solve of sizing five layers, two requirements', ...sizingSolve(ratio) },
  ];
}

function variation(ratio: Ratio, figures: string[]): Taken {
  const planned = planVariations(FIVE_LAYERS, { count: 10_000, seed: 1, figures });
  if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
  const job = variationJob(planned.plan);
  let chunk = 0;
  while (chunkOf(planned.plan, chunk).kind !== 'draws') chunk++;
  return ratio(CHUNK, () => void job.run(chunk++), 11);
}

function sweepPoint(ratio: Ratio): Taken {
  const planned = planSweep(FIVE_LAYERS, { axis: { variable: 'Ncap', from: '1e18 cm^-3', to: '1e20 cm^-3', points: 2000, scale: 'log' } });
  if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
  const job = sweepJob(planned.plan);
  let chunk = 0;
  return ratio(job.size(0), () => void job.run(chunk++), 11);
}

function sizingSolve(ratio: Ratio): Taken {
  const design = { ...FIVE_LAYERS, requirements: [{ quantity: 'sheetResistance', of: 'cap', max: '400 ohm' }, { quantity: 'peakField', of: 'base', max: '1e5 V/cm' }] };
  const sized = (): number => {
    const answer = size(design, { variable: 'Ncap', tolerances: 'stated', points: 9 });
    if (answer.kind !== 'sized') throw new Error(JSON.stringify(answer.complaints));
    return answer.evaluations;
  };
  return ratio(sized(), () => void sized(), 3);
}
