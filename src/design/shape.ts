import * as v from 'valibot';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { REQUIREMENT_QUANTITIES } from './requirement-quantities.ts';
import { DESIGN_FORMAT } from './types.ts';

/**
 * The shape of the design document: which keys there are and what sort of value each takes. The published JSON Schema is made from these rows
 * (`npm run schema`). Whether a text is a length, or a name is known, is asked later (to-stack.ts), where variables and presets are at hand.
 */
const text = v.string();
/** A quantity with its unit, as text. What belongs here is the message: a bare number is answered with the unit that would fit. */
const quantity = (kind: KindName) => v.pipe(v.string(`${KINDS[kind].words} with its unit, as text, such as "${KINDS[kind].example.split(' or ')[0]}",`), v.description(`${KINDS[kind].words} with its unit, e.g. "${KINDS[kind].example}", or an expression`));
const [length, energy, density, sheetDensity, temperature, voltage] = [quantity('length'), quantity('energy'), quantity('density'), quantity('sheetDensity'), quantity('temperature'), quantity('potential')];
const name = v.pipe(v.string(), v.minLength(1), v.maxLength(200));
const pure = v.union([v.number(), v.string()]);
const flag = v.boolean();
const source = v.unknown();
/** Provenance of each value of an entry, path by path; free in form. */
const sources = v.optional(v.record(v.string(), v.unknown()));
const range = v.strictTuple([text, text]);
const temperatureRange = v.strictTuple([temperature, temperature]);
const carrier = v.picklist(['n', 'p']);
const tolerance = v.pipe(v.string(), v.description('to both sides: a share of the value, such as "10 %", or an amount, such as "2 nm"; "0 %" for a value that is certain'));
const limited = v.pipe(v.string(), v.minLength(1), v.maxLength(200), v.description(`one of ${Object.keys(REQUIREMENT_QUANTITIES).join(', ')}`));
const limitedOf = v.pipe(v.string(), v.minLength(1), v.maxLength(200), v.description('a layer by its name; the junction below a layer by the name of that layer; a contact by "top" or "bottom"'));

const graded = (value: v.GenericSchema) => [
  value,
  v.strictObject({ from: value, to: value, shape: v.picklist(['linear', 'gaussian', 'erfc']) }),
  v.strictObject({ points: v.pipe(v.array(v.strictTuple([length, value])), v.minLength(1), v.maxLength(5000)) }),
];
const implanted = v.strictObject({ peak: density, depth: length, straggle: length, shape: v.literal('gaussian'), background: v.optional(density) });

const dopantRow = v.strictObject({
  dopant: v.optional(name),
  kind: v.optional(v.picklist(['donor', 'acceptor'])),
  depth: v.optional(energy),
  degeneracy: v.optional(pure),
  concentration: v.union([...graded(density), implanted]),
  model: v.optional(v.picklist(['dilute', 'merging', 'screened', 'complete'])),
  activation: v.optional(pure),
  compensation: v.optional(pure),
});

const layer = v.strictObject({
  name,
  material: name,
  x: v.optional(v.union(graded(pure))),
  thickness: length,
  dopants: v.optional(v.pipe(v.array(dopantRow), v.maxLength(50))),
});

const contact = v.variant('kind', [
  v.strictObject({ kind: v.literal('neutral') }),
  v.strictObject({ kind: v.literal('barrier'), metal: v.optional(name), barrier: v.optional(energy), carrier: v.optional(carrier), pinning: v.optional(pure), imageForce: v.optional(flag) }),
  v.strictObject({ kind: v.literal('pinned'), level: energy }),
  v.strictObject({ kind: v.literal('open'), sheetCharge: v.optional(sheetDensity) }),
]);

const formula = v.strictObject({ formula: v.pipe(v.string(), v.maxLength(500), v.description('over T (with its unit) and, in an alloy, x; e.g. "1.519 eV - 5.4e-4 eV/K * T^2/(T + 204 K)"')) });
const gapLaw = v.union([
  energy,
  formula,
  v.strictObject({ law: v.optional(v.literal('varshni')), zeroK: energy, alpha: quantity('energyPerKelvin'), beta: temperature }),
  v.strictObject({ law: v.literal('linear'), at300K: energy, slope: quantity('energyPerKelvin') }),
  v.strictObject({ law: v.literal('odonnell-chen'), zeroK: energy, coupling: pure, phonon: energy }),
]);
const mass = v.union([v.number(), v.string(), formula, v.pipe(v.array(pure), v.minLength(1), v.maxLength(8))]);
const mobility = v.union([quantity('mobility'), v.strictObject({ min: quantity('mobility'), max: quantity('mobility'), reference: density, exponent: pure })]);
const mobilities = v.optional(v.strictObject({ electron: v.optional(mobility), hole: v.optional(mobility) }));
const narrowingCarrier = v.strictObject({ third: energy, quarter: energy, half: energy });
const narrowing = v.union([
  v.strictObject({ law: v.literal('slotboom'), energy, reference: density, constant: pure, conductionShare: pure }),
  v.strictObject({ law: v.literal('jain-roulston'), donor: narrowingCarrier, acceptor: narrowingCarrier, conductionShare: pure }),
]);
const bowing = v.strictObject({
  gap: v.optional(v.union([energy, v.pipe(v.array(energy), v.minLength(1), v.maxLength(6))])),
  affinity: v.optional(energy), permittivity: v.optional(pure), electronMass: v.optional(pure), holeMass: v.optional(pure), naturalValence: v.optional(energy),
});

