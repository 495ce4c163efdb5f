import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import * as presets from '../../presets/index.ts';
import { PROGRAM_VERSION } from '../version.ts';
import type { Design } from '../design/types.ts';
import type { Provenance } from './types.ts';

/** The model of which the figures are; it moves when a law or a reading changes a figure. */
export const MODEL = 'reference-1';

let presetsHash: string | null = null;

/**
 * What the figures were made of: the program, the model, the presets and the design as solved, so that a sheet can be compared with another.
 * Hashes are SHA-256 over JSON with sorted keys.
 */
export function provenanceOf(design: Design, set: Readonly<Record<string, string>>): Provenance {
  presetsHash ??= hash({ materials: presets.materials, dopants: presets.dopants, metals: presets.metals, offsets: presets.offsets });
  return { program: PROGRAM_VERSION, model: MODEL, presets: presetsHash, design: hash({ design, set }) };
}

function hash(value: unknown): string {
  return `sha256:${bytesToHex(sha256(utf8ToBytes(canonical(value))))}`;
}

/** JSON with keys in order, so that the order in which a document was written does not count. */
export function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, v: unknown) => (v !== null && typeof v === 'object' && !Array.isArray(v) ? Object.fromEntries(Object.entries(v).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))) : v)) ?? 'null';
}
