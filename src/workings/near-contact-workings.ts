import type { CarrierCloseUp, CloseUp } from '../contacts/close-up.ts';
import type { Design } from '../design/types.ts';
import { carrierShown } from '../drawing/contact-closeup-words.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import { solveDesign } from '../result/solve-design.ts';
import { contactWorkings } from './contact-workings.ts';
import { contextOf, type Context } from './context.ts';
import { formula } from './formula.ts';
import { known, SOLVED, thermal, WORKED } from './known.ts';
import { mi, mo, mrow } from './math.ts';
import { law, step, type Step } from './step.ts';
import type { Found } from './workings.ts';

/** A figure of a contact seen from near, with the design that was looked at. */
export interface NearContactAsked {
  table: 'nearContact';
  column: PanelColumn<'nearContact'>;
  design: Design;
  contact: CloseUp;
}

/** The stack solved as for the look, and the ledger's own workings; where the current passes from the curves that are drawn. */
export function nearContactWorkings({ column, design, contact }: NearContactAsked): { found: Found; context: Context | null } {
  const answer = solveDesign(design);
  if (answer.kind !== 'result') return { context: null, found: { steps: [], remarks: ['The stack has no accepted answer.'], rests: [] } };
  const context = contextOf(design, answer.result);
  if (column === 'passage') return { context, found: passage(contact) };
  const index = answer.result.contacts.findIndex(({ side }) => side === contact.side);
  return { context, found: contactWorkings(context, index, column)! };
}

/** T f at the peak and beside it, where it is less. */
function passage(c: CloseUp): Found {
  const { curve, words } = carrierShown(c);
  if (curve === null || curve.peak_eV === null) return { steps: [], remarks: ['Nothing passes.'], rests: [] };
  const at = curve.energy_eV.indexOf(curve.peak_eV);
  const steps: Step[] = [law(mrow(mi('T'), mo('('), mi('E'), mo(')'), mi('f'), mo('('), mi('E'), mo(')')), 'What passes at an energy: the transmission times the occupancy, as drawn beside the bands. Its highest point is told.')];
  const product = [at - 1, at, at + 1].filter((i) => i >= 0 && i < curve.energy_eV.length).map((i) => productStep(curve, i, i === at ? 'peak' : i < at ? 'before' : 'after', words));
  steps.push(...product.map(({ line }) => line));
  const E = known('E_peak', 'energy from EF at which most passes, upwards for electrons', curve.peak_eV, 'eV', WORKED);
  const kT = thermal(c.temperature_K);
  const u = known('u', 'the same in kT', curve.peak_eV / kT.value, '', WORKED);
  const read = known('E_i', 'energy at which the curve is highest', curve.peak_eV, 'eV', SOLVED);
  steps.push(step(u, formula`${read} / ${kT}`), step(E, formula`${read}`));
  const share = curve.overTop === null ? [] : [`${Number((100 * curve.overTop).toPrecision(3))} % of the integral lies beyond the top of the barrier, at ${Number(curve.top_eV.toPrecision(4))} eV; the middle 80 % between ${Number((curve.from_eV as number).toPrecision(4))} and ${Number((curve.to_eV as number).toPrecision(4))} eV, by the trapezes of the ${curve.energy_eV.length} energies drawn.`];
  return { steps, remarks: share, rests: ['stack', 'transmission', 'image force', 'carriers', 'bands'], solved: true };
}

function productStep(curve: CarrierCloseUp, i: number, mark: string, words: string): { line: Step } {
  const where = mark === 'peak' ? 'at the peak' : `at the energy drawn ${mark} it`;
  const T = known(`T_${mark}`, `transmission of ${words} ${where}`, curve.transmission[i], '', SOLVED);
  const f = known(`f_${mark}`, `occupancy ${where}`, curve.occupancy[i], '', SOLVED);
  return { line: step(known(`p_${mark}`, `product ${where}`, curve.product[i], '', WORKED), formula`${T} * ${f}`) };
}
