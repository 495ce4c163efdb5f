import { readAssumptions } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { DEFAULT_TOLERANCES, type Tolerances } from '../requirements/uncertainties.ts';
import { qualityLine } from '../result/ledger.ts';
import { MOBILITY_NOTE } from '../result/mobility-note.ts';
import type { Result } from '../result/types.ts';
import { printedUnits } from '../quantity/printed-units.ts';

/** Stand on every page of a sheet: an estimate without them is taken for more than it is. */
export const CAUTIONS = [
  'Cautions. Results are estimates of an ideal one-dimensional structure from published parameters, to be confirmed by measurement before a process or a product relies on them; contact resistivities are orders of magnitude.',
  'Hazardous gases, acids, high voltage and lasers are governed by the site’s own safety rules, local codes and licensed practice.',
] as const;

/** Everything but the numbers that the result rests on, a sentence each. */
export function assumptionSentences(design: Design, result: Result, of: { set: Readonly<Record<string, string>>; tolerances: Tolerances; judged: boolean; seed: number | null }): string[] {
  const a = readAssumptions(design.assumptions);
  const { temperatureRange } = design.conditions;
  const range = temperatureRange ? ` Requirements over the temperature range are judged from ${temperatureRange.map(printedUnits).join(' to ')}.` : '';
  const barrier = result.contacts.some((c) => c.kind === 'barrier');
  return [
    `Temperature ${Number(result.conditions.temperature_K.toPrecision(6))} K, bias ${result.conditions.bias_V} V.${range}`,
    'One dimension, thermal equilibrium: one Fermi level through the whole stack. EF is the electrochemical potential of electrons at the temperature; the zero of energy is that of the bottom contact, energy of electrons is up.',
    'No quantum confinement: densities of states are those of the bulk, in the effective-mass approximation.',
    a.statistics === 'fermi-dirac' ? 'Fermi–Dirac statistics; dopants ionise incompletely by their own law (dilute, merging with the band, screened, or all ionised), as the table of layers says.' : 'Boltzmann statistics, as asked for: wrong in degenerate layers.',
    a.nonParabolic ? 'Bands are non-parabolic where a material has a parameter for it.' : 'Parabolic bands.',
    a.narrowing ? 'The gap narrows with doping by each material’s own law.' : 'No narrowing of the gap by doping.',
    MOBILITY_NOTE,
    a.alignment === 'offsets' ? 'Bands line up by published offsets, else by natural valence edges, else by affinities; the table of junctions says which. An own offset wins.' : 'Bands line up by the affinity rule, as asked for.',
    ...(design.crystal ? [`Polar crystal: ${design.crystal.face === 'N' ? 'N' : 'metal'} face up, ${design.crystal.strain}${design.crystal.template === undefined ? '' : ` on ${design.crystal.template}`}; polarisation charge at every step of it.`] : []),
    ...(barrier ? [`Tunnelling through contacts by ${{ wkb: 'the WKB transmission', kemble: 'the uniform transmission of Kemble', exact: 'the exact transmission of the solved barrier' }[a.transmission]}.`] : []),
    ...(['top', 'bottom'] as const).flatMap((side) => {
      const contact = design[side];
      return contact.kind === 'barrier' && contact.imageForce === false ? [`No image-force lowering at the ${side} contact.`] : [];
    }),
    ...(of.judged ? [toleranceSentence(of.tolerances)] : []),
    ...(Object.keys(of.set).length > 0 ? [`Set for this sheet: ${Object.entries(of.set).map(([name, value]) => `${name} = ${printedUnits(value)}`).join(', ')}.`] : []),
    ...(of.seed === null ? [] : [`Seed of the random draws: ${of.seed}.`]),
    `${qualityLine(result)}`,
  ];
}

function toleranceSentence(which: Tolerances): string {
  if (which === 'none') return 'Requirements were judged without tolerances.';
  if (which === 'stated') return 'Requirements were judged over the tolerances that the design states, and no others.';
  const percent = (share: number): string => `± ${100 * share} %`;
  const t = DEFAULT_TOLERANCES;
  return `Requirements were judged over the tolerances that the design states and, where it states none, over usual ones: epitaxial doping ${percent(t.epitaxialDoping)}, implanted dose ${percent(t.implantedDose)}, thickness ${percent(t.thickness)}, barriers ± ${1000 * t.barrier} meV, band offsets ± ${t.offset} eV (suppliers’ tables; Colaux et al., Analyst 2015; Stevie et al., SIMS XI 1998; Martin et al., Appl. Phys. Lett. 1994; Waldrop and Grant, Appl. Phys. Lett. 1996).`;
}
