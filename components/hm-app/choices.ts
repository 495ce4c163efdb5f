import { modelsKnown } from '../../src/design/ionisation-models.ts';
import type { Custom } from '../../src/design/types.ts';
import type { StarterCard } from '../hm-starters/hm-starters.ts';
import type { DopantChoice, MaterialChoice, MetalChoice } from '../shared/menus.ts';

export interface Choices {
  materials: MaterialChoice[];
  dopants: DopantChoice[];
  metals: MetalChoice[];
}

/** What the menus offer: the presets with the design's own entries over them. The presets are fetched when first asked for. */
export async function choicesFor(custom: Custom | undefined): Promise<Choices> {
  const { catalogueOf } = await import('../../src/design/catalogue.ts');
  const { materials, dopants, metals } = catalogueOf(custom);
  return {
    materials: [...materials.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id, alloy: entry.alloy !== undefined })),
    dopants: [...dopants.values()].flatMap((rows) => [...rows.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id, host: entry.host, kind: entry.kind, models: modelsKnown(entry) }))),
    metals: [...metals.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id })),
  };
}

/** The worked designs, fetched when first asked for. */
export async function fetchStarters() {
  const { starters } = await import('../../src/design/starters/index.ts');
  return starters;
}

export function starterCards(starters: Awaited<ReturnType<typeof fetchStarters>>): StarterCard[] {
  return starters.map(({ id, title, summary, design }) => ({ id, title, summary, layers: design.layers.map((layer) => layer.material) }));
}
