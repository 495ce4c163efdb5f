import { isAlloy, profileAt, type Dopant, type Layer, type Stack } from '../../solver/index.ts';
import { Asker } from '../design/ask.ts';
import { catalogueOf, type Catalogue } from '../design/catalogue.ts';
import { complaintLine } from '../design/complaint.ts';
import { readContact } from '../design/contact.ts';
import { readDopant } from '../design/dopant.ts';
import { publishedOffset } from '../design/offset.ts';
import { readProfile } from '../design/profile.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { governedBy } from '../requirements/governed.ts';
import type { Uncertainty } from '../requirements/uncertainties.ts';
import { movedVariables } from './moved-variables.ts';

/** Far inside what a thickness and a concentration may be; nearer their limits the whole reading decides, cm and cm^-3. */
const PLAIN_THICKNESS = [1e-8, 1] as const;
const MOST_PLAIN = 1e22;
const SHARE = { least: [0, '0'] as [number, string], most: [1, '1'] as [number, string] };

/**
 * The stack with its uncertainties moved. Reading a whole design takes as long as solving it, so where variables with a tolerance are used only in thicknesses, compositions,
 * dopants and contacts, only those texts are read again, by the same readers; elsewhere the whole design is.
 */
export class MovedStacks {
  readonly #catalogue: Catalogue;
  readonly #variables: ReturnType<typeof movedVariables>;
  readonly #moving: boolean;
  readonly #quick: boolean;
  readonly #thickness: boolean[];
  readonly #x: boolean[];
  /** what of each row moves: nothing, one concentration, or more than that */ readonly #dopants: ('nothing' | 'concentration' | 'more')[][];
  readonly #contacts: { top: boolean; bottom: boolean };

  /** @param nominal  the stack of the design with these overrides */
  constructor(
    readonly design: Design,
    readonly set: Readonly<Record<string, string>>,
    readonly uncertainties: readonly Uncertainty[],
    readonly nominal: Stack,
  ) {
    const governed = governedBy(design, set);
    this.#catalogue = catalogueOf(design.custom);
    const { temperature: _T, ...overrides } = set;
    this.#variables = movedVariables(design.variables ?? [], overrides);
    this.#x = design.layers.map((layer) => governed(layer.x));
    this.#moving = uncertainties.some((u) => u.variable !== null);
    this.#thickness = design.layers.map((layer) => governed(layer.thickness));
    this.#dopants = design.layers.map((layer) => (layer.dopants ?? []).map(({ concentration, ...other }) => (governed(other) || (governed(concentration) && typeof concentration === 'object') ? 'more' : governed(concentration) ? 'concentration' : 'nothing')));
    this.#contacts = { top: governed(design.top), bottom: governed(design.bottom) };
    const { variables: _, requirements: __, top: ___, bottom: ____, layers, ...rest } = design;
    this.#quick = !governed(rest, layers.map(({ thickness: _t, dopants: _d, x: _x, ...other }) => other));
  }

  /** @param counts  of each uncertainty's tolerance  @returns the stack, or what is wrong with the design there */
  at(counts: readonly number[]): Stack | string {
    let stack: Stack | string = this.nominal;
    if (this.#moving) {
      const moves = Object.fromEntries(this.uncertainties.flatMap((u, i) => (u.variable === null ? [] : [[u.variable, counts[i]]])));
      stack = (this.#quick ? this.#partly(moves) : null) ?? this.#wholly(moves);
    }
    if (typeof stack === 'string') return stack;
    return this.uncertainties.reduce((s, u, i) => u.apply(s, counts[i]), stack);
  }

  #wholly(moves: Readonly<Record<string, number>>): Stack | string {
    const reading = toStack(this.design, this.set, moves);
    return reading.ok ? reading.stack : complaintLine(reading.complaints[0]);
  }

  /** Null where something there is wrong: the whole reading then says what. */
  #partly(moves: Readonly<Record<string, number>>): Stack | null {
    const { design, nominal } = this;
    if (!this.#variables) return null;
    const variables = this.#variables;
    const ask = new Asker(variables(moves), () => variables({}));
    const layers = nominal.layers.map((layer, l) => this.#layer(layer, l, ask));
    if (ask.complaints.length > 0 || layers.some(({ thickness }) => !(thickness > PLAIN_THICKNESS[0] && thickness < PLAIN_THICKNESS[1]))) return null;
    const last = layers.length - 1;
    const top = this.#contacts.top ? readContact(design.top, 'top', layers[0].material, layers[0].name, this.#catalogue, ask) : nominal.top;
    const bottom = this.#contacts.bottom ? readContact(design.bottom, 'bottom', layers[last].material, layers[last].name, this.#catalogue, ask) : nominal.bottom;
    // A published offset goes with the compositions that meet.
    const interfaces = this.#x.includes(true) ? nominal.interfaces.map((row) => (row.published ? { ...row, published: publishedOffset(layers[row.index], layers[row.index + 1], this.#catalogue, ask) } : row)) : nominal.interfaces;
    return ask.complaints.length > 0 || top === null || bottom === null ? null : { ...nominal, layers, interfaces, top, bottom };
  }

  #layer(layer: Layer, l: number, ask: Asker): Layer {
    const input = this.design.layers[l];
    const composed = this.#x[l] && isAlloy(layer.material) && input.x !== undefined;
    if (!composed && !this.#thickness[l] && this.#dopants[l].every((d) => d === 'nothing')) return layer;
    const thickness = this.#thickness[l] ? ask.quantity(input.thickness, 'length', `layers[${l}].thickness`) : layer.thickness;
    const x = composed ? readProfile(input.x!, 'number', `layers[${l}].x`, ask, SHARE) : layer.x;
    const middle = profileAt(x, thickness / 2, thickness);
    const dopants = layer.dopants.map((dopant, d): Dopant => {
      const row = input.dopants![d];
      const path = `layers[${l}].dopants[${d}]`;
      // The depth of a level may move with the composition.
      if (composed || this.#dopants[l][d] === 'more') return readDopant(row, input.material, middle, this.#catalogue, path, ask) ?? dopant;
      if (this.#dopants[l][d] === 'nothing') return dopant;
      return { ...dopant, concentration: { kind: 'constant', value: ask.quantity(row.concentration, 'density', `${path}.concentration`, { least: [0, '0 cm^-3'], most: [MOST_PLAIN, '1e22 cm^-3'] }) } };
    });
    return { ...layer, x, thickness, dopants };
  }
}
