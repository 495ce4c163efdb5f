import { catalogueOf, type Catalogue } from '../../src/design/catalogue.ts';
import type { ContactInput, CrystalInput, Custom, Design, DopantRow, InterfaceInput, LayerInput, MaterialInput } from '../../src/design/types.ts';
import { Dice } from './dice.ts';
import { randomAlloy, randomCrystal, randomDopants, randomInsulator } from './random-material.ts';
import { randomComposition, randomConcentration } from './random-profile.ts';

export { randomFrom } from './dice.ts';

export interface Limits {
  layers: number;
  temperature: [number, number];
  /** nm */ thickness: [number, number];
  /** cm^-3 */ doping: [number, number];
  /** cm^-2 */ sheet: number;
}

/** What an engineer could ask: random, yet sensible. */
export const SENSIBLE: Limits = { layers: 12, temperature: [4, 1000], thickness: [1, 5e5], doping: [1e12, 1e21], sheet: 5e13 };

/** Materials that are grown on each other; a stack keeps to one family, with insulators anywhere. */
const FAMILIES: string[][] = [
  ['Si', 'SiGe', 'Ge'], ['Si', 'SiGe-on-Si', 'Ge-on-Si'], ['GaAs', 'AlGaAs', 'AlAs', 'InGaP'], ['InP', 'InGaAs', 'InAlAs'], ['GaN', 'AlGaN', 'InGaN', 'AlN', 'InN'], ['GaN', 'AlGaN', 'AlN'],
  ['4H-SiC'], ['6H-SiC'], ['ZnO'], ['Ga2O3'], ['CdTe', 'CdS'], ['diamond'], ['InAs', 'GaSb'], ['GaP', 'Si'],
];
/** Share of designs that bring materials of their own. */
const OWN = 0.15;
const LARGEST_INSULATOR_NM = 100;

/** One random design, of the presets or with entries of its own. */
export function randomDesign(random: () => number, limits: Limits = SENSIBLE): Design {
  return new Draw(new Dice(random), limits).design();
}

class Draw {
  private readonly custom: Custom | undefined;
  private readonly catalogue: Catalogue;
  private readonly family: readonly string[];
  private readonly insulators: readonly string[];

  constructor(
    private readonly dice: Dice,
    private readonly limits: Limits,
  ) {
    this.custom = dice.chance(OWN) ? this.drawCustom() : undefined;
    this.catalogue = catalogueOf(this.custom);
    const own = (this.custom?.materials ?? []).filter((m) => !m.insulator).map((m) => m.id);
    this.family = own.length > 0 ? [...own, ...(dice.chance(0.5) ? dice.pick(FAMILIES) : [])] : dice.pick(FAMILIES);
    const insulators = [...this.catalogue.materials.values()].filter((e) => e.entry.insulator);
    // An own insulator is there to be used.
    this.insulators = (insulators.some((e) => !e.preset) ? insulators.filter((e) => !e.preset) : insulators).map((e) => e.entry.id);
  }

  design(): Design {
    const { dice, limits } = this;
    const layers = Array.from({ length: 1 + dice.whole(limits.layers) }, (_, l) => this.layer(l));
    const [first, last] = [layers[0].material, layers[layers.length - 1].material];
    const top = this.contact(first);
    // Without a contact and without a carrier nothing fixes the potential, and no engineer would ask.
    let bottom = this.contact(last);
    while (top.kind === 'open' && bottom.kind === 'open' && layers.every((l) => this.entry(l.material).insulator)) bottom = this.contact(last);
    const interfaces = this.interfaces(layers);
    const crystal = this.crystal(layers);
    return {
      format: 'halfmark-design/1', title: 'random', conditions: { temperature: `${dice.logBetween(...limits.temperature).toFixed(2)} K` },
      assumptions: { alignment: dice.chance(0.8) ? 'offsets' : 'affinity', narrowing: dice.chance(0.2), nonParabolic: dice.chance(0.15) },
      ...(crystal ? { crystal } : {}), top, layers, ...(interfaces.length > 0 ? { interfaces } : {}), bottom, ...(this.custom ? { custom: this.custom } : {}),
    };
  }

  private drawCustom(): Custom {
    const { dice } = this;
    const crystals = Array.from({ length: 1 + dice.whole(3) }, (_, i) => randomCrystal(dice, `own-${i + 1}`));
    const materials = [...crystals];
    if (crystals.length > 1 && dice.chance(0.6)) materials.push(randomAlloy(dice, 'own-mixed', crystals[0].id, crystals[1].id));
    const hosts = [...materials];
    if (dice.chance(0.3)) materials.push(randomInsulator(dice, 'own-insulator'));
    return { materials, dopants: hosts.flatMap((m) => randomDopants(dice, m.id, m.alloy !== undefined)) };
  }

  private entry(id: string): MaterialInput {
    const found = this.catalogue.materials.get(id);
    if (!found) throw new Error(`no material ${id}`);
    return found.entry;
  }

  private layer(l: number): LayerInput {
    const { dice, limits } = this;
    const material = dice.chance(0.06) ? dice.pick(this.insulators) : dice.pick(this.family);
    const { insulator, alloy } = this.entry(material);
    const thickness = insulator ? dice.logBetween(limits.thickness[0], LARGEST_INSULATOR_NM) : dice.logBetween(...limits.thickness);
    const out: LayerInput = { name: `layer ${l}`, material, thickness: `${thickness.toPrecision(5)} nm` };
    if (alloy) out.x = randomComposition(dice, thickness);
    if (!insulator) out.dopants = this.dopants(material, thickness);
    return out;
  }

