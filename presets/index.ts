/**
 * The presets: plain data in the design document's own shape (types.ts), each value with its source and how it was checked ("page": seen in print;
 * "memory": from memory of the cited work; "computed": derived). Imports nothing but data.
 */
import in4HSiC from './dopants/4H-SiC.json' with { type: 'json' };
import in6HSiC from './dopants/6H-SiC.json' with { type: 'json' };
import inAlAs from './dopants/AlAs.json' with { type: 'json' };
import inAlGaAs from './dopants/AlGaAs.json' with { type: 'json' };
import inAlGaN from './dopants/AlGaN.json' with { type: 'json' };
import inAlN from './dopants/AlN.json' with { type: 'json' };
import inCdS from './dopants/CdS.json' with { type: 'json' };
import inCdTe from './dopants/CdTe.json' with { type: 'json' };
import inGa2O3 from './dopants/Ga2O3.json' with { type: 'json' };
import inGaAs from './dopants/GaAs.json' with { type: 'json' };
import inGaN from './dopants/GaN.json' with { type: 'json' };
import inGaP from './dopants/GaP.json' with { type: 'json' };
import inGaSb from './dopants/GaSb.json' with { type: 'json' };
import inGe from './dopants/Ge.json' with { type: 'json' };
import inInAlAs from './dopants/InAlAs.json' with { type: 'json' };
import inInAs from './dopants/InAs.json' with { type: 'json' };
import inInGaAs from './dopants/InGaAs.json' with { type: 'json' };
import inInGaN from './dopants/InGaN.json' with { type: 'json' };
import inInGaP from './dopants/InGaP.json' with { type: 'json' };
import inInN from './dopants/InN.json' with { type: 'json' };
import inInP from './dopants/InP.json' with { type: 'json' };
import inSi from './dopants/Si.json' with { type: 'json' };
import inSiGe from './dopants/SiGe.json' with { type: 'json' };
import inSiGeonSi from './dopants/SiGe-on-Si.json' with { type: 'json' };
import inZnO from './dopants/ZnO.json' with { type: 'json' };
import indiamond from './dopants/diamond.json' with { type: 'json' };
import material4HSiC from './materials/4H-SiC.json' with { type: 'json' };
import material6HSiC from './materials/6H-SiC.json' with { type: 'json' };
import materialAl2O3 from './materials/Al2O3.json' with { type: 'json' };
import materialAlAs from './materials/AlAs.json' with { type: 'json' };
import materialAlGaAs from './materials/AlGaAs.json' with { type: 'json' };
import materialAlGaN from './materials/AlGaN.json' with { type: 'json' };
import materialAlN from './materials/AlN.json' with { type: 'json' };
import materialCdS from './materials/CdS.json' with { type: 'json' };
import materialCdTe from './materials/CdTe.json' with { type: 'json' };
import materialGa2O3 from './materials/Ga2O3.json' with { type: 'json' };
import materialGaAs from './materials/GaAs.json' with { type: 'json' };
import materialGaN from './materials/GaN.json' with { type: 'json' };
import materialGaP from './materials/GaP.json' with { type: 'json' };
import materialGaSb from './materials/GaSb.json' with { type: 'json' };
import materialGe from './materials/Ge.json' with { type: 'json' };
import materialGeonSi from './materials/Ge-on-Si.json' with { type: 'json' };
import materialHfO2 from './materials/HfO2.json' with { type: 'json' };
import materialInAlAs from './materials/InAlAs.json' with { type: 'json' };
import materialInAs from './materials/InAs.json' with { type: 'json' };
import materialInGaAs from './materials/InGaAs.json' with { type: 'json' };
import materialInGaN from './materials/InGaN.json' with { type: 'json' };
import materialInGaP from './materials/InGaP.json' with { type: 'json' };
import materialInN from './materials/InN.json' with { type: 'json' };
import materialInP from './materials/InP.json' with { type: 'json' };
import materialSi from './materials/Si.json' with { type: 'json' };
import materialSi3N4 from './materials/Si3N4.json' with { type: 'json' };
import materialSiGe from './materials/SiGe.json' with { type: 'json' };
import materialSiGeonSi from './materials/SiGe-on-Si.json' with { type: 'json' };
import materialSiO2 from './materials/SiO2.json' with { type: 'json' };
import materialZnO from './materials/ZnO.json' with { type: 'json' };
import materialdiamond from './materials/diamond.json' with { type: 'json' };
import metalRows from './metals.json' with { type: 'json' };
import offsetRows from './offsets.json' with { type: 'json' };
import sourceRows from './sources.json' with { type: 'json' };
import type { DopantPreset, MaterialPreset, MetalPreset, OffsetPreset } from './types.ts';

export type * from './types.ts';

// An imported JSON file knows its words only as strings; presets.test.ts holds every entry against the shapes of types.ts.
/** Crystals and alloys. */
export const materials = [
  material4HSiC, material6HSiC, materialAl2O3, materialAlAs, materialAlGaAs, materialAlGaN, materialAlN, materialCdS, materialCdTe, materialGa2O3,
  materialGaAs, materialGaN, materialGaP, materialGaSb, materialGe, materialGeonSi, materialHfO2, materialInAlAs, materialInAs, materialInGaAs,
  materialInGaN, materialInGaP, materialInN, materialInP, materialSi, materialSi3N4, materialSiGe, materialSiGeonSi, materialSiO2, materialZnO,
  materialdiamond,
] as unknown as readonly MaterialPreset[];

/** Dopants of every host, one row a level. */
export const dopants = [
  ...in4HSiC, ...in6HSiC, ...inAlAs, ...inAlGaAs, ...inAlGaN, ...inAlN, ...inCdS, ...inCdTe, ...inGa2O3, ...inGaAs, ...inGaN, ...inGaP, ...inGaSb,
  ...inGe, ...inInAlAs, ...inInAs, ...inInGaAs, ...inInGaN, ...inInGaP, ...inInN, ...inInP, ...inSi, ...inSiGe, ...inSiGeonSi, ...inZnO,
  ...indiamond,
] as unknown as readonly DopantPreset[];

/** Metals, nitrides and silicides with their measured barriers. */
export const metals = metalRows as unknown as readonly MetalPreset[];

/** Published band offsets of pairs. */
export const offsets = offsetRows as unknown as readonly OffsetPreset[];

/** Key of a source to the work. */
export const sources: Readonly<Record<string, string>> = sourceRows;
