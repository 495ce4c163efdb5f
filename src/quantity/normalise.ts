/**
 * What engineers type, brought to the one notation that the parser reads: micro, ohm, angstrom and degree signs, raised digits, the real minus and the
 * multiplication signs, "cm-3" and "cm2". Nothing is dropped; what is not known is left for the parser to refuse.
 */
const RAISED: Readonly<Record<string, string>> = { '⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9', '⁻': '-', '⁺': '+' };

export function normalise(text: string): string {
  return text
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹⁻⁺]+/g, (run) => `^${[...run].map((c) => RAISED[c]).join('')}`)
    .replace(/[\u2212\u2010\u2011\u2013]/g, '-')
    .replace(/[×·⋅∙]/g, '*')
    .replace(/[\u00b5\u03bc]/g, 'u')
    .replace(/[\u2126\u03a9]/g, 'ohm')
    .replace(/[\u212b\u00c5]/g, 'angstrom')
    .replace(/°\s*C|\u2103/g, 'degC')
    .replace(/[\u00a0\u2000-\u200a\u202f]/g, ' ')
    // "cm-3", "cm2" as the trade writes them: an exponent straight behind a unit of length, not a subtraction.
    .replace(/(?<![A-Za-z0-9_])(\d[\d.]*(?:[eE][-+]?\d+)?\s*)?([numc]?m)(-?[123])(?![\w.^])/g, '$1$2^$3')
    .trim();
}
