/**
 * The presets: plain data in the design document's own shape, each value with its source and how it was checked ("page": seen in print; "memory": from
 * memory of the cited work; "computed": derived). Imports nothing but data.
 */
import in4HSiC from './dopants/4H-SiC.json' with { type: 'json' };
import in6HSiC from './dopants/6H-SiC.json' with { type: 'json' };
import inAlAs from './dopants/AlAs.json' with { type: 'json' };
import inAlN from './dopants/AlN.json' with { type: 'json' };
import inCdS from './dopants/CdS.json' with { type: 'json' };
import inCdTe from './dopants/CdTe.json' with { type: 'json' };
import inGa2O3 from './dopants/Ga2O3.json' with { type: 'json' };
import inGaAs from './dopants/GaAs.json' with { type: 'json' };
import inGaN from './dopants/GaN.json' with { type: 'json' };
import inGaP from './dopants/GaP.json' with { type: 'json' };
import inGaSb from './dopants/GaSb.json' with { type: 'json' };
import inGe from './dopants/Ge.json' with { type: 'json' };
import inInAs from './dopants/InAs.json' with { type: 'json' };
import inInGaAs from './dopants/InGaAs.json' with { type: 'json' };
import inInGaP from './dopants/InGaP.json' with { type: 'json' };
import inInN from './dopants/InN.json' with { type: 'json' };
import inInP from './dopants/InP.json' with { type: 'json' };
import inSi from './dopants/Si.json' with { type: 'json' };
import inZnO from './dopants/ZnO.json' with { type: 'json' };
import indiamond from './dopants/diamond.json' with { type: 'json' };
import material4HSiC from './materials/4H-SiC.json' with { type: 'json' };
import material6HSiC from './materials/6H-SiC.json' with { type: 'json' };
import materialAl2O3 from './materials/Al2O3.json' with { type: 'json' };
import materialAlAs from './materials/AlAs.json' with { type: 'json' };
import materialAlN from './materials/AlN.json' with { type: 'json' };
import materialCdTe from './materials/CdTe.json' with { type: 'json' };
import materialGa2O3 from './materials/Ga2O3.json' with { type: 'json' };
import materialGaAs from './materials/GaAs.json' with { type: 'json' };
import materialGaN from './materials/GaN.json' with { type: 'json' };
import materialGaP from './materials/GaP.json' with { type: 'json' };
import materialGaSb from './materials/GaSb.json' with { type: 'json' };
import materialGe from './materials/Ge.json' with { type: 'json' };
import materialHfO2 from './materials/HfO2.json' with { type: 'json' };
import materialInAs from './materials/InAs.json' with { type: 'json' };
import materialInN from './materials/InN.json' with { type: 'json' };
import materialInP from './materials/InP.json' with { type: 'json' };
import materialSi from './materials/Si.json' with { type: 'json' };
import materialSi3N4 from './materials/Si3N4.json' with { type: 'json' };
import materialSiO2 from './materials/SiO2.json' with { type: 'json' };
import materialZnO from './materials/ZnO.json' with { type: 'json' };
import metals from './metals.json' with { type: 'json' };
import sources from './sources.json' with { type: 'json' };

/** Dopants of every host. `solubility`: highest active concentration reached; `mottDensity`: of the metal-insulator transition. */
export const dopants = [
  ...in4HSiC, ...in6HSiC, ...inAlAs, ...inAlN, ...inCdS, ...inCdTe, ...inGa2O3, ...inGaAs, ...inGaN, ...inGaP, ...inGaSb, ...inGe, ...inInAs, ...inInGaAs, ...inInGaP, ...inInN, ...inInP, ...inSi, ...inZnO, ...indiamond,
];
/** Crystals. Masses are those of 300 K; nothing moves them with T yet. */
export const materials = [material4HSiC, material6HSiC, materialAl2O3, materialAlAs, materialAlN, materialCdTe, materialGa2O3, materialGaAs, materialGaN, materialGaP, materialGaSb, materialGe, materialHfO2, materialInAs, materialInN, materialInP, materialSi, materialSi3N4, materialSiO2, materialZnO];
export { metals, sources };
