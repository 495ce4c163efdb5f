/** The solver's public names. Units: units.ts; what goes in: stack.ts; what comes out: solution.ts. */
export { solveStack } from './solve-stack.ts';
export { solveBands, type SolvedBands } from './solve-bands.ts';
export { capacitancesOf, contactOf, junctionOf, layerOf } from './stack-figures.ts';
export { contactCurve, type CarrierCurve, type ContactCurve } from './contact-curve.ts';
export { layerFigures } from './layer.ts';
export { isRefusal } from './solution.ts';
export { isAlloy } from './stack.ts';
export { bandsAt } from './layer-bands.ts';
export { profileAt } from './profile.ts';
export { fermiHalf, fermiMinusHalf, fermiThreeHalves, inverseFermiHalf } from './fermi-integral.ts';
export type * from './stack.ts';
export type * from './solution.ts';
