import { describe, expect, it } from 'vitest';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { solveStack, isRefusal, type Stack } from '../../solver/index.ts';
import { uncertaintiesOf } from '../../src/requirements/uncertainties.ts';
import { contactDesign } from './designs.ts';

const labels = (design: Design, which?: 'all' | 'stated' | 'none'): string[] => uncertaintiesOf(design, {}, which).map((u) => u.label);

function stackOf(design: Design, moves: Record<string, number> = {}): Stack {
  const reading = toStack(design, {}, moves);
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.stack;
}

/** The stack with the uncertainty of that label moved by a count. */
function moved(design: Design, label: string, count: number): Stack {
  const found = uncertaintiesOf(design, {}).find((u) => u.label === label);
  if (!found) throw new Error(`no uncertainty ${label} among ${labels(design).join(', ')}`);
  return found.variable === null ? found.apply(stackOf(design), count) : stackOf(design, { [found.variable]: count });
}

const density = (stack: Stack, l: number): number => {
  const { concentration } = stack.layers[l].dopants[0];
  return concentration.kind === 'constant' ? concentration.value : NaN;
};

describe('the uncertainties of a design', () => {
  it('are its stated tolerances, and defaults for what no stated tolerance governs', () => {
    expect(labels(contactDesign())).toEqual(['Ncap', 'tcap', 'base P', 'base thickness', 'barrier']);
    expect(labels(contactDesign(), 'stated')).toEqual(['Ncap', 'tcap']);
    expect(labels(contactDesign(), 'none')).toEqual([]);
  });

  it('move a quantity with its variable and not twice, however far the variable is off', () => {
    const design = contactDesign((d) => {
      d.variables?.push({ name: 'Nbase', value: 'Ncap/500' }, { name: 'ttotal', value: '10*tcap' });
      d.layers[1].dopants = [{ dopant: 'P', concentration: { from: '2*Nbase', to: 'Nbase', shape: 'linear' } }];
      d.layers[1].thickness = 'ttotal - tcap';
    });
    expect(labels(design)).toEqual(['Ncap', 'tcap', 'barrier']);
    const up = moved(design, 'Ncap', 1);
    expect(density(up, 0)).toBeCloseTo(5.5e19, -14);
    const base = up.layers[1].dopants[0].concentration;
    expect(base.kind === 'linear' && base.from / 2.2e17).toBeCloseTo(1, 12);
    const thick = moved(design, 'tcap', 1);
    expect(thick.layers[0].thickness).toBeCloseTo(63e-7, 12);
    expect(thick.layers[1].thickness).toBeCloseTo(9 * 63e-7, 12);
  });

  it('keep defaults where the variable states no tolerance', () => {
    const design = contactDesign((d) => { delete d.variables?.[0].tolerance; });
    expect(labels(design)).toEqual(['tcap', 'cap P', 'base P', 'base thickness', 'barrier']);
    expect(density(moved(design, 'cap P', -1), 0) / 4e19).toBeCloseTo(1, 12);
  });

  it('leave out variables that no part of the stack uses', () => {
    expect(labels(contactDesign((d) => { d.variables?.push({ name: 'spare', value: '3 nm', tolerance: '1 nm' }); }))).not.toContain('spare');
  });

  it('take a stated tolerance of zero as certain', () => {
    for (const tolerance of ['0 %', '0 cm^-3', '0.0 %']) {
      const design = contactDesign((d) => { (d.variables as { tolerance?: string }[])[0].tolerance = tolerance; });
      expect(labels(design), tolerance).toEqual(['tcap', 'base P', 'base thickness', 'barrier']);
    }
  });

  it('take shares of the value, and amounts of its own kind to both sides', () => {
    const design = contactDesign();
    expect(density(moved(design, 'Ncap', -1), 0) / 4.5e19).toBeCloseTo(1, 12);
    expect(density(moved(design, 'Ncap', 0.5), 0) / 5.25e19).toBeCloseTo(1, 12);
    expect(moved(design, 'tcap', -1).layers[0].thickness / 57e-7).toBeCloseTo(1, 12);
    const degrees = contactDesign((d) => {
      d.variables?.push({ name: 'phi', value: '0.55 eV', tolerance: '± 40 meV' });
      d.top = { kind: 'barrier', barrier: 'phi + 0.01 eV' };
    });
    const { top } = moved(degrees, 'phi', 1);
    expect(top.kind === 'barrier' && top.source.from === 'given' && top.source.height).toBeCloseTo(0.6, 12);
  });

  it('have the default sizes: doping 20 %, dose 5 %, thickness 5 %, barrier 50 meV, offset 100 meV', () => {
    const design = contactDesign((d) => {
      d.layers[0].material = 'GaAs';
      d.layers[0].dopants = [{ dopant: 'Si', concentration: { peak: '5e18 cm^-3', depth: '30 nm', straggle: '10 nm', shape: 'gaussian', background: '1e16 cm^-3' } }];
      d.layers[1] = { name: 'wide', material: 'AlGaAs', x: '0.3', thickness: '200 nm', dopants: [{ dopant: 'Si', concentration: { points: [['0 nm', '1e17 cm^-3'], ['200 nm', '1e16 cm^-3']] } }] };
    });
    expect(labels(design)).toEqual(['tcap', 'cap Si', 'wide Si', 'wide thickness', 'barrier', 'offset below cap']);
    const implant = moved(design, 'cap Si', 1).layers[0].dopants[0].concentration;
    expect(implant).toMatchObject({ kind: 'implant', background: 1e16 });
    expect(implant.kind === 'implant' && implant.peak / 5.25e18).toBeCloseTo(1, 12);
    const points = moved(design, 'wide Si', -1).layers[1].dopants[0].concentration;
    expect(points.kind === 'points' && points.value.map((v) => Math.round(v / 1e14))).toEqual([800, 80]);
    expect(moved(design, 'wide thickness', 1).layers[1].thickness / 210e-7).toBeCloseTo(1, 12);
    const before = solved(stackOf(design));
    const after = solved(moved(design, 'offset below cap', -1));
    expect(after.junctions[0].deltaEc - before.junctions[0].deltaEc).toBeCloseTo(-0.1, 9);
    expect(after.junctions[0].deltaEv - before.junctions[0].deltaEv).toBeCloseTo(-0.1, 9);
  });

  it('move the barrier of a metal for its own carrier, whatever pins it', () => {
    for (const carrier of ['n', 'p'] as const) {
      for (const pinning of ['material', 'none', 'full'] as const) {
        const design = contactDesign((d) => { d.top = { kind: 'barrier', metal: 'Al', pinning, carrier }; });
        const [before, after] = [solved(stackOf(design)).contacts[0], solved(moved(design, 'barrier', 1)).contacts[0]];
        // A measured barrier may be that of the other carrier.
        const own = design.top.kind === 'barrier' && before.barrierSource === 'measured' ? measuredCarrier(stackOf(design)) : carrier;
        const [was, is] = own === 'n' ? [before.barrierN, after.barrierN] : [before.barrierP, after.barrierP];
        expect((is as number) - (was as number), `${carrier} ${pinning}`).toBeCloseTo(0.05, 9);
      }
    }
  });

  it('name both barriers where both ends have one, and the level of a pinned surface', () => {
    const design = contactDesign((d) => { d.bottom = { kind: 'pinned', level: '0.4 eV' }; });
    expect(labels(design)).toContain('top barrier');
    const { bottom } = moved(design, 'bottom barrier', -1);
    expect(bottom.kind === 'pinned' && bottom.level).toBeCloseTo(0.35, 12);
  });

  it('see no offset between layers of one crystal, and no more of one than the gaps of one alloy differ', () => {
    const same = contactDesign();
    expect(labels(same).some((l) => l.startsWith('offset'))).toBe(false);
    const near = contactDesign((d) => {
      d.layers[0] = { name: 'cap', material: 'AlGaAs', x: '0.20', thickness: 'tcap' };
      d.layers[1] = { name: 'base', material: 'AlGaAs', x: '0.21', thickness: '100 nm' };
    });
    const before = solved(stackOf(near)).junctions[0].deltaEc;
    const step = solved(moved(near, 'offset below cap', 1)).junctions[0].deltaEc - before;
    expect(step).toBeGreaterThan(0);
    expect(step).toBeLessThan(0.03);
  });

  it('leave an offset alone that a variable with a tolerance governs', () => {
    const design = contactDesign((d) => {
      d.variables?.push({ name: 'dEc', value: '-0.2 eV', tolerance: '30 meV' });
      d.layers[0] = { name: 'cap', material: 'AlGaAs', x: '0.3', thickness: 'tcap' };
      d.layers[1] = { name: 'base', material: 'GaAs', thickness: '100 nm' };
      d.interfaces = [{ above: 'cap', dEc: 'dEc' }];
    });
    expect(labels(design).filter((l) => /offset|dEc/.test(l))).toEqual(['dEc']);
    expect(moved(design, 'dEc', 1).interfaces[0].dEc).toBeCloseTo(-0.17, 12);
  });

  it('say their amounts in words', () => {
    const design = contactDesign((d) => { d.variables?.push({ name: 'phi', value: '0.5 eV', tolerance: '0.05 eV' }); });
    design.top = { kind: 'barrier', barrier: 'phi' };
    const words = Object.fromEntries(uncertaintiesOf(design, {}).map((u) => [u.label, [u.words(-1), u.words(0.5)]]));
    expect(words).toEqual({ Ncap: ['-10 %', '+5 %'], tcap: ['-3 nm', '+1.5 nm'], phi: ['-0.05 eV', '+0.025 eV'], 'base P': ['-20 %', '+10 %'], 'base thickness': ['-5 %', '+2.5 %'] });
  });
});

