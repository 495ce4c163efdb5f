import { bandsAt, isRefusal, profileAt, solveStack, type Boundary, type ContactFigures, type Layer, type Material, type Profiles, type Stack } from '../../solver/index.ts';
import type { LocalBands } from '../../solver/bands.ts';
import { contactFigures } from '../../solver/contact.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { layerFigures } from '../../solver/layer.ts';
import { Asker } from '../design/ask.ts';
import { catalogueOf, type Catalogue } from '../design/catalogue.ts';
import { complaintLine, type Complaint } from '../design/complaint.ts';
import { readContact } from '../design/contact.ts';
import { toStack } from '../design/stack.ts';
import type { ContactInput, Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import type { Point } from '../requirements/point.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from '../requirements/uncertainties.ts';
import { heightsOf, type BarrierSurface } from './barrier-values.ts';

export type Side = 'top' | 'bottom';
export type BarrierInput = Extract<ContactInput, { kind: 'barrier' }>;
export type BarrierBoundary = Extract<Boundary, { kind: 'barrier' }>;

/** Figures of one contact at one point, or why there are none. */
export type Found = { figures: ContactFigures } | { refusal: string };

/** Accepted estimate of the mesh error in psi, V: that of the requirements' worst cases. */
const ACCURACY = 1e-5;
/** Where a surface stands in for another metal while the design is read. */
const STAND_IN = '0.5 eV';

/**
 * One end of a stack, on which one metal after the other is put. Everything but the metal stays: the layers are read once for each place of the variables,
 * and what was solved for one barrier serves every metal that has the same.
 */
export class ContactSurface {
  /** solves so far */ evaluations = 0;
  readonly #stacks = new Map<string, Stack | string>();
  readonly #scopes = new Map<string, Asker>();
  readonly #found = new Map<string, Found>();
  readonly #starts = new Map<number, Profiles>();
  readonly #catalogue: Catalogue;
  /** as the base design states them, and the majority's carrier where it is silent */ readonly stated: Pick<BarrierInput, 'carrier' | 'pinning' | 'imageForce'>;

  private constructor(
    readonly design: Design,
    readonly side: Side,
    readonly set: Readonly<Record<string, string>>,
    readonly stack: Stack,
    readonly temperatureRange: readonly [number, number] | null,
    readonly majority: 'n' | 'p',
    readonly tolerances: Tolerances,
    /** strictest upper limit of the contact resistivity here, ohm cm^2; null without one */ readonly limit: number | null,
  ) {
    const contact = design[side];
    const { carrier, pinning, imageForce } = contact.kind === 'barrier' ? contact : ({ imageForce: true } as BarrierInput);
    const known = carrier ?? (majority === 'p' ? 'p' : undefined);
    this.stated = { ...(known === undefined ? {} : { carrier: known }), ...(pinning === undefined ? {} : { pinning }), ...(imageForce === undefined ? {} : { imageForce }) };
    this.#catalogue = catalogueOf(design.custom);
    this.uncertainties = uncertaintiesOf({ ...design, [side]: standIn(this.stated.carrier) }, set, tolerances);
    this.#stacks.set('{}', stack);
  }

  /** every one that counts by the design; the ranking leaves out those that move nothing */ uncertainties: readonly Uncertainty[];

  /** @returns the surface, or what is wrong with the design whatever metal is on it */
  static read(design: Design, side: Side, set: Readonly<Record<string, string>> = {}, tolerances: Tolerances = 'all'): ContactSurface | Complaint[] {
    const reading = toStack({ ...design, [side]: standIn(undefined) }, set);
    if (!reading.ok) return reading.complaints;
    const { stack, temperatureRange } = reading;
    const limits = reading.requirements.flatMap(({ quantity, target, bound, limit }) => (quantity === 'contactResistivity' && bound === 'max' && target.index === (side === 'top' ? 0 : 1) ? [limit as number] : []));
    try {
      const layer = surfaceLayer(stack, side);
      const figures = layerFigures(layer, stack.temperature, stack.assumptions, false);
      return new ContactSurface(design, side, set, stack, temperatureRange, figures.p > figures.n ? 'p' : 'n', tolerances, limits.length === 0 ? null : Math.min(...limits));
    } catch (error) {
      // What only the physics refuses, such as a gap that closes at this temperature.
      if (!(error instanceof RangeError)) throw error;
      return [{ path: '', message: error.message }];
    }
  }

  get catalogue(): Catalogue {
    return this.#catalogue;
  }

  get layer(): Layer {
    return surfaceLayer(this.stack, this.side);
  }

  /** The surface as barriers are told on it, at the design's temperature. */
  get barrierSurface(): BarrierSurface {
    return { ...placeOf(this.stack, this.side), boundary: (contact) => this.boundary(contact) };
  }

  /** The boundary of a contact, or what is wrong with it. */
  boundary(contact: BarrierInput, moves: Readonly<Record<string, number>> = {}): BarrierBoundary | string {
    const ask = this.#asker(moves);
    ask.complaints.length = 0;
    const { layer, side } = this;
    const boundary = readContact(contact, side, layer.material, layer.name, this.#catalogue, ask);
    if (ask.complaints.length > 0) return ask.complaints[0].message;
    return boundary?.kind === 'barrier' ? boundary : 'is no barrier';
  }

  /**
   * The contact solved at a point.
   *
   * @param transmission  another than the design's, for a search that would take too long with it
   */
  at(contact: BarrierInput, point: Point, transmission: Stack['assumptions']['transmission'] = this.stack.assumptions.transmission): Found {
    const moves: Record<string, number> = {};
    this.uncertainties.forEach((u, i) => {
      if (u.variable !== null && point.counts[i] !== 0) moves[u.variable] = point.counts[i];
    });
    const read = this.#stackAt(moves);
    if (typeof read === 'string') return { refusal: read };
    const boundary = this.boundary(contact, moves);
    if (typeof boundary === 'string') return { refusal: boundary };
    let stack: Stack = { ...read, [this.side]: boundary, temperature: point.temperature, assumptions: { ...read.assumptions, transmission } };
    this.uncertainties.forEach((u, i) => { stack = u.apply(stack, point.counts[i]); });
    return this.#solved(stack, point);
  }

  #solved(stack: Stack, point: Point): Found {
    const boundary = stack[this.side] as BarrierBoundary;
    let key: string;
    try {
      const heights = heightsOf(boundary.source, placeOf(stack, this.side));
      if (heights === null) return { refusal: `${this.layer.material.id} has no charge neutrality level to pin to` };
      // Metals of one barrier height conduct alike: what moves the barrier is in the height.
      const others = point.counts.filter((_, i) => !this.#movesBarrier(i));
      key = [point.temperature, others.join(), heights.barrierN.toFixed(7), boundary.imageForce, stack.assumptions.transmission].join('|');
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      return { refusal: error.message };
    }
    let found = this.#found.get(key);
    if (found === undefined) {
      found = this.#solve(stack);
      this.#found.set(key, found);
    }
    return found;
  }

  #solve(stack: Stack): Found {
    this.evaluations++;
    const start = this.#starts.get(stack.temperature);
    try {
      let solution = solveStack(stack, { accuracy: ACCURACY, contacts: false, ...(start ? { warmStart: start } : {}) });
      // A start from far away must not cost an answer.
      if (isRefusal(solution) && start) solution = solveStack(stack, { accuracy: ACCURACY, contacts: false });
      if (isRefusal(solution)) return { refusal: solution.reason };
      if (!start) this.#starts.set(stack.temperature, solution.profiles);
      return { figures: contactFigures(stack, solution.profiles, spaceChargeOf(stack, solution.profiles), this.side) };
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      return { refusal: error.message };
    }
  }

  #movesBarrier(i: number): boolean {
    return isBarrierOf(this.uncertainties[i], this.side);
  }

  #stackAt(moves: Readonly<Record<string, number>>): Stack | string {
    const key = JSON.stringify(moves);
    let read = this.#stacks.get(key);
    if (read === undefined) {
      const reading = toStack({ ...this.design, [this.side]: standIn(undefined) }, this.set, moves);
      read = reading.ok ? reading.stack : complaintLine(reading.complaints[0]);
      this.#stacks.set(key, read);
    }
    return read;
  }

  #asker(moves: Readonly<Record<string, number>>): Asker {
    const key = JSON.stringify(moves);
    let ask = this.#scopes.get(key);
    if (ask === undefined) {
      const { temperature: _, ...overrides } = this.set;
      ask = new Asker(readVariables(this.design.variables ?? [], overrides, moves).scope);
      this.#scopes.set(key, ask);
    }
    return ask;
  }
}

/** Whether an uncertainty is that of the barrier of this side, by the name that uncertainties.ts gives it. */
export function isBarrierOf({ label, variable, tolerance }: Uncertainty, side: Side): boolean {
  // A dopant may bear any name; its tolerance is a share.
  return variable === null && (label === 'barrier' || label === `${side} barrier`) && tolerance.endsWith('eV');
}

function standIn(carrier: 'n' | 'p' | undefined): BarrierInput {
  return { kind: 'barrier', barrier: STAND_IN, ...(carrier === undefined ? {} : { carrier }), imageForce: true };
}

function surfaceLayer(stack: Stack, side: Side): Layer {
  return stack.layers[side === 'top' ? 0 : stack.layers.length - 1];
}

/** What a barrier is told by at a side of a stack: material, composition and bands just under the metal. */
export function placeOf(stack: Stack, side: Side): { material: Material; x: number; bands: LocalBands } {
  const layer = surfaceLayer(stack, side);
  const z = side === 'top' ? 0 : layer.thickness;
  return { material: layer.material, x: profileAt(layer.x, z, layer.thickness), bands: bandsAt(layer, z, stack.temperature, stack.assumptions) };
}
