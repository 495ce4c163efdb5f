import { ERROR_LEVELS, regimeWords } from '../../src/drawing/regime-map-plot.ts';
import type { MapMark } from '../../src/map/marks.ts';
import { REGIMES, DEGENERACIES, type RegimeMap } from '../../src/map/regime-map.ts';
import { numberCell } from '../../src/export/text-cell.ts';
import { carrierClass } from '../../src/drawing/regime-look.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';

/** The whole map, a line a point, coldest and least doped first, after RFC 4180. */
export function mapCsv(map: RegimeMap): string {
  const head = 'active doping (cm^-3),temperature (K),carriers,degeneracy,regime,Ec - EF (eV),distance of EF from its band (kT),majority over net doping,minority over majority,error of the textbook (meV)';
  const columns = map.doping.length;
  const rows = Array.from(map.regime, (regime, i) =>
    [
      numberCell(map.doping[i % columns]), numberCell(map.temperature[Math.floor(i / columns)]), carrierClass(map, i) ?? '', DEGENERACIES[map.degeneracy[i]] ?? '', REGIMES[regime] ?? '',
      ...[map.ecMinusEf, map.bandDistance, map.carrierShare, map.minorityShare, map.boltzmannError].map((field) => numberCell(field[i])),
    ].join(','),
  );
  return [head, ...rows, ''].join('\r\n');
}

/** The figures at a point of the map. */
export function mapReading(map: RegimeMap, index: number): { where: string; words: string; parts: { symbol: string; figure: string }[] } {
  const columns = map.doping.length;
  const signed = (v: number): string => `${v > 0 ? '+' : ''}${writeNumber(v, 3)}`.replace('-', '−');
  return {
    where: `${writeNumber(map.doping[index % columns], 3)} cm^-3, ${writeNumber(map.temperature[Math.floor(index / columns)], 4)} K`,
    words: regimeWords(map, index),
    parts: Number.isNaN(map.ecMinusEf[index]) ? [] : [
      { symbol: 'Ec − EF', figure: `${writeNumber(map.ecMinusEf[index], 4)} eV` },
      { symbol: 'EF from its band', figure: `${writeNumber(map.bandDistance[index], 3)} kT` },
      { symbol: 'majority over net doping', figure: writeNumber(map.carrierShare[index], 3) },
      { symbol: 'the textbook is off by', figure: `${signed(map.boltzmannError[index])} meV` },
    ],
  };
}

/** Rows for readers of tables: the regime at a few temperatures of each layer that is marked. */
export function markRows(map: RegimeMap, marks: readonly MapMark[]): { name: string; doping: string; cells: string[] }[] {
  const columns = map.doping.length;
  return marks.map(({ name, doping, same }) => {
    const column = nearest(map.doping, doping);
    return { name, doping: `${writeNumber(doping, 3)} cm^-3`, cells: tableTemperatures(map).map((row) => (same && column !== null ? `${regimeWords(map, row * columns + column)}, ${mapReading(map, row * columns + column).parts[3]?.figure ?? ''}` : '–')) };
  });
}

/** Rows of the map that the table shows: six from coldest to hottest. */
export const tableTemperatures = ({ temperature }: RegimeMap): number[] => Array.from({ length: 6 }, (_, i) => Math.round(((temperature.length - 1) * i) / 5));

function nearest(list: Float64Array, value: number): number | null {
  if (value < list[0] || value > list[list.length - 1]) return null;
  let best = 0;
  list.forEach((v, i) => {
    if (Math.abs(Math.log(v / value)) < Math.abs(Math.log(list[best] / value))) best = i;
  });
  return best;
}

export const ERROR_WORDS = ERROR_LEVELS.filter((level) => level > 0).map((level) => `±${level}`).join(', ');