function solved(stack: Stack): Exclude<ReturnType<typeof solveStack>, { refused: true }> {
  const solution = solveStack(stack);
  if (isRefusal(solution)) throw new Error(solution.reason);
  return solution;
}

function measuredCarrier({ top }: Stack): 'n' | 'p' {
  return top.kind === 'barrier' && top.source.from !== 'workFunction' ? top.source.carrier : 'n';
}

describe('a tolerance that is no tolerance', () => {
  const complaint = (tolerance: string, row = 0): string => {
    const reading = toStack(contactDesign((d) => { (d.variables as { tolerance?: string }[])[row].tolerance = tolerance; }));
    return reading.ok ? '' : reading.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
  };
  it('is complained of at its place', () => {
    expect(complaint('2 nm')).toMatch(/^variables\[0\]\.tolerance: '2 nm' is not of the kind/);
    expect(complaint('0.1')).toMatch(/not of the kind/);
    expect(complaint('150 %')).toMatch(/below 100 %/);
    expect(complaint('-3 nm', 1)).toMatch(/negative/);
    expect(complaint('ten percent')).toMatch(/^variables\[0\]\.tolerance: /);
    expect(complaint('5 degC')).toMatch(/in K/);
    expect(complaint('10 %')).toBe('');
    expect(complaint('Ncap/10')).toMatch(/circle|cannot be read/);
  });

  it('is told after what is wrong with the value itself', () => {
    const reading = toStack(contactDesign((d) => { (d.variables as { value: string }[])[1].value = '5 kg'; }));
    if (reading.ok) throw new Error('accepted');
    expect(reading.complaints[0].path).not.toMatch(/tolerance|range/);
  });

  it('has ranges checked beside it', () => {
    const reading = toStack(contactDesign((d) => { (d.variables as { range?: [string, string] }[])[0].range = ['1e20 cm^-3', '1e18 cm^-3']; }));
    expect(reading.ok ? '' : reading.complaints[0].message).toMatch(/lower end first/);
    const other = toStack(contactDesign((d) => { (d.variables as { range?: [string, string] }[])[0].range = ['1 nm', '2 nm']; }));
    expect(other.ok ? '' : other.complaints[0].message).toMatch(/no range of the kind of 'Ncap'/);
  });
});