  private dopants(material: string, thickness: number): DopantRow[] {
    const { dice, limits } = this;
    const known = [...(this.catalogue.dopants.get(material)?.values() ?? [])].map((e) => e.entry);
    const centres = [...new Set(known.flatMap((d) => (d.centre === undefined ? [] : [d.centre])))];
    const row = (): DopantRow => {
      const concentration = randomConcentration(dice, thickness, limits.doping);
      const out: DopantRow = known.length > 0 && dice.chance(0.8) ? { dopant: dice.pick(known).id, concentration } : { kind: dice.pick(['donor', 'acceptor'] as const), depth: `${dice.between(5, 400).toFixed(1)} meV`, concentration };
      if (dice.chance(0.1)) out.compensation = dice.between(0, 0.9).toFixed(2);
      if (dice.chance(0.1)) out.activation = dice.between(0.05, 1).toFixed(2);
      if (dice.chance(0.15)) out.model = 'complete';
      return out;
    };
    const rows = Array.from({ length: dice.whole(3) }, row);
    // Exact compensation: equal donors and acceptors.
    if (rows.length > 0 && dice.chance(0.03)) rows.push({ kind: dice.pick(['donor', 'acceptor'] as const), depth: '50 meV', concentration: rows[0].concentration });
    // The levels of a centre come together, as many of each.
    if (centres.length > 0 && dice.chance(0.25)) {
      const centre = dice.pick(centres);
      const concentration = randomConcentration(dice, thickness, limits.doping);
      for (const d of known) if (d.centre === centre) rows.push({ dopant: d.id, concentration });
    }
    return rows;
  }

  private contact(material: string): ContactInput {
    const { dice } = this;
    const { insulator } = this.entry(material);
    const height = this.gapOf(material);
    const kind = dice.random();
    if (kind < 0.35 && !insulator) return { kind: 'neutral' };
    if (kind < 0.6) return this.barrier(material);
    // A surface may be pinned inside a band, too: InAs and InN are.
    if (kind < 0.8) return { kind: 'pinned', level: `${dice.between(-0.15, Math.min(3, height) + 0.1).toFixed(3)} eV` };
    return { kind: 'open', sheetCharge: `${dice.between(-1, 1).toFixed(4)}e${dice.pick([11, 12, 13])} cm^-2` };
  }

  private barrier(material: string): ContactInput {
    const { dice } = this;
    if (dice.chance(0.45)) return { kind: 'barrier', barrier: `${dice.between(0, Math.min(2.5, this.gapOf(material))).toFixed(3)} eV`, carrier: dice.pick(['n', 'p'] as const) };
    const metals = [...this.catalogue.metals.values()].map((e) => e.entry).filter((m) => m.workFunction !== undefined);
    const measured = metals.filter((m) => m.barriers?.some((b) => b.material === material));
    if (measured.length > 0 && dice.chance(0.4)) return { kind: 'barrier', metal: dice.pick(measured).id, carrier: dice.pick(['n', 'p'] as const) };
    const pinning = this.hasNeutralityLevel(material) ? dice.pick(['none', 'full', dice.between(0, 1).toFixed(2)]) : 'none';
    return { kind: 'barrier', metal: dice.pick(metals).id, pinning, imageForce: dice.chance(0.5) };
  }

  private hasNeutralityLevel(material: string): boolean {
    const { neutralityLevel, alloy } = this.entry(material);
    return neutralityLevel !== undefined || (alloy !== undefined && [alloy.first, alloy.second].every((end) => this.entry(end).neutralityLevel !== undefined));
  }

  /** About the gap, eV; only limits of barriers are made of it. */
  private gapOf(material: string): number {
    const { gap, alloy } = this.entry(material);
    if (alloy) return Math.min(this.gapOf(alloy.first), this.gapOf(alloy.second));
    return parseFloat(typeof gap !== 'object' ? (gap ?? '1') : 'formula' in gap ? gap.formula : gap.law === 'linear' ? gap.at300K : gap.zeroK);
  }

  private interfaces(layers: readonly LayerInput[]): InterfaceInput[] {
    const { dice, limits } = this;
    return layers.slice(0, -1).flatMap((l): InterfaceInput[] => {
      const row: InterfaceInput = { above: l.name };
      // Half of the charges are evenly spread, half over the decades: both ends of the range are asked.
      const size = dice.chance(0.5) ? dice.between(0, limits.sheet) : dice.logBetween(1e9, limits.sheet);
      if (dice.chance(0.2)) row.sheetCharge = `${(dice.pick([-1, 1]) * size).toExponential(3)} cm^-2`;
      if (dice.chance(0.05)) row[dice.pick(['dEc', 'dEv'] as const)] = `${dice.between(-0.6, 0.6).toFixed(3)} eV`;
      return row.sheetCharge || row.dEc || row.dEv ? [row] : [];
    });
  }

  /** Polar stacks, relaxed or strained to a crystal of the stack's own family. */
  private crystal(layers: readonly LayerInput[]): CrystalInput | undefined {
    const { dice } = this;
    const polar = (id: string): boolean => {
      const { polarisation, alloy, insulator } = this.entry(id);
      return insulator === true || polarisation?.lattice !== undefined || (alloy !== undefined && [alloy.first, alloy.second].every(polar));
    };
    const templates = this.family.filter((id) => this.entry(id).polarisation?.lattice !== undefined);
    if (templates.length === 0 || !dice.chance(0.75)) return undefined;
    const face = dice.pick(['metal', 'N'] as const);
    // A layer without polarisation counts as unpolar; only strain asks for the whole set of constants.
    if (!layers.every((l) => polar(l.material)) || dice.chance(0.35)) return { face, strain: 'relaxed' };
    return { face, strain: 'pseudomorphic', template: templates.includes('GaN') && dice.chance(0.7) ? 'GaN' : dice.pick(templates) };
  }
}
