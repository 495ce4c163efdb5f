import { describe, expect, it } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';

type Loose = Record<string, any>;
const good = (): Loose => ({
  format: 'halfmark-design/1', title: 't', conditions: { temperature: '300 K' }, top: { kind: 'neutral' }, bottom: { kind: 'neutral' },
  layers: [{ name: 'a', material: 'Si', thickness: '1 um', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] }, { name: 'b', material: 'Si', thickness: '1 um' }],
});
/** Every complaint about the good design after a change, one a line. */
function after(change: (d: Loose) => void): string {
  const d = good();
  change(d);
  const reading = readDesign(JSON.stringify(d));
  const complaints = reading.ok ? toStack(reading.design) : reading;
  return complaints.ok ? '' : complaints.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
}

describe('complaints', () => {
  it('are none about a good design', () => {
    expect(after(() => {})).toBe('');
  });

  const cases: [string, (d: Loose) => void, RegExp][] = [
    ['a mistyped unit', (d) => { d.layers[1].thickness = '200 mn'; }, /^layers\[1\]\.thickness: '200 mn' is no length; did you mean nm\?$/],
    ['a bare number', (d) => { d.layers[0].thickness = 200; }, /^layers\[0\]\.thickness: is '200'; a length with its unit, as text, such as "200 nm", belongs here$/],
    ['a bare number in quotes', (d) => { d.layers[0].thickness = '200'; }, /^layers\[0\]\.thickness: '200' has no unit; a length is wanted here/],
    ['a negative thickness', (d) => { d.layers[0].thickness = '-5 nm'; }, /^layers\[0\]\.thickness: A thickness must be at least 0\.01 nm; '-5 nm' was given$/],
    ['a thickness of kilometres', (d) => { d.layers[0].thickness = '1e5 m'; }, /A thickness must be at most 10 cm/],
    ['a tolerance with a sign', (d) => { d.variables = [{ name: 'N', value: '1e17 cm^-3', tolerance: '-20 %' }]; }, /^variables\[0\]\.tolerance: '-20 %' is negative; a tolerance counts to both sides, write it without the sign$/],
    ['an unknown material', (d) => { d.layers[0].material = 'Sii'; }, /^layers\[0\]\.material: there is no material 'Sii'; did you mean Si/],
    ['an unknown dopant', (d) => { d.layers[0].dopants[0].dopant = 'Mg'; }, /^layers\[0\]\.dopants\[0\]\.dopant: there is no dopant 'Mg' in Si; in Si there are P, /],
    ['an unknown metal', (d) => { d.top = { kind: 'barrier', metal: 'Tii' }; }, /^top\.metal: there is no metal 'Tii'; did you mean Ti/],
    ['a composition outside its range', (d) => { d.layers[0] = { name: 'a', material: 'AlGaAs', x: '1.3', thickness: '1 um' }; }, /^layers\[0\]\.x: This must be at most 1; '1\.3' was given$/],
    ['an alloy without a composition', (d) => { d.layers[0] = { name: 'a', material: 'AlGaAs', thickness: '1 um' }; }, /^layers\[0\]\.x: is missing; AlGaAs is an alloy, x is the share of AlAs in it$/],
    ['a composition of a crystal', (d) => { d.layers[0].x = '0.3'; }, /^layers\[0\]\.x: stands beside Si, which is no alloy/],
    ['two layers of one name', (d) => { d.layers[1].name = 'a'; }, /^layers\[1\]\.name: 'a' is there twice/],
    ['an unknown key', (d) => { d.layers[0].thicknes = '1 nm'; delete d.layers[0].thickness; }, /layers\[0\]\.thicknes: there is no key 'thicknes' here; did you mean thickness\?/],
    ['an inherited key', (d) => { Object.defineProperty(d, '__proto__', { value: {}, enumerable: true }); }, /__proto__: there is no key/],
    ['a key that every object has', (d) => { (d as { constructor: unknown }).constructor = 1; }, /constructor: there is no key/],
    ['variables in a circle', (d) => { d.variables = [{ name: 'a1', value: '2*b1' }, { name: 'b1', value: 'a1/2' }]; }, /goes in a circle: a1 -> b1 -> a1/],
    ['a variable named like a unit', (d) => { d.variables = [{ name: 'nm', value: '1 eV' }]; }, /^variables\[0\]\.name: 'nm' has a meaning of its own/],
    ['code in an expression', (d) => { d.layers[0].thickness = 'constructor("return 1")()'; }, /^layers\[0\]\.thickness: 'constructor/],
    ['an absurd concentration', (d) => { d.layers[0].dopants[0].concentration = '1e30 cm^-3'; }, /at most 1e23 cm\^-3/],
    ['a number that is no number', (d) => { d.layers[0].dopants[0].concentration = '1e999 cm^-3'; }, /not a finite number/],
    ['an absurd temperature', (d) => { d.conditions.temperature = '5000 K'; }, /A temperature must be at most 2000 K/],
    ['a temperature below a kelvin', (d) => { d.conditions.temperature = '-300 degC'; }, /A temperature must be at least 1 K/],
    ['an empty stack', (d) => { d.layers = []; }, /^layers: is empty; at least one is needed$/],
    ['another format', (d) => { d.format = 'other/1'; }, /^format: is 'other\/1', which is no design of this program/],
    ['a newer version', (d) => { d.format = 'halfmark-design/2'; }, /^format: is version 2, made by a newer program/],
    ['a missing format', (d) => { delete d.format; }, /^format: is missing/],
    ['a neutral contact on an insulator', (d) => { d.layers.unshift({ name: 'ox', material: 'SiO2', thickness: '5 nm' }); }, /^top\.kind: is "neutral", but 'ox' is an insulator/],
    ['a doped insulator', (d) => { d.layers.splice(1, 0, { name: 'ox', material: 'SiO2', thickness: '5 nm', dopants: [{ kind: 'donor', depth: '1 eV', concentration: '1e17 cm^-3' }] }); }, /^layers\[1\]\.dopants: stand in SiO2, an insulator/],
    ['an interface above no layer', (d) => { d.interfaces = [{ above: 'c' }]; }, /^interfaces\[0\]\.above: there is no layer 'c'/],
    ['an interface above the last layer', (d) => { d.interfaces = [{ above: 'b' }]; }, /^interfaces\[0\]\.above: 'b' is the last layer/],
    ['an interface with both offsets', (d) => { d.interfaces = [{ above: 'a', dEc: '0.1 eV', dEv: '0.1 eV' }]; }, /^interfaces\[0\]: has both dEc and dEv/],
    ['a bias', (d) => { d.conditions.bias = '1 V'; }, /^conditions\.bias: '1 V' is not 0 V; only thermal equilibrium is solved$/],
    ['a reversed range', (d) => { d.conditions.temperatureRange = ['400 K', '300 K']; }, /^conditions\.temperatureRange: runs from '400 K' down to '300 K'/],
    ['a barrier without a metal', (d) => { d.top = { kind: 'barrier' }; }, /^top: is a barrier without a metal/],
    ['an unknown kind of contact', (d) => { d.top = { kind: 'ohmic' }; }, /^top\.kind: is 'ohmic'; "neutral", "barrier", "pinned" or "open" would do$/],
    ['a key of another kind of contact', (d) => { d.top = { kind: 'neutral', level: '1 eV' }; }, /^top\.level: there is no key 'level' here/],
    ['a model without parameters', (d) => { d.layers[0].dopants[0] = { kind: 'donor', depth: '1 eV', model: 'merging', concentration: '1e17 cm^-3' }; }, /dopants\[0\]\.model: is 'merging', which takes parameters/],
    ['a profile that never gets there', (d) => { d.layers[0].dopants[0].concentration = { from: '1e17 cm^-3', to: '0 cm^-3', shape: 'gaussian' }; }, /concentration\.to: is zero, which a gaussian profile never reaches/],
    ['depths that go back', (d) => { d.layers[0].dopants[0].concentration = { points: [['5 nm', '1e17 cm^-3'], ['4 nm', '1e17 cm^-3']] }; }, /points\[1\]\[0\]: is not deeper/],
    ['half a profile', (d) => { d.layers[0].dopants[0].concentration = { from: '1e17 cm^-3', shape: 'linear' }; }, /concentration\.to: is missing/],
    ['a custom crystal without its masses', (d) => { d.layers[0].material = 'X'; d.layers[0].dopants = []; d.custom = { materials: [{ id: 'X', gap: '1 eV', affinity: '4 eV', permittivity: 10, source: 's' }] }; }, /^custom\.materials\[0\]\.electronMass: is missing[^]*holeMass/],
    ['a custom entry without a source', (d) => { d.custom = { metals: [{ id: 'X', workFunction: '4 eV' }] }; }, /^custom\.metals\[0\]\.source: is missing$/],
    ['a strained stack without a template', (d) => { d.crystal = { face: 'metal', strain: 'pseudomorphic' }; }, /^crystal\.template: is missing/],
  ];
  for (const [what, change, expected] of cases) {
    it(`name the place and the mend of ${what}`, () => {
      expect(after(change)).toMatch(expected);
    });
  }

  it('come all at once', () => {
    const lines = after((d) => { d.layers[0].thickness = '5 kg'; d.layers[1].material = 'unobtainium'; d.conditions.temperature = 'warm'; }).split('\n');
    expect(lines).toHaveLength(3);
  });

  it('answer what is no document at all', () => {
    const first = (text: string): string => {
      const r = readDesign(text);
      return r.ok ? 'read' : r.complaints[0].message;
    };
    expect(first('')).toMatch(/empty/);
    expect(first('{"a": 1,}')).toMatch(/line 1, column 9/);
    expect(first('[1')).toMatch(/ends too early/);
    expect(first('[1]')).toMatch(/no design/);
    expect(first('null')).toMatch(/no design/);
    expect(first('x'.repeat(6e6))).toMatch(/6 MB/);
    expect(first('['.repeat(100000))).toMatch(/no JSON/);
    expect(first(`{"format":"halfmark-design/1","title":${'['.repeat(5000)}${']'.repeat(5000)}}`)).toMatch(/nested too deeply/);
  });
});
