import { rankMetals } from '../../src/contacts/rank-metals.ts';
import type { Design } from '../../src/design/types.ts';
import { size } from '../../src/requirements/size.ts';
import { contactPath } from '../../solver/contact-path.ts';
import { carrierConductance } from '../../solver/contact-resistivity.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import type { Transmission } from '../../solver/transmission.ts';
import { isRefusal, solveStack, type CrystalMaterial } from '../../solver/index.ts';
import { CRYSTAL } from '../solver/poisson-fixtures.ts';
import { barrier, doped, layer, stackOf } from '../solver/stack-fixtures.ts';
import type { BenchRow, Ratio, Taken } from './ratio.ts';

const SILICON: CrystalMaterial = { ...CRYSTAL, tunnellingMass: { electron: 0.26, hole: 0.16 }, richardson: { electron: 110, hole: 79 } };

const CONTACT: Design = {
  format: 'halfmark-design/1', title: 'contact', conditions: { temperature: '300 K', temperatureRange: ['233 K', '398 K'] },
  variables: [{ name: 'Ncap', value: '1e20 cm^-3', tolerance: '20 %', range: ['1e19 cm^-3', '1e21 cm^-3'] }],
  top: { kind: 'barrier', metal: 'Al', imageForce: true },
  layers: [
    { name: 'cap', material: 'Si', thickness: '60 nm', dopants: [{ dopant: 'P', concentration: 'Ncap' }] },
    { name: 'base', material: 'Si', thickness: '400 nm', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] },
  ],
  bottom: { kind: 'neutral' },
  requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-7 ohm cm^2', over: 'temperatureRange' }],
};

/** Contact resistivities on solved stacks (goals: 2e4 by WKB, 2.5e4 exactly), one doping sized against one of them (0.5 s), and metals ranked (0.3 s), where Math.exp takes 10 ns. */
export function contactRows(ratio: Ratio): BenchRow[] {
  return [
    { name: 'contact resistivity by WKB, 1e19, image force', ...conduction(ratio, 'wkb', 1e19), goal: 2e4 },
    { name: 'the same at 1e20', ...conduction(ratio, 'wkb', 1e20), goal: 2e4 },
    { name: 'by the wave equation at 1e20', ...conduction(ratio, 'exact', 1e20), goal: 2.5e4 },
    { name: 'a doping sized against a contact, corners', ...ratio(1, () => void sized(), 3, 1), goal: 5e7 },
    { name: 'metals ranked on n-silicon', ...ratio(1, ranked, 3, 1), goal: 3e7 },
  ];
}

function conduction(ratio: Ratio, transmission: Transmission, N: number): Taken {
  const answer = solveStack(stackOf([layer('n', 200, [doped('donor', N, 0.045, 'complete')], SILICON)], { top: barrier(0.6) }), { contacts: false });
  if (isRefusal(answer)) throw new Error(answer.reason);
  const path = contactPath(answer.stack, answer.profiles, spaceChargeOf(answer.stack, answer.profiles), 'top');
  if (!path) throw new Error('no neutral layer');
  return ratio(20, () => { for (let k = 0; k < 20; k++) carrierConductance(answer.stack, path, 'electron', { transmission }); });
}

function sized(): void {
  const answer = size(CONTACT, { variable: 'Ncap', tolerances: 'stated' });
  if (answer.kind !== 'sized') throw new Error(JSON.stringify(answer.complaints));
}

function ranked(): void {
  const run = rankMetals(CONTACT, { side: 'top' });
  for (;;) {
    const step = run.next();
    if (!step.done) continue;
    if (step.value.kind !== 'ranked') throw new Error(JSON.stringify(step.value));
    return;
  }
}
