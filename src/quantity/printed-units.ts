const RAISED: Record<string, string> = { '-': '⁻', '+': '⁺', 0: '⁰', 1: '¹', 2: '²', 3: '³', 4: '⁴', 5: '⁵', 6: '⁶', 7: '⁷', 8: '⁸', 9: '⁹' };

/** Powers raised: "cm^-3" is "cm⁻³". */
export function raisedPowers(text: string): string {
  return text.replace(/\^([-+]?\d+)(?!\d|\.\d)/g, (_, digits: string) => [...digits].map((d) => RAISED[d]).join(''));
}

/** A typed quantity as it is printed: "1e+19 cm^-3" is "1e19 cm⁻³", "um" is "µm", "ohm" is "Ω". */
export function printedUnits(text: string): string {
  const signed = text
    .replace(/(\d)e\+0*(\d)/g, '$1e$2')
    .replace(/(\d)e-0*(\d)/g, '$1e−$2')
    .replace(/(^|[\s(])-(?=[\d.])/g, '$1−');
  return raisedPowers(signed)
    .replace(/(^|[\d\s(])um(?=$|[\s,;)])/g, '$1µm')
    .replace(/(^|[\d\s(])ohm(?=$|[\s,;)/])/g, '$1Ω')
    .replace(/(^|[\d\s(])deg ?C(?=$|[\s,;)])/g, '$1°C');
}
