import type { Design } from '../../src/design/types.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import { freeName, textAtPlace, type VariablePlace } from '../../src/state/commands/index.ts';

/** What can be sized: a variable of the design, or a value of the stack that becomes one. */
export type SizingChoice = { kind: 'variable'; name: string } | { kind: 'place'; place: VariablePlace };

export interface ChoiceOption {
  /** for a menu: unique */ key: string;
  /** "Ncap, now 1e19 cm^-3" */ text: string;
  choice: SizingChoice;
}

/** Plain numbers with a unit; what uses a variable already is sized by that. */
const PLAIN = /^\s*[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?\s*[a-zA-Zµμ°Å][^+*/()]*$/i;

export function choiceOptions(design: Design): { variables: ChoiceOption[]; places: ChoiceOption[] } {
  const variables = (design.variables ?? []).map(({ name, value }): ChoiceOption => ({ key: `v ${name}`, text: `${name}, now ${value}`, choice: { kind: 'variable', name } }));
  const places: ChoiceOption[] = [];
  design.layers.forEach((layer, l) => {
    const add = (place: VariablePlace, what: string): void => {
      const text = textAtPlace(design, place);
      if (text !== null && PLAIN.test(text)) places.push({ key: `p ${l} ${place.part === 'thickness' ? 't' : place.row}`, text: `${what} of ${layer.name}, ${text}`, choice: { kind: 'place', place } });
    };
    add({ layer: l, part: 'thickness' }, 'thickness');
    (layer.dopants ?? []).forEach((dopant, row) => add({ layer: l, part: 'concentration', row }, `${dopant.dopant ?? dopant.kind ?? 'dopant'} ${typeof dopant.concentration === 'string' ? 'concentration' : 'peak'}`));
  });
  return { variables, places };
}

/** The first variable that is used in the layer that a requirement is about: of a contact the layer under it, of a junction the one above. */
export function likelyVariable(design: Design, of: string): string | null {
  const layer = of === 'top' ? design.layers[0] : of === 'bottom' ? design.layers[design.layers.length - 1] : design.layers.find(({ name }) => name === of);
  if (layer === undefined) return null;
  const texts = JSON.stringify([layer.thickness, layer.x, (layer.dopants ?? []).map(({ concentration, activation, compensation }) => [concentration, activation, compensation])]);
  return (design.variables ?? []).find(({ name }) => /^\w+$/.test(name) && new RegExp(`(?<![A-Za-z_])${name}(?!\\w)`).test(texts))?.name ?? null;
}

/** A free name for the variable that a value becomes: "t_cap", "N_cap". Letters and digits of the layer's name that a variable may have. */
export function nameForPlace(design: Design, place: VariablePlace): string {
  const layer = design.layers[place.layer].name.replace(/[^A-Za-z0-9]+/g, '_').replace(/^_+|_+$/g, '') || String(place.layer + 1);
  const taken = (design.variables ?? []).map(({ name }) => name.replace(/_(\d+)$/, ' $1'));
  return freeName(`${place.part === 'thickness' ? 't' : 'N'}_${layer}`.replace(/_(\d+)$/, ' $1'), taken).replace(' ', '_');
}

/** Spans about a value that are worth a search: a doping is thought of in decades, a thickness in factors. */
const SPANS: Readonly<Record<string, number>> = { 'cm^-3': 10, 'm^-3': 10, 'cm^-2': 10, 'm^-2': 10 };
const SPAN = 4;

/** A range to begin with, about a plain value; null for an expression, or a value of no size. */
export function rangeAbout(text: string): [string, string] | null {
  const found = PLAIN.test(text) || /^\s*[\d.]+(?:e[+-]?\d+)?\s*$/i.test(text) ? /^\s*([+-]?[\d.]+(?:e[+-]?\d+)?)\s*(.*?)\s*$/i.exec(text) : null;
  if (found === null) return null;
  const [value, unit] = [Number(found[1]), found[2]];
  // Degrees Celsius and what is not above zero have no factors.
  if (!(value > 0) || /C$/.test(unit)) return null;
  const span = Object.hasOwn(SPANS, unit) ? SPANS[unit] : SPAN;
  // A pure number up to one is a share in a design: of atoms, of a mixture, of pinning.
  const most = unit === '' && value <= 1 ? 1 : Infinity;
  return [value / span, Math.min(value * span, most)].map((end) => `${writeNumber(Number(end.toPrecision(3)), 6)}${unit === '' ? '' : ` ${unit}`}`) as [string, string];
}
