import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readMarkdown } from '../src/help/markdown.ts';
import { HELP_PAGES, HELP_PICTURES } from '../src/help/pages.ts';

const ROOT = join(import.meta.dirname, '..');
const text = (name: string): string => readFileSync(join(ROOT, name), 'utf8');
describe('every page of the docs', () => {
  for (const page of ['README.md', 'DEVELOPERS.md']) {
    it(`${page} points at files that are there`, () => {
      const links = [...text(page).matchAll(/\]\(([^)#:]+)\)/g)].map((m) => join(dirname(page), m[1]));
      const named = [...text(page).matchAll(/`((?:src|solver|components|presets|test)\/[\w./-]+\.\w+)`/g)].map((m) => m[1]);
      for (const file of [...links, ...named]) expect(existsSync(join(ROOT, file)), file).toBe(true);
      expect(links.length + named.length).toBeGreaterThan(2);
    });

    it(`${page} names commands that package.json has`, () => {
      const scripts = Object.keys((JSON.parse(text('package.json')) as { scripts: Record<string, string> }).scripts);
      for (const [, name] of text(page).matchAll(/npm run (?:-s )?([a-z0-9-]+)/g)) expect(scripts, name).toContain(name);
    });
  }
});

describe('the help', () => {
  const FOLDER = 'src/help';
  const pages = readdirSync(join(ROOT, FOLDER)).filter((name) => name.endsWith('.md'));

  it('lists every page that is there, in pages.ts, under its own address', () => {
    expect(HELP_PAGES.map(({ file }) => file).sort()).toEqual([...pages].sort());
    for (const { file, address } of HELP_PAGES) expect(address.endsWith(`/${FOLDER}/${file}`)).toBe(true);
  });

  it('names the change log and its revisions by the words that the page has for them', () => {
    const log = text('components/hm-variants/hm-change-log.ts');
    const copy = text('components/hm-variants/hm-variants.ts');
    const help = text(join(FOLDER, 'first-five-minutes.md'));
    for (const [words, page] of [['What was changed', log], ['revision', log], ['Copy what is on the page as a variant', copy]]) {
      expect(page).toContain(words);
      expect(help).toContain(words);
    }
  });

  for (const page of pages) {
    it(`${page} has one heading of its own, links that lead to pages, and pictures that are there`, () => {
      const blocks = readMarkdown(text(join(FOLDER, page)));
      expect(blocks.filter((block) => block.kind === 'heading' && block.level === 1)).toHaveLength(1);
      const parts = blocks.flatMap((block) => (block.kind === 'paragraph' || block.kind === 'heading' ? block.text : block.kind === 'list' ? block.items.flat() : block.kind === 'table' ? [...block.head, ...block.rows.flat()].flat() : []));
      for (const part of parts) if (part.kind === 'link') expect(pages, part.to).toContain(part.to);
      for (const block of blocks) {
        if (block.kind !== 'picture') continue;
        expect(existsSync(join(ROOT, FOLDER, block.file)), block.file).toBe(true);
        expect(Object.keys(HELP_PICTURES)).toContain(block.file);
        expect(block.words.length).toBeGreaterThan(20);
      }
      // What the reader of these pages does not know would show as signs.
      for (const part of parts) if (part.kind === 'text') expect(part.text).not.toMatch(/`|\]\(|\*\*/);
      for (const block of blocks) if (block.kind === 'table') for (const row of block.rows) expect(row).toHaveLength(block.head.length);
    });
  }

  it('gives each hard method its equations, what was refused, its measured error and its references', () => {
    for (const page of ['mesh.md', 'contact-integral.md', 'sizing.md', 'tolerance.md']) {
      const blocks = readMarkdown(text(join(FOLDER, page)));
      const headings = blocks.flatMap((block) => (block.kind === 'heading' ? block.text.map(({ text: words }) => words) : []));
      for (const wanted of ['What was refused, and why', 'Measured error', 'References']) expect(headings, page).toContain(wanted);
      expect(blocks.some((block) => block.kind === 'code' && block.text.includes('=')), page).toBe(true);
    }
  });

  it('gives each hard method a picture, and takes every picture by the script', () => {
    for (const page of ['first-five-minutes.md', 'mesh.md', 'contact-integral.md', 'sizing.md', 'tolerance.md']) {
      expect(readMarkdown(text(join(FOLDER, page))).some((block) => block.kind === 'picture'), page).toBe(true);
    }
    const taken = [...text('src/tools/pictures.mjs').matchAll(/\{ name: '([\w-]+)', width/g)].map((m) => `pictures/${m[1]}.png`);
    expect(Object.keys(HELP_PICTURES).sort()).toEqual(taken.sort());
    expect(readdirSync(join(ROOT, FOLDER, 'pictures')).map((name) => `pictures/${name}`).sort()).toEqual(taken.sort());
  });

  it('names every key that the code listens to, in the table of its place', () => {
    const tables: Record<string, string> = {};
    let place = '';
    for (const block of readMarkdown(text(join(FOLDER, 'keys.md')))) {
      if (block.kind === 'heading') place = block.text[0].text;
      if (block.kind === 'table') tables[place] = block.rows.map(([keys]) => keys.map((part) => part.text).join('')).join(' | ');
    }
    const signs: Record<string, string> = { ArrowLeft: '←', ArrowRight: '→', ArrowUp: '↑', ArrowDown: '↓', ' ': 'Space' };
    const listens: [place: string, file: string, pattern: RegExp, least: number][] = [
      ['The strip', 'components/hm-strip/strip-keys.ts', /case '([^']+)':/g, 11],
      ['The diagram', 'components/hm-plate/hm-plate.ts', /^ {6}'?(\w+|[+=-])'?: \(\) => (?:\(event|this\.(?:read|zoom|whole))/gm, 11],
      ['The panels under the plate', 'components/hm-ledger/hm-ledger.ts', /event\.key === '([^']+)'|(?<=[{,] )(\w+)(?=: \[[rc0])/g, 8],
      ['The panels under the plate', 'components/hm-desk/hm-desk.ts', /(?<=[{,] )(ArrowRight|ArrowLeft|Home|End)(?=: )/g, 4],
      ['Fields', 'components/hm-field/hm-field.ts', /event\.key === '([^']+)'/g, 2],
      ['The whole page', 'components/hm-help/help-door.ts', /event\.key !== '([^']+)'/g, 1],
      ['The whole page', 'components/hm-app/keys.ts', /key === '([a-z])'/g, 4],
      ['The panels under the plate', 'components/shared/how.ts', /(?<=[{,] )(Arrow\w+|Home|End)(?=: )/g, 6],
      ['Fields', 'components/shared/settled-choice.ts', /key [!=]== '(Enter|Escape)'/g, 2],
      ['The panels under the plate', 'components/hm-workings/hm-workings.ts', /event\.key !== '([^']+)'/g, 1],
      ['Sweeps', 'components/hm-sweeps/sweep-cursor.ts', /(?<=[{,] )(Arrow\w+|Home|End)(?=: \[|: rows)/g, 6],
      ['Sweeps', 'components/hm-sweeps/hm-sweeps.ts', /event\.key === '([^']+)'/g, 2],
      ['The temperature film', 'components/hm-sweeps/hm-film.ts', /(?:(?<=[ ,{]) ?(Arrow\w+|Page\w+|Home|End|Escape)|'( )'): \(\) =>/g, 10],
      ['The regime map', 'components/hm-map/hm-map.ts', /(?:event\.key === '([^']+)'|(?<=[{,] )(Arrow\w+|Page\w+|Home|End)(?=: \[))/g, 9],
    ];
    // Whoever listens to a key stands in the list above, or hands it on to one that does.
    const handsOn = ['components/hm-strip/hm-strip.ts'];
    const listeners = readdirSync(join(ROOT, 'components'), { recursive: true, encoding: 'utf8' }).map((name) => join('components', name)).filter((name) => name.endsWith('.ts') && /event\.key\b|\bkey [!=]== '|\be\.key\b|case 'Arrow/.test(text(name)));
    const known = [...listens.map(([, file]) => file), ...handsOn, 'components/hm-sheet/hm-sheet.ts', 'components/hm-profile-form/hm-profile-form.ts'];
    expect(listeners.filter((file) => !known.includes(file))).toEqual([]);
    for (const [where, file, pattern, least] of listens) {
      const keys = [...text(file).matchAll(pattern)].map((m) => m[1] ?? m[2]);
      expect(keys.length, file).toBeGreaterThanOrEqual(least);
      for (const key of keys) expect(` ${tables[where]} `, `${key} of ${file}`).toMatch(new RegExp(`[ ,]${(signs[key] ?? (/^[a-z]$/.test(key) ? key.toUpperCase() : key)).replace(/[[\]+]/g, '\\$&')}[ ,]`));
    }
  });
});
