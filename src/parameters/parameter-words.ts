/** What the values of an entry are called on paper, by their path in it. The names of valleys and steps of a list are put in for *. */
const WORDS: readonly [path: RegExp, words: string][] = [
  [/^gap$/, 'gap'],
  [/^gap\.zeroK$/, 'gap at 0 K'],
  [/^gap\.at300K$/, 'gap at 300 K'],
  [/^gap\.slope$/, 'gap slope'],
  [/^gap\.alpha$/, 'Varshni α'],
  [/^gap\.beta$/, 'Varshni β'],
  [/^gap\.coupling$/, 'gap coupling S'],
  [/^gap\.phonon$/, 'gap phonon energy'],
  [/^affinity$/, 'affinity at 300 K'],
  [/^affinityShare$/, 'share of the gap’s move in the affinity'],
  [/^permittivity$/, 'permittivity'],
  [/^permittivityHighFrequency$/, 'high-frequency permittivity'],
  [/^electronMass$/, 'electron mass (m₀)'],
  [/^holeMass$/, 'hole mass (m₀)'],
  [/^nonParabolicity\.(.+)$/, '* non-parabolicity'],
  [/^tunnellingMass\.(.+)$/, '* tunnelling mass (m₀)'],
  [/^richardson\.(.+)$/, '* Richardson constant'],
  [/^mobility\.(electron|hole)$/, '* mobility'],
  [/^mobility\.(.+)\.min$/, '* mobility, least'],
  [/^mobility\.(.+)\.max$/, '* mobility, largest'],
  [/^mobility\.(.+)\.reference$/, '* mobility, reference doping'],
  [/^mobility\.(.+)\.exponent$/, '* mobility, exponent'],
  [/^narrowing\.(donor|acceptor)\.third$/, 'narrowing by *s, power 1/3'],
  [/^narrowing\.(donor|acceptor)\.quarter$/, 'narrowing by *s, power 1/4'],
  [/^narrowing\.(donor|acceptor)\.half$/, 'narrowing by *s, power 1/2'],
  [/^narrowing\.conductionShare$/, 'share of the narrowing in Ec'],
  [/^narrowing\.(.+)$/, 'narrowing, *'],
  [/^neutralityLevel$/, 'neutrality level above Ev'],
  [/^pinningSlope$/, 'pinning slope S'],
  [/^polarisation\.spontaneous$/, 'spontaneous polarisation'],
  [/^polarisation\.lattice$/, 'lattice constant'],
  [/^polarisation\.(.+)$/, '*'],
  [/^naturalValence\.edge$/, 'valence edge on its natural scale'],
  [/^otherValleys\.([^.]+)\.gap\.zeroK$/, '* gap at 0 K'],
  [/^otherValleys\.([^.]+)\.gap\.alpha$/, '* Varshni α'],
  [/^otherValleys\.([^.]+)\.gap\.beta$/, '* Varshni β'],
  [/^otherValleys\.([^.]+)\.electronMass$/, '* electron mass (m₀)'],
  [/^otherValleys\.([^.]+)\.(.+)$/, '* valley gap'],
  [/^alloy\.bowing\.gap$/, 'gap bowing'],
  [/^alloy\.bowing\.(.+)$/, '* bowing'],
  [/^alloy\.valleyBowing\.(.+)$/, '* gap bowing'],
  [/^validity\.temperature$/, 'valid for temperatures'],
  [/^validity\.doping$/, 'valid for doping'],
  [/^outsideContactModel\.low$/, 'contacts were measured from'],
  [/^outsideContactModel\.high$/, 'contacts were measured up to'],
  [/^depth$/, 'depth'],
  [/^depth\.points\.(\d+)$/, 'depth'],
  [/^degeneracy$/, 'degeneracy'],
  [/^merging\.depthReference$/, 'merging, reference of the depth'],
  [/^merging\.depthExponent$/, 'merging, exponent of the depth'],
  [/^merging\.boundReference$/, 'merging, reference of the bound share'],
  [/^merging\.boundExponent$/, 'merging, exponent of the bound share'],
  [/^screened\.coefficient$/, 'screening of the depth'],
  [/^screened\.mottDensity$/, 'screening, Mott density'],
  [/^screened\.boundExponent$/, 'screening, exponent of the bound share'],
  [/^mottDensity$/, 'Mott density'],
  [/^solubility$/, 'solubility'],
  [/^workFunction$/, 'work function'],
];

/** Words of a value; a path that the list does not know is shown as it is, so that no value goes missing. */
export function parameterWords(path: string): string {
  const formula = /^(.+)\.formula$/.exec(path);
  if (formula) return `${parameterWords(formula[1])} by formula`;
  for (const [pattern, words] of WORDS) {
    const found = pattern.exec(path);
    if (found) return words.replace('*', found[1] === undefined ? '' : found[1].replace(/([a-z])([A-Z])/g, (_, a: string, b: string) => `${a} ${b.toLowerCase()}`));
  }
  return path;
}
