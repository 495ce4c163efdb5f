import { describe, expect, it } from 'vitest';
import { ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { CrystalMaterial, Dopant, Layer } from '../../solver/stack.ts';
import { CRYSTAL } from './poisson-fixtures.ts';
import { expectSound } from './invariants.ts';
import { barrier, doped, layer, stackOf } from './stack-fixtures.ts';

const EPS = 11.7 * EPSILON_0;
const KT = 8.617333262e-5 * 300;
const donors = (n: number) => [doped('donor', n, 0, 'complete')];
const acceptors = (n: number) => [doped('acceptor', n, 0, 'complete')];
const solved = (layers: Layer[], options: Parameters<typeof stackOf>[1] = {}, accuracy = 1e-5) => expectSound(solveStack(stackOf(layers, options), { accuracy }), accuracy);
const OXIDE: CrystalMaterial = { ...CRYSTAL, id: 'oxide', insulator: true, gap: { zeroK: 8.9, alpha: 0, beta: 1 }, affinity: 0.95, permittivity: 3.9, electronMass: undefined, holeMass: undefined };
/** Acceptors implanted into a donor background: the junction lies inside the layer. */
const implanted = (peak: number, background: number): Dopant[] => [
  { ...doped('acceptor', 0, 0, 'complete'), concentration: { kind: 'implant', peak, depth: 0, straggle: 100e-7, background: 0 } },
  doped('donor', background, 0, 'complete'),
];

describe('the peak field of a junction', () => {
  it('does not depend on how thick its sides are', () => {
    const reference = solved([layer('p', 400, acceptors(1e17)), layer('n', 1500, donors(1e16))]).junctions[0].peakField;
    for (const [thickP, thickN] of [[100, 1500], [400, 20000], [30000, 700]]) {
      expect(Math.abs(solved([layer('p', thickP, acceptors(1e17)), layer('n', thickN, donors(1e16))]).junctions[0].peakField / reference - 1), `${thickP}, ${thickN}`).toBeLessThan(1e-3);
    }
  });

  it('is not that of a stronger junction nearby', () => {
    // n between p+ and p: both junctions end within the same thin layer.
    const s = solved([layer('p+', 200, acceptors(5e18)), layer('n', 180, donors(1e17)), layer('p', 1000, acceptors(2e15))]);
    const weak = solved([layer('n', 180, donors(1e17)), layer('p', 1000, acceptors(2e15))]).junctions[0];
    const at = s.profiles.layer.lastIndexOf(1);
    expect(s.junctions[1].peakField).toBeLessThan(0.5 * s.junctions[0].peakField);
    expect(Math.abs(s.junctions[1].peakField / Math.abs(s.profiles.field[at]) - 1)).toBeLessThan(1e-9);
    expect(Math.abs(s.junctions[1].peakField / weak.peakField - 1)).toBeLessThan(0.05);
  });

  it('counts only the field at the interface where one space charge fills the layer from junction to junction', () => {
    const s = solved([layer('n+', 200, donors(1e19)), layer('n', 30, donors(1e16)), layer('p', 2000, acceptors(1e17))]);
    const fields = [0, 1].map((l) => Math.abs(s.profiles.field[s.profiles.layer.lastIndexOf(l)]));
    expect(s.junctions[0].peakField).toBeCloseTo(fields[0], -1);
    expect(s.junctions[1].peakField).toBeGreaterThanOrEqual(fields[1]);
  });

  it('is not that of a contact at the far end of its layer', () => {
    // A metal on a thin layer bends it far more than the step from n to n+ below.
    const s = solved([layer('n', 300, donors(1e17)), layer('n+', 300, donors(3e17))], { top: barrier(0.8) });
    const step = solved([layer('n', 300, donors(1e17)), layer('n+', 300, donors(3e17))]).junctions[0].peakField;
    expect(Math.abs(s.contacts[0].surfaceField)).toBeGreaterThan(3 * step);
    expect(Math.abs(s.junctions[0].peakField / step - 1)).toBeLessThan(0.01);
  });

  it('is found where donors and acceptors cross inside a layer', () => {
    const s = solved([layer('well', 400, implanted(1e18, 1e16)), layer('n', 1500, donors(1e16))]);
    let most = 0;
    s.profiles.field.forEach((f, i) => (most = s.profiles.layer[i] === 0 && s.profiles.z[i] > 200e-7 ? Math.max(most, Math.abs(f)) : most));
    expect(Math.abs(s.junctions[0].peakField / most - 1)).toBeLessThan(1e-3);
  });

  it('of an oxide is the field in the oxide', () => {
    const s = solved([layer('oxide', 5, [], OXIDE), layer('p', 1000, acceptors(1e17))], { top: barrier(2.6) });
    expect(Math.abs(s.junctions[0].peakField / Math.abs(s.profiles.field[0]) - 1)).toBeLessThan(1e-6);
  });
});

describe('depletion edges', () => {
  it('are the same whichever way round the stack is read, and null where nothing is doped', () => {
    const p = layer('p', 300, acceptors(1e18));
    const n = layer('n', 1500, donors(1e16));
    const [one] = solved([p, n]).junctions;
    const [other] = solved([n, p]).junctions;
    expect(Math.abs(one.depletionAbove! / other.depletionBelow! - 1)).toBeLessThan(2e-3);
    expect(Math.abs(one.depletionBelow! / other.depletionAbove! - 1)).toBeLessThan(2e-3);
    const pin = solved([p, layer('i', 200, []), n]).junctions;
    expect(pin.map((j) => [j.depletionAbove === null, j.depletionBelow === null])).toEqual([[false, true], [true, false]]);
    expect(solved([layer('oxide', 5, [], OXIDE), layer('p', 1000, acceptors(1e17))], { top: barrier(2.6) }).junctions[0].depletionAbove).toBeNull();
  });

  it('of an accumulated side lie at the interface, of a depleted one within a Debye length of the depletion approximation', () => {
    const [step] = solved([layer('n+', 200, donors(1e18)), layer('n', 1500, donors(1e16))]).junctions;
    expect(step.depletionBelow).toBe(0);
    const s = solved([layer('p', 300, acceptors(1e18)), layer('n', 1500, donors(1e16))]);
    const W = Math.sqrt((2 * EPS * (s.junctions[0].builtIn! - 2 * KT)) / (ELEMENTARY_CHARGE * 1e16));
    expect(Math.abs(s.junctions[0].depletionBelow! - W)).toBeLessThan(s.layers[1].debyeLength!);
  });

  it('shrink to nothing steadily as the charge at the interface falls to half', () => {
    // A weaker and weaker n+ side: near 7.6e16 the share at its face passes 0.5.
    const widths = [1e17, 9e16, 8.5e16, 8e16, 7.8e16, 7.4e16, 6e16].map((N) => solved([layer('n+', 500, donors(N)), layer('n', 2000, donors(1e16))], {}, 1e-6).junctions[0].depletionAbove!);
    for (let i = 1; i < widths.length; i++) expect(widths[i]).toBeLessThanOrEqual(widths[i - 1]);
    expect(widths[0]).toBeGreaterThan(0.9e-7);
    expect(widths[4]).toBeGreaterThan(0);
    expect(widths[4]).toBeLessThan(0.15e-7);
    expect(widths.slice(5)).toEqual([0, 0]);
  });

  it('run on through the crossing of donors and acceptors inside a layer', () => {
    const s = solved([layer('n', 1500, donors(1e16)), layer('well', 400, [...implanted(1e18, 1e16)].map((d) => (d.kind === 'acceptor' ? { ...d, concentration: { kind: 'implant' as const, peak: 1e18, depth: 400e-7, straggle: 100e-7, background: 0 } } : d)))]);
    const [j] = s.junctions;
    // The crossing lies 303 nm above the peak, 97 nm below the interface, and the depletion reaches beyond it.
    expect(j.depletionBelow!).toBeGreaterThan(97e-7);
    expect(j.depletionBelow!).toBeLessThan(250e-7);
    expect(j.depletionAbove!).toBeGreaterThan(50e-7);
  });
});

describe('a fully depleted layer', () => {
  const thin = (thickness: number) => solved([layer('p', 300, acceptors(1e18)), layer('n', thickness, donors(1e17)), layer('p2', 300, acceptors(1e18))]).layers.map((l) => l.fullyDepleted);

  it('may be depleted from both sides, where neither side would do alone', () => {
    const [alone] = solved([layer('p', 300, acceptors(1e18)), layer('n', 1000, donors(1e17))]).junctions;
    const thickness = 1.6 * alone.depletionBelow! * 1e7;
    expect(thin(thickness)).toEqual([false, true, false]);
    expect(thin(3 * thickness)).toEqual([false, false, false]);
  });

  it('may hold the skin into which its neighbour spills, and no more', () => {
    const wide: CrystalMaterial = { ...CRYSTAL, id: 'wide', gap: { zeroK: 1.9, alpha: 4.73e-4, beta: 636 }, affinity: 4, electronMass: [0.3] };
    const full: CrystalMaterial = { ...CRYSTAL, id: 'full', electronMass: [0.3] };
    const supply = (thickness: number) => solved([layer('supply', thickness, donors(1e18), wide), layer('full', 500, donors(1e19), full)], { top: barrier(0.9) });
    const spilt = supply(25);
    // Electrons of the degenerate layer below make up for most of the donors at the interface itself.
    const last = spilt.profiles.layer.lastIndexOf(0);
    expect(spilt.profiles.charge[last] / 1e18).toBeLessThan(0.3);
    expect(spilt.layers[0].fullyDepleted).toBe(true);
    expect(supply(60).layers[0].fullyDepleted).toBe(false);
  });

  it('is doped: an undoped layer is never called so', () => {
    expect(solved([layer('p', 200, acceptors(1e18)), layer('i', 100, []), layer('n', 200, donors(1e18))]).layers[1].fullyDepleted).toBe(false);
  });

  it('ends at a contact only where it is depleted there', () => {
    // 60 nm of 1e17 under 0.8 eV: depleted to an insulating floor, but not to an ohmic contact, which holds its neutral carriers.
    expect(solved([layer('n', 60, donors(1e17))], { top: barrier(0.8), bottom: { kind: 'open', sheetCharge: 0 } }).layers[0].fullyDepleted).toBe(true);
    expect(solved([layer('n', 60, donors(1e17))], { top: barrier(0.8) }).layers[0].fullyDepleted).toBe(false);
  });
});
