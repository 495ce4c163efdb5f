import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { catchFiles, designText, title, until, untilSolved } from './inside.ts';

/** What has the focus, through every shadow tree: a line of its role, its name and the element around it. */
const focused = (page: Page): Promise<string> =>
  page.evaluate(() => {
    let node = document.activeElement;
    while (node?.shadowRoot?.activeElement) node = node.shadowRoot.activeElement;
    if (node === null) return '';
    const host = (node.getRootNode() as ShadowRoot).host as (HTMLElement & { label?: string }) | undefined;
    const label = node.getAttribute('aria-label') ?? (node as HTMLInputElement).labels?.[0]?.textContent ?? host?.label ?? node.textContent ?? '';
    return `${host?.localName ?? 'page'} ${node.getAttribute('role') ?? node.localName}: ${label.trim().replace(/\s+/g, ' ')}`;
  });

/** Presses Tab, if need be, until the focus stands on something like this. */
async function tabTo(page: Page, wanted: RegExp, back = false): Promise<void> {
  const met: string[] = [await focused(page)];
  if (wanted.test(met[0])) return;
  if (back) await page.keyboard.down('Shift');
  try {
    for (let i = 0; i < 150; i++) {
      await page.keyboard.press('Tab');
      const there = await focused(page);
      if (wanted.test(there)) return;
      met.push(there);
    }
  } finally {
    if (back) await page.keyboard.up('Shift');
  }
  assert.fail(`the Tab key never came to ${wanted}; it met ${[...new Set(met)].join(' | ')}`);
}
async function type(page: Page, text: string): Promise<void> {
  await page.keyboard.down('Control');
  await page.keyboard.press('KeyA');
  await page.keyboard.up('Control');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
}
interface Stack {
  title: string;
  top: { kind: string };
  layers: { name: string; thickness: string; material: string; dopants?: { concentration: unknown }[] }[];
}
const stack = async (page: Page): Promise<Stack> => JSON.parse(await designText(page)) as Stack;

scenario('A whole job by the keyboard alone: a new project, three layers, a contact, a picture of it taken away', async ({ page, open }) => {
  await open();
  await untilSolved(page);

  await tabTo(page, /^hm-conditions button: Projects/);
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-projects button: New project/);
  await page.keyboard.press('Enter');
  await until('the new project', async () => (await title(page)) === 'untitled');
  await untilSolved(page);
  const before = (await stack(page)).layers.length;

  // Layers are put in below the chosen one.
  await tabTo(page, /^hm-strip option: /);
  for (let count = before + 1; count <= 3; count++) {
    await page.keyboard.press('Insert');
    await until(`${count} layers`, async () => (await stack(page)).layers.length === count);
    await until('the focus in the strip', async () => /^hm-strip option: /.test(await focused(page)));
  }
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-field input: thickness/i);
  await type(page, '150 nm');
  await until('the thickness', async () => (await stack(page)).layers.some((layer) => layer.thickness === '150 nm'));

  // To the contact at the surface.
  await page.keyboard.press('Escape');
  await until('the focus in the strip', async () => /^hm-strip option: /.test(await focused(page)));
  for (let i = 0; i < 5 && !/contact|surface|top/i.test(await focused(page)); i++) await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Enter');
  const first = (await stack(page)).top.kind;
  await tabTo(page, /^hm-contact-form /);
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await until('another contact', async () => (await stack(page)).top.kind !== first);
  await untilSolved(page);

  const files = await catchFiles(page);
  await tabTo(page, /^hm-conditions button: Take away/, true);
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-leave button: SVG/);
  await page.keyboard.press('Enter');
  await until('the file', async () => (await files()).length === 1);
  assert.match((await files())[0].name, /\.svg$/);
  assert.match((await files())[0].text, /^(<\?xml[^\n]*\n)?<svg /);
  assert.equal((await stack(page)).layers.length, 3);
});
