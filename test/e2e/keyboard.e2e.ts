import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, catchFiles, designText, title, until, untilSolved } from './inside.ts';

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
  top: { kind: string; metal?: string };
  layers: { name: string; thickness: string; material: string; dopants?: { concentration: unknown }[] }[];
  variables?: { name: string; value: string }[];
  requirements?: { quantity: string; of: string; max?: string }[];
}
const stack = async (page: Page): Promise<Stack> => JSON.parse(await designText(page)) as Stack;

/** A menu under the focus is stepped through until it shows words like these. */
async function choose(page: Page, wanted: RegExp): Promise<void> {
  const shown = (): Promise<string> =>
    page.evaluate(() => {
      let node = document.activeElement;
      while (node?.shadowRoot?.activeElement) node = node.shadowRoot.activeElement;
      return node instanceof HTMLSelectElement ? (node.selectedOptions[0]?.textContent ?? '').trim() : '';
    });
  const met: string[] = [await shown()];
  for (const key of ['ArrowDown', 'ArrowUp'] as const) {
    for (let i = 0; i < 40 && !wanted.test(met.at(-1)!); i++) {
      await page.keyboard.press(key);
      met.push(await shown());
      if (met.at(-1) === met.at(-2)) break;
    }
  }
  assert.match(met.at(-1)!, wanted, `the menu has ${[...new Set(met)].join(' | ')}`);
  await page.keyboard.press('Enter');
}
/** From wherever the focus is to a tab of the desk, which opens. */
async function openTab(page: Page, wanted: RegExp): Promise<void> {
  await tabTo(page, /^hm-desk tab: /);
  for (let i = 0; i < 12 && !wanted.test(await focused(page)); i++) await page.keyboard.press('ArrowRight');
  assert.match(await focused(page), wanted);
}
const verdict = async (page: Page): Promise<string> => (await at(page, ['hm-app', 'hm-desk', 'hm-requirements', '.verdict'], (element) => element.textContent!.replace(/\s+/g, ' ').trim())) ?? '';

scenario('A whole job by the keyboard alone: a new project, three layers, a contact, a requirement, a size that meets it, and files of it taken away', async ({ page, open }) => {
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
  await page.keyboard.press('Home');
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-field input: thickness/i);
  await type(page, '150 nm');
  await until('the thickness', async () => (await stack(page)).layers[0].thickness === '150 nm');
  await tabTo(page, /^hm-field input: concentration/i);
  await type(page, '3e17');
  await until('the doping', async () => /^3e17/.test(String((await stack(page)).layers[0].dopants?.[0].concentration)));

  // To the contact at the surface.
  await page.keyboard.press('Escape');
  await until('the focus in the strip', async () => /^hm-strip option: /.test(await focused(page)));
  await page.keyboard.press('Home');
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-contact-form select: kind/);
  await choose(page, /metal or barrier/);
  await until('the metal contact', async () => (await stack(page)).top.kind === 'barrier');
  await untilSolved(page);

  // What it has to meet.
  await openTab(page, /Requirements/);
  await tabTo(page, /^hm-requirements select: Quantity/);
  await choose(page, /contact resistivity/);
  await tabTo(page, /^hm-field input: At most/);
  await type(page, '1e-5 ohm cm^2');
  await tabTo(page, /^hm-requirements button: Add/);
  await page.keyboard.press('Enter');
  await until('the requirement', async () => (await stack(page)).requirements?.[0]?.max === '1e-5 ohm cm^2');
  await until('its verdict', async () => /^not met/.test(await verdict(page)));

  // The size that meets it, of the doping under the contact, over a range wide enough.
  await tabTo(page, /^hm-requirements button: Size a variable/);
  await page.keyboard.press('Enter');
  await until('the tab of the sizing', async () => /^hm-desk tab: Sizing/.test(await focused(page)));
  await tabTo(page, /^hm-sizing select: Size/);
  await choose(page, /concentration|doping/i);
  await tabTo(page, /^hm-field input: from/);
  await type(page, '1e18 cm^-3');
  await tabTo(page, /^hm-field input: to/);
  await type(page, '3e20 cm^-3');
  await tabTo(page, /^hm-sizing button: (Make it a variable|Find)/);
  await page.keyboard.press('Enter');
  await until('the values', async () => /^Everything is met with /.test((await at(page, ['hm-app', 'hm-desk', 'hm-sizing', '.outcome'], (element) => element.textContent!.trim())) ?? ''));
  const [{ name }] = (await stack(page)).variables!;
  await tabTo(page, new RegExp(`^hm-sizing button: ${name} = `));
  await page.keyboard.press('Enter');
  await until('the size in the design', async () => !/^3e17/.test((await stack(page)).variables![0].value));
  await untilSolved(page);
  await tabTo(page, /^hm-desk tab: /, true);
  for (let i = 0; i < 12 && !/Requirements/.test(await focused(page)); i++) await page.keyboard.press('ArrowLeft');
  await until('a better verdict', async () => /^met/.test(await verdict(page)));

  const files = await catchFiles(page);
  await tabTo(page, /^hm-conditions button: Take away/, true);
  await page.keyboard.press('Enter');
  await tabTo(page, /^hm-leave button: SVG/);
  await page.keyboard.press('Enter');
  await until('the picture', async () => (await files()).length === 1);
  await tabTo(page, /^hm-leave button: Design file/);
  await page.keyboard.press('Enter');
  await until('the design file', async () => (await files()).length === 2);
  const [picture, design] = await files();
  assert.match(picture.name, /\.svg$/);
  assert.match(picture.text, /^(<\?xml[^\n]*\n)?<svg /);
  const taken = JSON.parse(design.text) as Stack;
  assert.equal(taken.layers.length, 3);
  assert.equal(taken.top.kind, 'barrier');
  assert.equal(taken.requirements?.length, 1);
  assert.equal(taken.layers[0].dopants?.[0].concentration, name);
});
