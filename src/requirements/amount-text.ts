import { normalise } from '../quantity/normalise.ts';
import { writeNumber } from '../quantity/write-quantity.ts';

const MEV_PER_EV = 1e3;
const KELVIN_AT_ZERO_CELSIUS = 273.15;

/** "+20 %" */
export function shareText(share: number): string {
  return `${signed(share * 100)} %`;
}

/** "-50 meV" from eV */
export function energyText(energy: number): string {
  return `${signed(energy * MEV_PER_EV)} meV`;
}

/** A signed count of a stated tolerance in the words of the person: "2 nm" by -1 is "-2 nm", "10 %" by 0.5 is "+5 %". */
export function amountText(tolerance: string, count: number): string {
  const plain = normalise(tolerance).replace(/^(?:±|\+\/-|\+-)\s*/, '');
  const found = /^((?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?)\s*(.*)$/.exec(plain);
  if (found && /^[^-+*/]*(?:\/[^-+*/]*)?(?:\^-?\d+)?$/.test(found[2])) return `${signed(count * Number(found[1]))}${found[2] === '' ? '' : ` ${found[2]}`}`;
  return Math.abs(count) === 1 ? `${count < 0 ? '-' : '+'}(${plain})` : `${signed(count)} x (${plain})`;
}

/** "-40 degC" where the design's temperatures are written so, else "233.15 K". */
export function temperatureText(temperature: number, celsius: boolean): string {
  return celsius ? `${writeNumber(Math.round((temperature - KELVIN_AT_ZERO_CELSIUS) * 10) / 10)} degC` : `${writeNumber(Math.round(temperature * 100) / 100, 5)} K`;
}

function signed(value: number): string {
  const text = writeNumber(value, 3);
  return value >= 0 ? `+${text}` : text;
}
