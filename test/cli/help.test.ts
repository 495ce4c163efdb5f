import { mkdtempSync, readFileSync, readdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { COMMANDS, run } from '../../src/cli/run.ts';
import { toleranced } from '../tolerance/designs.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-help-'));
afterAll(() => rmSync(folder, { recursive: true }));
const fixture = join(folder, 'design.json');
writeFileSync(fixture, JSON.stringify(toleranced));

async function call(...args: string[]): Promise<{ code: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => '' });
  return { code, out, error };
}
const optionsIn = (text: string): string[] => [...new Set(text.match(/(?<![\w-])--?[a-z][a-z-]*2?(?![\w-])/g) ?? [])].sort();

describe('help of the command line', () => {
  for (const [name, command] of Object.entries(COMMANDS)) {
    it(`explains every option of ${name}, and none that it has not`, async () => {
      const { code, out, error } = await call(name, '--help');
      expect([code, error]).toEqual([0, '']);
      expect((await call('help', name)).out).toBe(out);
      expect((await call(name, fixture, '--nonsense', '-h')).out).toBe(out);
      const explained = optionsIn(command.options.map(([option]) => option).join('\n'));
      const used = optionsIn(command.usage);
      expect(explained.filter((option) => option !== '--output')).toEqual(used);
      for (const [, words] of command.options) expect(words.length).toBeGreaterThan(8);
      for (const part of [command.usage, 'Exit codes: 0 done', '130 stopped', '--help', '--output OUT']) expect(out).toContain(part);
    });

    it(`${name} names the nearest option to one that it does not know`, async () => {
      const [known] = optionsIn(command.usage).filter((option) => option.startsWith('--') && option.length >= 5);
      const { code, out, error } = await call(name, fixture, `${known}x`, 'y');
      expect([code, out]).toEqual([2, '']);
      expect(error).toContain(`there is no option '${known}x'; did you mean ${known}?`);
    });
  }

  it('lists all commands, and says where there is more', async () => {
    const { code, out } = await call('help');
    expect(code).toBe(0);
    for (const { usage } of Object.values(COMMANDS)) expect(out).toContain(usage);
    expect(out).toContain('halfmark COMMAND --help');
    expect((await call()).code).toBe(2);
    expect((await call('help', 'swep')).error).toMatch(/no command 'swep'; did you mean sweep\?/);
  });
});

describe('-o', () => {
  it('writes what would be printed, whole, and leaves nothing beside it', async () => {
    const printed = (await call('check', fixture)).out;
    const into = join(folder, 'verdicts.txt');
    const link = join(folder, 'link.txt');
    writeFileSync(into, 'old');
    symlinkSync(into, link);
    const { out, code } = await call('check', fixture, '-o', link);
    expect([out, code]).toEqual(['', 1]);
    expect(readFileSync(into, 'utf8')).toBe(printed);
    expect((await call('check', fixture, '--output=-')).out).toBe(printed);
    expect(readdirSync(folder).filter((name) => name.includes('.part'))).toEqual([]);
  });

  it('leaves what was there where the command fails, and says what stands in the way', async () => {
    const into = join(folder, 'kept.json');
    writeFileSync(into, 'old');
    expect((await call('compute', fixture, '--set', 'nope=1', '-o', into)).code).toBe(2);
    expect(readFileSync(into, 'utf8')).toBe('old');
    expect((await call('compute', fixture, '-o', join(folder, 'no', 'such.json'))).error).toMatch(/cannot be written \(its folder is not there\)/);
    expect((await call('compute', fixture, '-o', folder)).error).toMatch(/it is a folder/);
    expect((await call('compute', fixture, '-o')).error).toMatch(/-o takes the name of a file/);
    expect((await call('draw', fixture, '-o', join(folder, 'no', 'such.svg'))).error).toMatch(/its folder is not there/);
  });
});
