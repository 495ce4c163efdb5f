/** The presets: plain data in the design document's own shape, each value with its source and how it was checked ("page": seen in print; "memory": from
  memory of the cited work; "computed": derived). Imports nothing but data. */
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
import metals from './metals.json' with { type: 'json' };
import sources from './sources.json' with { type: 'json' };

/** Dopants of every host. `solubility`: highest active concentration reached; `mottDensity`: of the metal-insulator transition. */
export const dopants = [
  ...in4HSiC, ...in6HSiC, ...inAlAs, ...inAlN, ...inCdS, ...inCdTe, ...inGa2O3, ...inGaAs, ...inGaN, ...inGaP, ...inGaSb, ...inGe, ...inInAs, ...inInGaAs, ...inInGaP, ...inInN, ...inInP, ...inSi, ...inZnO, ...indiamond,
];
export { metals, sources };
