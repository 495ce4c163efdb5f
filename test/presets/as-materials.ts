/**
 * Presets in solver units, as far as bands, mobility and polarisation go: enough to hold them against published figures. Reads "number unit" only, with the
 * units that presets.test.ts allows.
 */
import { materials, type CrystalPreset, type GapPreset, type MassPreset, type MobilityPreset } from '../../presets/index.ts';
import type { Assumptions, CrystalMaterial, GapLaw, Material, MobilityLaw, Polarisation } from '../../solver/stack.ts';

/** eV, K, eV/K, cm^-3, cm^2/(V s); C/m^2 to C/cm^2, nm to cm; GPa stays, only ratios count. */
const FACTOR: Record<string, number> = { meV: 1e-3, 'C/m^2': 1e-4, nm: 1e-7 };

export function read(text: string): number {
  const [value, ...unit] = text.split(' ');
  return Number(value) * (FACTOR[unit.join(' ')] ?? 1);
}

const mass = (m: MassPreset): number[] => (typeof m === 'number' ? [m] : m);

function gap(g: GapPreset): GapLaw {
  if (typeof g === 'string') return { zeroK: read(g), alpha: 0, beta: 1 };
  if (g.law === 'linear') return { law: 'linear', at300K: read(g.at300K), slope: read(g.slope) };
  if (g.law === 'odonnell-chen') return { law: 'odonnell-chen', zeroK: read(g.zeroK), coupling: g.coupling, phonon: read(g.phonon) };
  return { zeroK: read(g.zeroK), alpha: read(g.alpha), beta: read(g.beta) };
}

function mobility(m: MobilityPreset | undefined): MobilityLaw | undefined {
  if (m === undefined) return undefined;
  return typeof m === 'string' ? read(m) : { min: read(m.min), max: read(m.max), reference: read(m.reference), exponent: m.exponent };
}

function crystal(p: CrystalPreset): CrystalMaterial {
  return {
    id: p.id,
    insulator: p.insulator ?? false,
    gap: gap(p.gap),
    otherValleys: p.otherValleys?.map((v) => ({ name: v.name, gap: gap(v.gap), electronMass: mass(v.electronMass) })),
    affinity: read(p.affinity),
    affinityShare: p.affinityShare ?? 0.5,
    permittivity: p.permittivity,
    permittivityHighFrequency: p.permittivityHighFrequency ?? p.permittivity,
    electronMass: p.electronMass === undefined ? undefined : mass(p.electronMass),
    holeMass: p.holeMass === undefined ? undefined : mass(p.holeMass),
    mobility: { electron: mobility(p.mobility?.electron), hole: mobility(p.mobility?.hole) },
    polarisation: p.polarisation && (Object.fromEntries(Object.entries(p.polarisation).map(([key, text]) => [key, read(text)])) as unknown as Polarisation),
    naturalValence: p.naturalValence && { scale: p.naturalValence.scale, edge: read(p.naturalValence.edge) },
  };
}

export function material(id: string): Material {
  const p = materials.find((m) => m.id === id);
  if (!p) throw new RangeError(`no preset ${id}`);
  if (!('alloy' in p)) return crystal(p);
  const { first, second, bowing, valleyBowing } = p.alloy;
  const text = bowing.gap ?? '0 eV';
  return {
    id,
    first: material(first) as CrystalMaterial,
    second: material(second) as CrystalMaterial,
    bowing: { gap: typeof text === 'string' ? read(text) : text.map(read), affinity: bowing.affinity === undefined ? 0 : read(bowing.affinity) },
    valleyBowing: valleyBowing && Object.fromEntries(Object.entries(valleyBowing).map(([name, b]) => [name, read(b)])),
  };
}

export const PLAIN: Assumptions = { statistics: 'fermi-dirac', alignment: 'offsets', narrowing: false, nonParabolic: false, transmission: 'wkb' };
