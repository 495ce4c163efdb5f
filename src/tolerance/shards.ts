import type { Complaint } from '../design/complaint.ts';
import { canonical, provenanceOf } from '../result/provenance.ts';
import type { VariationPlan } from './plan.ts';
import { chunkOf, variationJob, type VariationRows } from './variations.ts';

/**
 * A part of a tolerance run as lines of JSON: one that says of which run it is, then one a chunk. The parts of all shards, laid end to end in any order, are read back by
 * readShards.
 */
export function writeShard(plan: VariationPlan, chunks: ReadonlyMap<number, VariationRows>): string {
  const lines = [{ format: 'halfmark-variation-shard/1', run: runName(plan) }, ...[...chunks].sort(([a], [b]) => a - b).map(([chunk, rows]) => ({ chunk, ...rows }))];
  return lines.map((line) => `${JSON.stringify(line)}\n`).join('');
}

/** What decides every number of a run. */
function runName(plan: VariationPlan): string {
  const { model, presets, design, program } = provenanceOf(plan.design, plan.set);
  const { count, seed, distribution, tolerances = 'all', inputs = {} } = plan.request;
  return canonical({ program, model, presets, design, count, seed, distribution, tolerances, inputs, figures: plan.columns.map((c) => (c.kind === 'figure' ? c.figure.path : c.words)) });
}

/**
 * Chunks out of the lines of some shards.
 *
 * @returns a complaint where a line is none of this run, or where a part is missing
 */
export function readShards(plan: VariationPlan, text: string): { ok: true; chunks: Map<number, VariationRows> } | { ok: false; complaint: Complaint } {
  const job = variationJob(plan);
  const chunks = new Map<number, VariationRows>();
  const wrong = (line: number, message: string): { ok: false; complaint: Complaint } => ({ ok: false, complaint: { path: `line ${line + 1}`, message } });
  const lines = text.split('\n');
  for (const [i, line] of lines.entries()) {
    if (line.trim() === '') continue;
    let row: unknown;
    try {
      row = JSON.parse(line);
    } catch {
      return wrong(i, 'is no line of JSON; the part may have been cut off: run that shard again');
    }
    if (isHead(row)) {
      if (row.run !== runName(plan)) return wrong(i, 'begins a part of another run; design, count, seed, figures and version must be those of this one');
    } else if (isRows(row, plan, job.chunks)) {
      const { chunk, values, met, gaps } = row;
      chunks.set(chunk, { values, met, gaps });
    } else return wrong(i, 'is no part of a tolerance run; give it the output of "vary --shard"');
  }
  const missing = job.chunks - chunks.size;
  if (missing > 0) return { ok: false, complaint: { path: '', message: `${missing} of ${job.chunks} pieces of the run are missing; add the output of every shard` } };
  return { ok: true, chunks };
}

function isHead(row: unknown): row is { run: string } {
  return row !== null && typeof row === 'object' && (row as { format?: unknown }).format === 'halfmark-variation-shard/1';
}

/** Every number is checked: these files come from elsewhere. */
function isRows(row: unknown, plan: VariationPlan, chunks: number): row is VariationRows & { chunk: number } {
  if (row === null || typeof row !== 'object') return false;
  const { chunk, values, met, gaps } = row as Record<string, unknown>;
  if (!Number.isInteger(chunk) || (chunk as number) < 0 || (chunk as number) >= chunks) return false;
  const { count } = chunkOf(plan, chunk as number);
  const requirements = plan.columns.filter((c) => c.kind === 'requirement').length;
  return (
    Array.isArray(values) && values.length === count * plan.columns.length && values.every((v) => v === null || (typeof v === 'number' && Number.isFinite(v))) &&
    Array.isArray(met) && met.length === count * requirements && met.every((m) => m === 1 || m === 0 || m === -1) &&
    Array.isArray(gaps) && gaps.length <= count && gaps.every((g: unknown) => g !== null && typeof g === 'object' && Number.isInteger((g as { index?: unknown }).index) && typeof (g as { reason?: unknown }).reason === 'string')
  );
}

