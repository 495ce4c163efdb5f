import type { DopantInput, GapInput, MaterialInput } from '../../src/design/types.ts';
import type { Dice } from './dice.ts';

const SOURCE = 'drawn at random';

/** A semiconductor of one's own: any law that the document knows, any figures that a crystal could have and some that none has. */
export function randomCrystal(dice: Dice, id: string): MaterialInput {
  const gap = dice.logBetween(0.1, 7);
  const mass = (): number | number[] => {
    const m = Number(dice.logBetween(0.01, 5).toPrecision(3));
    // A mass that grows with T, as silicon's does; positive up to 1000 K.
    return dice.chance(0.2) ? [m, Number(((m * dice.between(-0.5, 1)) / 1000).toPrecision(3))] : m;
  };
  const eps = dice.logBetween(2, 300);
  const material: MaterialInput = {
    id, gap: randomGap(dice, gap), affinity: `${dice.between(0.5, 6).toFixed(3)} eV`, affinityShare: Number(dice.between(0, 1).toFixed(2)),
    permittivity: Number(eps.toPrecision(4)), electronMass: mass(), holeMass: mass(), source: SOURCE,
  };
  if (dice.chance(0.5)) material.permittivityHighFrequency = Number((1 + (eps - 1) * dice.between(0.1, 1)).toPrecision(4));
  if (dice.chance(0.5)) material.neutralityLevel = `${(gap * dice.between(0.1, 0.9)).toFixed(3)} eV`;
  if (dice.chance(0.5)) material.pinningSlope = Number(dice.between(0, 1).toFixed(2));
  if (dice.chance(0.3)) material.nonParabolicity = { electron: `${dice.logBetween(0.1, 20).toPrecision(3)} eV^-1`, hole: `${dice.logBetween(0.1, 5).toPrecision(3)} eV^-1` };
  if (dice.chance(0.3)) material.tunnellingMass = { electron: Number(dice.logBetween(0.02, 1).toPrecision(3)), hole: Number(dice.logBetween(0.02, 1).toPrecision(3)) };
  if (dice.chance(0.3)) material.mobility = { electron: `${dice.logBetween(1, 1e5).toPrecision(3)} cm^2/(V s)`, hole: { min: '10 cm^2/(V s)', max: `${dice.logBetween(20, 1e4).toPrecision(3)} cm^2/(V s)`, reference: '1e17 cm^-3', exponent: 0.7 } };
  if (dice.chance(0.3)) material.narrowing = { law: 'slotboom', energy: `${dice.between(2, 12).toFixed(2)} meV`, reference: '1e17 cm^-3', constant: 0.5, conductionShare: Number(dice.between(0, 1).toFixed(2)) };
  if (dice.chance(0.25)) material.otherValleys = [{ name: 'X', gap: `${(gap * dice.between(0.9, 1.5)).toFixed(4)} eV`, electronMass: Number(dice.logBetween(0.1, 2).toPrecision(3)) }];
  if (dice.chance(0.4)) {
    material.polarisation = {
      spontaneous: `${dice.between(-0.09, 0).toFixed(4)} C/m^2`, e31: `${dice.between(-0.8, -0.2).toFixed(3)} C/m^2`, e33: `${dice.between(0.5, 1.6).toFixed(3)} C/m^2`,
      c13: `${dice.between(60, 130).toFixed(1)} GPa`, c33: `${dice.between(180, 420).toFixed(1)} GPa`, lattice: `${dice.between(0.31, 0.33).toFixed(5)} nm`,
    };
  }
  if (dice.chance(0.4)) material.naturalValence = { scale: dice.pick(['own', 'III-V']), edge: `${dice.between(-2, 0.5).toFixed(3)} eV` };
  return material;
}

/** Gap laws keep the gap positive to 1000 K, but for what narrowing takes. */
function randomGap(dice: Dice, gap: number): GapInput {
  const law = dice.random();
  if (law < 0.25) return `${gap.toFixed(4)} eV`;
  if (law < 0.5) return { law: 'linear', at300K: `${gap.toFixed(4)} eV`, slope: `${((gap * dice.between(-0.2, 0.6)) / 1000).toExponential(3)} eV/K` };
  if (law < 0.7) return { law: 'odonnell-chen', zeroK: `${gap.toFixed(4)} eV`, coupling: Number(Math.min(4, gap * dice.between(0.2, 2)).toFixed(2)), phonon: `${dice.between(10, 100).toFixed(1)} meV` };
  return { zeroK: `${gap.toFixed(4)} eV`, alpha: `${((gap * dice.between(0, 0.6)) / 1000).toExponential(3)} eV/K`, beta: `${dice.between(0, 1500).toFixed(0)} K` };
}

/** An insulator of one's own. */
export function randomInsulator(dice: Dice, id: string): MaterialInput {
  return { id, insulator: true, gap: `${dice.between(3, 12).toFixed(2)} eV`, affinity: `${dice.between(0, 4).toFixed(2)} eV`, permittivity: Number(dice.logBetween(1, 300).toPrecision(3)), source: SOURCE };
}

/** A mixed crystal of two crystals, with bowing of several kinds. */
export function randomAlloy(dice: Dice, id: string, first: string, second: string): MaterialInput {
  const bow = (size: number): string => `${dice.between(-size, size).toFixed(3)} eV`;
  return {
    id, source: SOURCE,
    alloy: { first, second, ...(dice.chance(0.7) ? { bowing: { gap: dice.chance(0.3) ? [bow(0.2), bow(0.2)] : bow(0.3), affinity: bow(0.3), permittivity: Number(dice.between(-0.5, 0.5).toFixed(2)), naturalValence: bow(0.2) } } : {}) },
  };
}

/** Dopants of one's own in a host: single levels and centres of two or three, donors and acceptors mixed. */
export function randomDopants(dice: Dice, host: string, alloy: boolean): DopantInput[] {
  const level = (id: string): DopantInput => {
    const depth = (): string => `${(dice.chance(0.05) ? dice.between(-60, 0) : dice.logBetween(1, 600)).toFixed(2)} meV`;
    const entry: DopantInput = { id, host, kind: dice.pick(['donor', 'acceptor'] as const), depth: alloy && dice.chance(0.5) ? { points: [[0, depth()], [0.4, depth()], [1, depth()]] } : depth(), source: SOURCE };
    if (dice.chance(0.5)) entry.degeneracy = dice.pick([0.25, 0.5, 1, 2, 4, 6, 12]);
    const law = dice.random();
    const density = (low: number, high: number): string => `${dice.logBetween(low, high).toExponential(3)} cm^-3`;
    if (law < 0.25) entry.merging = { depthReference: density(1e16, 1e20), depthExponent: Number(dice.between(0.5, 3).toFixed(2)), boundReference: density(1e17, 1e20), boundExponent: Number(dice.between(1, 4).toFixed(2)) };
    else if (law < 0.5) entry.screened = { coefficient: `${dice.logBetween(1e-8, 1e-7).toExponential(2)} eV cm`, mottDensity: density(1e16, 1e20), ...(dice.chance(0.5) ? { boundExponent: Number(dice.between(1, 4).toFixed(2)) } : {}) };
    return entry;
  };
  const out = [level('own-1'), level('own-2')];
  if (dice.chance(0.7)) for (let i = 0; i < 2 + dice.whole(2); i++) out.push({ ...level(`centre-${i + 1}`), centre: 'own' });
  return out;
}
