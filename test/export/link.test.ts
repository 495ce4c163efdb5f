import { describe, expect, it } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import { starters } from '../../src/design/starters/index.ts';
import { carriesDesign, linkTo, textOfLink } from '../../src/export/link.ts';

const PAGE = 'http://localhost:4173/?a=1#old';

describe('a link that carries a design', () => {
  it('gives every starter back as it was', async () => {
    for (const { design } of starters) {
      const link = await linkTo(design, PAGE);
      expect(link).toMatch(/^http:\/\/localhost:4173\/\?a=1#design=[A-Za-z0-9_-]+$/);
      expect(carriesDesign(link)).toBe(true);
      expect(readDesign(await textOfLink(link))).toEqual({ ok: true, design });
      // Mail and chat cut longer ones.
      expect(link.length).toBeLessThan(2000);
    }
  });

  it('keeps letters of every script', async () => {
    const design = { ...starters[0].design, title: 'µ-Schicht Ψ 層 "<&' };
    expect(JSON.parse(await textOfLink(await linkTo(design, PAGE)))).toMatchObject({ title: design.title });
  });

  it('is refused in words when it was cut short or altered', async () => {
    const link = await linkTo(starters[0].design, PAGE);
    await expect(textOfLink(link.slice(0, -40))).rejects.toThrow('cut short or altered');
    await expect(textOfLink(`${PAGE}#design=%%%`)).rejects.toThrow('cut short or altered');
    await expect(textOfLink(`${PAGE}#design=AAAA`)).rejects.toThrow('cut short or altered');
  });

  it('is not unpacked when it would fill the memory', async () => {
    const huge = { ...starters[0].design, notes: ' '.repeat(20e6) };
    const link = await linkTo(huge, PAGE);
    expect(link.length).toBeLessThan(60_000);
    await expect(textOfLink(link)).rejects.toThrow('more than any design has');
  });
});
