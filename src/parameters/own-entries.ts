import { isPair } from '../design/offset.ts';
import type { ContactInput, Custom, Design, LayerInput } from '../design/types.ts';

/** Which entries behind a layer are the design's own, in place of the published ones or beside them. */
export interface OwnOfLayer {
  material: boolean;
  /** in the order of the layer's dopants */ dopants: boolean[];
}

export function ownOfLayer(custom: Custom | undefined, { material, dopants = [] }: Pick<LayerInput, 'material' | 'dopants'>): OwnOfLayer {
  return {
    material: custom?.materials?.some(({ id }) => id === material) === true,
    dopants: dopants.map(({ dopant }) => custom?.dopants?.some(({ id, host }) => id === dopant && host === material) === true),
  };
}

export function ownOfContact(custom: Custom | undefined, contact: ContactInput): boolean {
  return contact.kind === 'barrier' && contact.barrier === undefined && custom?.metals?.some(({ id }) => id === contact.metal) === true;
}

/** Words of what is the design's own behind a row of the ledger, by the row's name. */
export type OwnRows = Readonly<Record<'layers' | 'junctions' | 'contacts', ReadonlyMap<string, string>>>;

/** What stands behind a row of the ledger that is the design's own, by the name of the row; "Si, P in Si". Rows without any are left out. */
export function ownRows(design: Design): OwnRows {
  const { custom, layers } = design;
  const rows = { layers: new Map<string, string>(), junctions: new Map<string, string>(), contacts: new Map<string, string>() };
  if (custom === undefined) return rows;
  for (const layer of layers) {
    const own = ownOfLayer(custom, layer);
    const words = [...(own.material ? [layer.material] : []), ...(layer.dopants ?? []).flatMap(({ dopant }, r) => (own.dopants[r] ? [`${dopant} in ${layer.material}`] : []))];
    if (words.length > 0) rows.layers.set(layer.name, words.join(', '));
  }
  layers.slice(1).forEach((below, i) => {
    const above = layers[i];
    if (custom.offsets?.some((row) => isPair(row, above.material, below.material))) rows.junctions.set(`${above.name} / ${below.name}`, `offset of ${above.material} and ${below.material}`);
  });
  for (const side of ['top', 'bottom'] as const) {
    const contact = design[side];
    if (ownOfContact(custom, contact) && contact.kind === 'barrier') rows.contacts.set(side, contact.metal!);
  }
  return rows;
}
