import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { toleranced } from '../tolerance/designs.ts';

const ROOT = join(import.meta.dirname, '../..');
const folder = mkdtempSync(join(tmpdir(), 'halfmark-array-'));
afterAll(() => rmSync(folder, { recursive: true }));
const halfmark = (...args: string[]): string => execFileSync(process.execPath, [join(ROOT, 'src/tools/halfmark.mjs'), ...args], { cwd: folder, encoding: 'utf8' });

describe('the array jobs of DEVELOPERS.md', { timeout: 120_000 }, () => {
  const [, section] = /## Array jobs\n([\s\S]*?)\n## /.exec(readFileSync(join(ROOT, 'DEVELOPERS.md'), 'utf8')) ?? [];
  const blocks = [...(section ?? '').matchAll(/```sh\n([\s\S]*?)```/g)].map((m) => m[1].replaceAll('npm run -s halfmark --', `"${process.execPath}" "${join(ROOT, 'src/tools/halfmark.mjs')}"`));
  writeFileSync(join(folder, 'design.json'), JSON.stringify(toleranced));

  it('give what one run gives, to the last byte', () => {
    expect(blocks).toHaveLength(2);
    for (const block of blocks) execFileSync('sh', ['-e', '-c', block], { cwd: folder });
    expect(readFileSync(join(folder, 'spread.json'), 'utf8')).toBe(halfmark('vary', 'design.json', '--count', '200', '--seed', '7', '--json'));
    expect(readFileSync(join(folder, 'sweep.csv'), 'utf8')).toBe(halfmark('sweep', 'design.json', '--variable', 'temperature', '--from', '200 K', '--to', '400 K', '--points', '41', '--csv', '--workers', '1'));
  });
});
