import { decimalText } from '../result/figure-text.ts';
import type { ContactResult, JunctionResult, LayerResult, Result } from '../result/types.ts';
import { energyText, lengthText, spoken } from './figures.ts';

/** The diagram in sentences, for readers who cannot see it: conditions, layers from the top down, junctions, contacts, cautions. */
export function describe(result: Result): string {
  const { temperature_K, bias_V } = result.conditions;
  const state = bias_V === 0 ? 'in equilibrium' : `at ${bias_V} V`;
  const sentences = [
    `Band diagram of ${result.title === '' ? 'an untitled design' : result.title}: ${result.layers.length} ${result.layers.length === 1 ? 'layer' : 'layers'} at ${Number(temperature_K.toPrecision(4))} K ${state}.`,
    ...result.layers.map(layerSentence),
    ...result.junctions.map(junctionSentence),
    ...result.contacts.map(contactSentence),
    ...extremes(result),
  ];
  return sentences.join(' ');
}

function layerSentence(layer: LayerResult, i: number): string {
  const composition = layer.x === null ? '' : ` (x = ${Number(layer.x.toPrecision(3))})`;
  const head = `Layer ${i + 1}, ${layer.name}: ${lengthText(layer.thickness_nm)} of ${layer.material}${composition}, gap ${energyText(layer.gap_eV)}`;
  if (layer.insulator) return `${head}, an insulator.`;
  const [edge, distance] = layer.type === 'p' ? ['above the valence band', layer.ef_minus_ev_eV] : ['below the conduction band', layer.ec_minus_ef_eV];
  const inside = distance < 0 ? `${energyText(-distance)} inside the ${layer.type === 'p' ? 'valence' : 'conduction'} band` : `${energyText(distance)} ${edge}`;
  const type = layer.type === 'i' ? 'undoped' : `${layer.type}-type`;
  return `${head}, ${type}, ${layer.regime}; by itself its Fermi level lies ${inside}${layer.fully_depleted ? '; fully depleted' : ''}.`;
}

function junctionSentence(j: JunctionResult): string {
  const parts: string[] = [];
  if (j.builtin_V !== null) parts.push(`built-in potential ${decimalText(j.builtin_V, 3)} V`);
  if (j.alignment !== 'same') parts.push(`conduction band step ${energyText(j.delta_ec_eV)}, valence band step ${energyText(j.delta_ev_eV)}, ${j.class}`);
  parts.push(`peak field ${spoken(Math.abs(j.peak_field_V_cm))} V/cm`);
  return `From ${j.above} to ${j.below}: ${parts.join('; ')}.`;
}

function contactSentence(c: ContactResult): string {
  const where = c.side === 'top' ? 'Top' : 'Bottom';
  if (c.kind === 'neutral') return `${where}: neutral contact.`;
  if (c.kind === 'open') return `${where}: free surface.`;
  const name = c.kind === 'pinned' ? 'pinned surface' : `contact${c.metal === null ? '' : ` of ${c.metal}`}`;
  const barriers = [
    c.barrier_n_eV === null ? '' : `barrier of electrons ${energyText(c.barrier_n_eV)}`,
    c.barrier_p_eV === null ? '' : `barrier of holes ${energyText(c.barrier_p_eV)}`,
  ].filter((text) => text !== '');
  return `${where}: ${[name, ...barriers].join(', ')}.`;
}

/** How far the bands bend in all: what a seeing reader takes in at the first glance. */
function extremes(result: Result): string[] {
  const { ec_eV } = result.profile;
  if (ec_eV.length === 0) return [];
  let [low, high] = [0, 0];
  ec_eV.forEach((e, i) => {
    if (e < ec_eV[low]) low = i;
    if (e > ec_eV[high]) high = i;
  });
  const at = (i: number): string => `${energyText(ec_eV[i])} at ${lengthText(Math.max(result.profile.z_nm[i], 0))}`;
  return [`Against the Fermi level the conduction band is highest, ${at(high)}, and lowest, ${at(low)}.`];
}