const material = v.strictObject({
  id: name, name: v.optional(text), insulator: v.optional(flag),
  alloy: v.optional(v.strictObject({ first: name, second: name, bowing: v.optional(bowing), valleyBowing: v.optional(v.record(v.string(), energy)) })),
  gap: v.optional(gapLaw),
  otherValleys: v.optional(v.array(v.strictObject({ name, gap: gapLaw, electronMass: mass }))),
  affinity: v.optional(v.union([energy, formula])), affinityShare: v.optional(pure),
  permittivity: v.optional(v.union([v.number(), v.string(), formula])), permittivityHighFrequency: v.optional(v.union([v.number(), v.string(), formula])),
  electronMass: v.optional(mass), holeMass: v.optional(mass),
  nonParabolicity: v.optional(v.strictObject({ electron: v.optional(quantity('perEnergy')), hole: v.optional(quantity('perEnergy')) })),
  tunnellingMass: v.optional(v.strictObject({ electron: v.optional(pure), hole: v.optional(pure) })),
  richardson: v.optional(v.strictObject({ electron: v.optional(quantity('richardson')), hole: v.optional(quantity('richardson')) })),
  mobility: mobilities,
  narrowing: v.optional(narrowing),
  neutralityLevel: v.optional(energy), pinningSlope: v.optional(pure),
  polarisation: v.optional(v.strictObject({ spontaneous: quantity('chargeDensity'), e31: v.optional(quantity('chargeDensity')), e33: v.optional(quantity('chargeDensity')), c13: v.optional(quantity('stiffness')), c33: v.optional(quantity('stiffness')), lattice: v.optional(length) })),
  naturalValence: v.optional(v.strictObject({ scale: name, edge: energy })),
  outsideContactModel: v.optional(v.strictObject({ carrier, low: quantity('contactResistivity'), high: quantity('contactResistivity'), source: text })),
  validity: v.optional(v.strictObject({ temperature: v.optional(temperatureRange), doping: v.optional(v.strictTuple([density, density])) })),
  source, sources,
});

const dopant = v.strictObject({
  id: name, name: v.optional(text), host: name, kind: v.picklist(['donor', 'acceptor']),
  depth: v.union([energy, formula, v.strictObject({ points: v.pipe(v.array(v.strictTuple([pure, energy])), v.minLength(1)) })]), degeneracy: v.optional(pure),
  merging: v.optional(v.strictObject({ depthReference: density, depthExponent: pure, boundReference: density, boundExponent: pure })),
  screened: v.optional(v.strictObject({ coefficient: quantity('energyLength'), mottDensity: density, boundExponent: v.optional(pure) })),
  model: v.optional(v.picklist(['dilute', 'merging', 'screened', 'complete'])),
  mottDensity: v.optional(density), solubility: v.optional(density), centre: v.optional(text),
  source, sources,
});

const metal = v.strictObject({
  id: name, name: v.optional(text), kind: v.optional(text), workFunction: v.optional(energy),
  barriers: v.optional(v.array(v.strictObject({ material: name, carrier, height: energy, source, checked: v.optional(text), confidence: v.optional(text), note: v.optional(text) }))),
  source, sources,
});

const step = v.optional(v.strictObject({ constant: v.optional(energy), perX: v.optional(energy) }));
const pairOffset = v.strictObject({ first: name, second: name, deltaEv: step, deltaEc: step, source });

export const designShape = v.strictObject({
  format: v.literal(DESIGN_FORMAT),
  title: v.pipe(v.string(), v.maxLength(500)),
  notes: v.optional(text),
  variables: v.optional(v.pipe(v.array(v.strictObject({ name, value: text, tolerance: v.optional(tolerance), range: v.optional(range), note: v.optional(text) })), v.maxLength(200))),
  conditions: v.strictObject({ temperature, temperatureRange: v.optional(temperatureRange), bias: v.optional(voltage) }),
  assumptions: v.optional(v.strictObject({
    statistics: v.optional(v.picklist(['fermi-dirac', 'boltzmann'])), alignment: v.optional(v.picklist(['offsets', 'affinity'])),
    narrowing: v.optional(flag), nonParabolic: v.optional(flag), transmission: v.optional(v.picklist(['wkb', 'kemble', 'exact'])),
  })),
  crystal: v.optional(v.strictObject({ face: v.picklist(['metal', 'N']), strain: v.picklist(['relaxed', 'pseudomorphic']), template: v.optional(name) })),
  top: contact,
  layers: v.pipe(v.array(layer), v.minLength(1), v.maxLength(2000)),
  interfaces: v.optional(v.array(v.strictObject({ above: name, sheetCharge: v.optional(sheetDensity), dEc: v.optional(energy), dEv: v.optional(energy) }))),
  bottom: contact,
  requirements: v.optional(v.pipe(v.array(v.strictObject({
    quantity: limited, of: limitedOf, max: v.optional(v.union([text, flag])), min: v.optional(v.union([text, flag])), over: v.optional(v.picklist(['temperature', 'temperatureRange'])),
  })), v.maxLength(500))),
  custom: v.optional(v.strictObject({ materials: v.optional(v.array(material)), dopants: v.optional(v.array(dopant)), metals: v.optional(v.array(metal)), offsets: v.optional(v.array(pairOffset)) })),
});
