import { ticks as niceTicks } from 'd3-array';
import { format } from 'd3-format';
import type { Result } from '../result/types.ts';

export interface EnergyAxis {
  /** px of the lowest and of the highest energy; the first is the larger, since y runs down */ range: [number, number];
  /** eV */ domain: [number, number];
  /** eV -> px */ y(e_eV: number): number;
  /** px -> eV */ energy(y: number): number;
  ticks: { y: number; label: string }[];
  title: string;
}

const LEAST_TICKS = 3;
/** Room above and below the curves, as a share of their span. */
const MARGIN = 0.08;
/** How far an insulator's edges may stretch the axis up and down, as shares of the semiconductors' span: more for the barrier of electrons, the one asked for most. */
const INSULATOR_STRETCH = { up: 1.7, down: 0.6 };

/**
 * @param options.range    [px of the lowest energy, px of the highest]
 * @param options.window   energies to show, eV: a zoom; wins over `domain`
 * @param options.domain   energies to show, eV, where several drawings share one axis; by default what holds Ec, Ev and EF
 * @param options.vacuum   make room for the vacuum level too
 */
export function energyAxis(
  result: Result,
  options: { range: [number, number]; window?: [number, number]; domain?: [number, number]; vacuum?: boolean },
): EnergyAxis {
  const { range } = options;
  const asked = options.window ?? options.domain;
  const domain: [number, number] = asked ? [Math.min(...asked), Math.max(...asked)] : ownDomain(result, options.vacuum ?? false);
  if (!(domain[1] > domain[0])) throw new RangeError(`no energy window: ${domain.join(' to ')} eV`);
  const perEv = (range[1] - range[0]) / (domain[1] - domain[0]);
  const y = (e: number): number => range[0] + (e - domain[0]) * perEv;
  let wanted = Math.max(2, Math.floor(Math.abs(range[1] - range[0]) / 55));
  let values = niceTicks(domain[0], domain[1], wanted);
  // Round steps are few in a low picture; one tick is no scale.
  while (values.length < LEAST_TICKS) values = niceTicks(domain[0], domain[1], ++wanted);
  return {
    range, domain, y,
    energy: (at) => domain[0] + (at - range[0]) / perEv,
    ticks: values.map((value, i) => ({ y: y(value), label: energyLabel(value, values[i === 0 ? 1 : i - 1]) })),
    title: 'electron energy (eV), zero at the Fermi level',
  };
}

/** As many decimals as the step between ticks needs; d3's minus sign is the true one. */
function energyLabel(value: number, neighbour: number | undefined): string {
  const step = neighbour === undefined ? 1 : Math.abs(value - neighbour);
  const decimals = Math.max(1, Math.ceil(-Math.log10(step) - 1e-9));
  return format(`.${decimals}f`)(value + 0);
}

function ownDomain(result: Result, vacuum: boolean): [number, number] {
  const { ec_eV, ev_eV, ef_eV, vacuum_eV, layer } = result.profile;
  let [low, high] = [Infinity, -Infinity];
  let [lowest, highest] = [Infinity, -Infinity];
  for (let i = 0; i < layer.length; i++) {
    // A node without a value does not count.
    if (!Number.isFinite(ec_eV[i] + ev_eV[i] + ef_eV[i])) continue;
    lowest = Math.min(lowest, ev_eV[i]);
    highest = Math.max(highest, ec_eV[i]);
    const insulator = result.layers[layer[i]].insulator;
    low = Math.min(low, ef_eV[i], insulator ? Infinity : ev_eV[i]);
    high = Math.max(high, ef_eV[i], insulator ? -Infinity : ec_eV[i]);
  }
  if (!(highest > lowest)) throw new RangeError('no energy window: the profile has no band edges');
  const span = high - low || highest - lowest;
  // An oxide's 9 eV gap would press the semiconductor's bands together: its edges may run out of the picture.
  low = Math.max(lowest, low - INSULATOR_STRETCH.down * span);
  high = Math.min(highest, high + INSULATOR_STRETCH.up * span);
  if (vacuum) for (const e of vacuum_eV) if (e > high) high = e;
  const room = MARGIN * (high - low);
  return [low - room, high + room];
}
