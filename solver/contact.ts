import { barrierHeights, imageForceLowering, transportRegime, tunnellingEnergy } from './barrier.ts';
import { richardson, tunnellingMass } from './carrier-constants.ts';
import { localCharge, netDoping } from './charge.ts';
import { closedFormResistivity, saturationCurrent } from './closed-forms.ts';
import { contactPath } from './contact-path.ts';
import { BOLTZMANN } from './constants.ts';
import { logOccupancyAbove } from './contact-integral.ts';
import { carrierConductance, isMissing } from './contact-resistivity.ts';
import { depletionFrom, type SpaceCharge } from './depletion.ts';
import { neutralLevel } from './fermi-level.ts';
import { profileAt } from './profile.ts';
import type { ContactFigures, Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/**
 * Figures of one end of the stack. E00 takes N = |net active doping| at the metal, where all of it is charged, the static permittivity and the
 * majority's tunnelling mass; the lowering is quoted only where the field depletes the majority (an accumulated surface has no barrier top inside).
 *
 * @param resistivity  whether to work out what the contact conducts as well, by far the larger part of the work
 */
export function contactFigures(stack: Stack, profiles: Profiles, space: SpaceCharge, side: 'top' | 'bottom', resistivity = true): ContactFigures {
  const boundary = stack[side];
  const index = side === 'top' ? 0 : stack.layers.length - 1;
  const layer = stack.layers[index];
  const z = side === 'top' ? 0 : layer.thickness;
  const c = localCharge(layer, z, stack.temperature, stack.assumptions);
  const x = profileAt(layer.x, z, layer.thickness);
  const node = side === 'top' ? 0 : profiles.z.length - 1;
  const surfaceField = profiles.field[node];
  const figures: ContactFigures = {
    side, kind: boundary.kind, barrierN: null, barrierP: null, barrierSource: null, lowering: null, surfaceField,
    e00: null, transport: null, depletion: depletionFrom(stack, profiles, space, index, side),
    rhoC: null, rhoCn: null, rhoCp: null, rhoCFloor: null, rhoCClosedForm: null, closedForm: null, saturationCurrent: null, transmission: null, blocks: false, rhoError: null, rhoCNotes: [],
  };
  if (boundary.kind === 'pinned') {
    figures.barrierN = boundary.level;
    figures.barrierP = c.bands.gap - boundary.level;
    return figures;
  }
  if (boundary.kind !== 'barrier') return figures;
  const heights = barrierHeights(boundary.source, layer.material, x, c.bands);
  figures.barrierN = heights.barrierN;
  figures.barrierP = heights.barrierP;
  figures.barrierSource = heights.source;
  const net = netDoping(c);
  // Into the semiconductor Ec falls from a depleted n surface: psi rises inward, so the field points at the metal.
  const inward = side === 'top' ? surfaceField : -surfaceField;
  const depleting = net >= 0 ? inward < 0 : inward > 0;
  if (boundary.imageForce) figures.lowering = depleting ? imageForceLowering(Math.abs(surfaceField), c.bands.permittivityHighFrequency) : 0;
  const carrier = net >= 0 ? 'electron' : 'hole';
  const mass = tunnellingMass(layer.material, x, carrier);
  if (net !== 0 && mass !== undefined) {
    figures.e00 = tunnellingEnergy(Math.abs(net), mass, c.bands.permittivity);
    figures.transport = transportRegime(figures.e00, stack.temperature);
  }
  if (!resistivity) return figures;
  Object.assign(figures, conduction(stack, profiles, space, side));
  const constant = richardson(layer.material, x, carrier);
  if (net !== 0 && constant !== undefined && !c.bands.insulator) {
    const height = net > 0 ? heights.barrierN : heights.barrierP;
    const lowered = height - (figures.lowering ?? 0);
    // Where no barrier is left nothing saturates.
    if (lowered > 0) figures.saturationCurrent = saturationCurrent(lowered, constant, stack.temperature);
    if (figures.e00 !== null) {
      const { ecMinusEf } = neutralLevel(c);
      const closed = closedFormResistivity(height, net > 0 ? ecMinusEf : c.bands.gap - ecMinusEf, figures.e00, constant, stack.temperature);
      figures.rhoCClosedForm = closed.rhoC;
      figures.closedForm = closed.form;
    }
  }
  return figures;
}

type Conduction = Pick<ContactFigures, 'rhoC' | 'rhoCn' | 'rhoCp' | 'rhoCFloor' | 'transmission' | 'blocks' | 'rhoError' | 'rhoCNotes'>;

/** A carrier of unknown constants is left out where even A* = 1200 A/(cm^2 K^2), ten free electrons', without a barrier would add less than this share. */
const NEGLIGIBLE = 1e-6;
const LARGEST_RICHARDSON = 1200;
/** An error of the integral that is worth a word. */
const DOUBTFUL = 0.01;

/** Both carriers through the solved barrier, in parallel. What cannot be computed is null, and a note says why. */
function conduction(stack: Stack, profiles: Profiles, space: SpaceCharge, side: 'top' | 'bottom'): Conduction {
  const out: Conduction = { rhoC: null, rhoCn: null, rhoCp: null, rhoCFloor: null, transmission: null, blocks: false, rhoError: null, rhoCNotes: [] };
  const path = contactPath(stack, profiles, space, side);
  if (!path) {
    out.rhoCNotes.push('no contact resistivity, since no layer is neutral anywhere and takes the carriers up');
    return out;
  }
  const majority = carrierConductance(stack, path, path.electrons ? 'electron' : 'hole');
  // The exact way is long for carriers that hardly count: those by WKB.
  let minority = carrierConductance(stack, path, path.electrons ? 'hole' : 'electron', { transmission: 'wkb' });
  const known = isMissing(majority) ? -Infinity : majority.log;
  const counting = known + Math.log(NEGLIGIBLE);
  if (stack.assumptions.transmission !== 'wkb' && !isMissing(minority) && minority.logFloor > counting) {
    const asAsked = carrierConductance(stack, path, path.electrons ? 'hole' : 'electron');
    // Where its waves cannot be followed, WKB must do if by that it does not count.
    if (!isMissing(asAsked) || minority.log > counting) minority = asAsked;
  }
  const kT = BOLTZMANN * stack.temperature;
  const edge = path.electrons ? path.efMinusEv : path.ecMinusEf;
  const bound = Math.log(LARGEST_RICHARDSON / BOLTZMANN ** 2) + Math.log(kT) + logOccupancyAbove(edge / kT);
  const [n, p] = path.electrons ? [majority, minority] : [minority, majority];
  if (!isMissing(n)) out.rhoCn = Math.exp(-n.log);
  if (!isMissing(p)) out.rhoCp = Math.exp(-p.log);
  if (!isMissing(majority)) out.rhoCFloor = Math.exp(-majority.logFloor);
  const counts = isMissing(minority) ? bound > counting : true;
  const missing = [majority, ...(counts ? [minority] : [])].flatMap((c) => (isMissing(c) ? [c.missing] : []));
  if (missing.length > 0) out.rhoCNotes.push(`no contact resistivity, for want of ${missing.join(' and ')}`);
  if (out.rhoCNotes.length > 0 || isMissing(majority)) return out;
  out.transmission = majority.transmission;
  const both = isMissing(minority) ? [majority] : [majority, minority];
  const most = Math.max(...both.map((c) => c.log));
  const weights = both.map((c) => (most === -Infinity ? 1 : Math.exp(c.log - most)));
  const total = weights.reduce((sum, w) => sum + w);
  out.rhoC = Math.exp(-most) / total;
  out.rhoError = both.reduce((sum, c, i) => sum + weights[i] * c.error, 0) / total;
  if (out.rhoC === Infinity) {
    out.blocks = true;
    out.rhoCNotes.push('its resistivity is beyond the largest number: it blocks');
  }
  if (out.rhoError > DOUBTFUL) out.rhoCNotes.push(`its ${out.transmission} resistivity is uncertain by ${Math.ceil(100 * out.rhoError)} %, for waves ring in the layers under it; "wkb" has no such trouble`);
  return out;
}
