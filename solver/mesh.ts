/**
 * Meshes of a stack: nodes layer by layer, the node on an interface shared by its two layers.
 *
 * Node numbers: `first[l] + k` is node k of layer l among the stack's nodes (an interface counted once). Side numbers:
 * `first[l] + l + k` counts an interface twice, once for each side, as profiles do.
 */
export interface Mesh {
  /** node depths from the top of each layer, cm; [layers] of [nodes of the layer], from 0 to the thickness */
  local: Float64Array[];
  /** number of the first node of each layer [layers] */
  first: Int32Array;
  /** all nodes, interfaces once */
  nodes: number;
}

export function meshOf(local: Float64Array[]): Mesh {
  const first = new Int32Array(local.length);
  let node = 0;
  for (let l = 0; l < local.length; l++) {
    first[l] = node;
    node += local[l].length - 1;
  }
  return { local, first, nodes: node + 1 };
}

/** Growth of neighbouring cells of a first mesh. */
const GROWTH = 1.6;

/**
 * Cells that grow from both ends of a layer towards its middle.
 *
 * @param thickness  cm
 * @param finest     first cell at either end, cm
 * @param most       largest cell, cm
 */
export function gradedLayer(thickness: number, finest: number, most: number): Float64Array {
  const half: number[] = [0];
  let z = 0;
  let h = Math.min(finest, thickness / 4);
  while (z < thickness / 2) {
    z += h;
    half.push(z);
    h = Math.min(h * GROWTH, most);
  }
  // Shrunk a little so that the middle is met exactly.
  const scale = thickness / 2 / z;
  const left = half.slice(0, -1).map((v) => v * scale);
  return Float64Array.from([...left, thickness / 2, ...left.map((v) => thickness - v).reverse()]);
}

/** The same mesh with every cell cut in two. Even nodes are the old ones. */
export function halved(mesh: Mesh): Mesh {
  return meshOf(
    mesh.local.map((z) => {
      const out = new Float64Array(2 * z.length - 1);
      for (let k = 0; k < z.length; k++) {
        out[2 * k] = z[k];
        if (k > 0) out[2 * k - 1] = 0.5 * (z[k - 1] + z[k]);
      }
      return out;
    }),
  );
}

/**
 * Cuts cells into equal pieces.
 *
 * @param pieces  [layers] of [cells of the layer], whole numbers of at least 1
 */
export function divided(mesh: Mesh, pieces: Int32Array[]): Mesh {
  return meshOf(
    mesh.local.map((z, l) => {
      const out: number[] = [z[0]];
      for (let c = 0; c + 1 < z.length; c++) {
        const n = pieces[l][c];
        for (let j = 1; j < n; j++) out.push(z[c] + ((z[c + 1] - z[c]) * j) / n);
        out.push(z[c + 1]);
      }
      return Float64Array.from(out);
    }),
  );
}

/** Carries node values from one mesh to another of the same stack, straight between nodes, by relative depth within each layer. */
export function interpolated(from: Mesh, values: Float64Array, to: Mesh): Float64Array {
  const out = new Float64Array(to.nodes);
  for (let l = 0; l < to.local.length; l++) {
    const a = from.local[l];
    const b = to.local[l];
    const scale = a[a.length - 1] / b[b.length - 1];
    let c = 0;
    for (let k = 0; k < b.length; k++) {
      const z = b[k] * scale;
      while (c + 2 < a.length && a[c + 1] < z) c++;
      const u = Math.min(1, Math.max(0, (z - a[c]) / (a[c + 1] - a[c])));
      const i = from.first[l] + c;
      out[to.first[l] + k] = values[i] + u * (values[i + 1] - values[i]);
    }
  }
  return out;
}
