import assert from 'node:assert/strict';
import axe from 'axe-core';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, press, until, untilSolved } from './inside.ts';

interface Appearance {
  width: number;
  height: number;
  /** device pixels a CSS pixel: at 200 % zoom a window of 1280 px is 640 wide */ zoom?: number;
  media?: { name: string; value: string }[];
}
const APPEARANCES: [name: string, appearance: Appearance][] = [
  ['in light colours', { width: 1280, height: 800, media: [{ name: 'prefers-color-scheme', value: 'light' }] }],
  ['in dark colours', { width: 1280, height: 800, media: [{ name: 'prefers-color-scheme', value: 'dark' }] }],
  ['in forced colours', { width: 1280, height: 800, media: [{ name: 'forced-colors', value: 'active' }] }],
  ['360 px wide', { width: 360, height: 740 }],
  ['at 200 % zoom', { width: 640, height: 400, zoom: 2 }],
];

async function show(page: Page, { width, height, zoom = 1, media = [] }: Appearance): Promise<void> {
  await page.setViewport({ width, height, deviceScaleFactor: zoom });
  const session = await page.createCDPSession();
  await session.send('Emulation.setEmulatedMedia', { features: [...media, { name: 'prefers-reduced-motion', value: 'reduce' }] });
}

/** What the scenarios put into the page beside axe. */
interface Tools {
  axe: { run(context: unknown, options: object): Promise<{ violations: { id: string; nodes: { target: unknown; failureSummary?: string }[] }[] }> };
  everyone: { all(selector: string): HTMLElement[]; named(element: Element): string };
}

async function bring(page: Page): Promise<void> {
  await page.evaluate(axe.source);
  await page.evaluate(() => {
    /** Through every shadow tree. */
    const all = (selector: string, root: Document | ShadowRoot = document): HTMLElement[] =>
      [...root.querySelectorAll<HTMLElement>('*')].flatMap((element) => [...(element.matches(selector) ? [element] : []), ...(element.shadowRoot ? all(selector, element.shadowRoot) : [])]);
    const named = (element: Element): string => `${(element.getRootNode() as ShadowRoot).host?.localName ?? 'page'} ${element.localName}.${element.getAttribute('class') ?? ''} "${(element.getAttribute('aria-label') ?? element.textContent ?? '').trim().replace(/\s+/g, ' ').slice(0, 40)}"`;
    (window as unknown as { everyone: object }).everyone = { all: (selector: string) => all(selector), named };
  });
}

/** Everything that axe finds by WCAG 2.2 A and AA on the page as it stands; inside the open dialog, where there is one. */
function breaches(page: Page, where: string): Promise<string[]> {
  return page.evaluate(async (place) => {
    const { axe: checker, everyone } = window as unknown as Tools;
    const dialog = everyone.all('dialog').find((element) => (element as HTMLDialogElement).open && element.getBoundingClientRect().width > 0);
    const host = dialog === undefined ? null : ((dialog.getRootNode() as ShadowRoot).host ?? dialog);
    const { violations } = await checker.run(host ?? document, { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'], resultTypes: ['violations'] });
    return violations.map(({ id, nodes }) => `${place}: ${id}: ${nodes.slice(0, 4).map(({ target, failureSummary }) => `${JSON.stringify(target)} ${failureSummary?.replace(/\s+/g, ' ')}`).join('; ')}${nodes.length > 4 ? ` and ${nodes.length - 4} more` : ''}`);
  }, where);
}

/** Things to press that are smaller than 24 px in either direction (WCAG 2.2, 2.5.8), but for words of a link inside a sentence and what stands alone within 24 px. */
function smallTargets(page: Page, where: string): Promise<string[]> {
  return page.evaluate((place) => {
    const { everyone } = window as unknown as Tools;
    const dialog = everyone.all('dialog').find((element) => (element as HTMLDialogElement).open);
    const owner = dialog === undefined ? null : (dialog.getRootNode() as ShadowRoot).host;
    const inside = (element: Element): boolean => {
      for (let node: Node | null = element; node !== null; node = node.parentNode ?? (node as ShadowRoot).host ?? null) if (node === owner || node === dialog) return true;
      return false;
    };
    const targets = everyone
      .all('button, select, input:not([type=hidden]), textarea, summary, [role=tab], [role=option], [role=slider], [role=separator][tabindex], [role=button], [role=menuitem]')
      .filter((element) => (owner === null || inside(element)) && !(element as HTMLButtonElement).disabled && element.getAttribute('aria-hidden') !== 'true')
      .map((element) => {
        const label = element.matches('input[type=checkbox], input[type=radio], input[type=file]') ? (element.closest('label') ?? (element as HTMLInputElement).labels?.[0] ?? null) : null;
        const own = element.getBoundingClientRect();
        const outer = label?.getBoundingClientRect();
        return { element, box: outer !== undefined && outer.height * outer.width > own.height * own.width ? outer : own };
      })
      .filter(({ element, box }) => box.width > 1 && box.height > 1 && element.checkVisibility({ visibilityProperty: true, opacityProperty: true }));
    return targets
      .filter(({ box }) => box.width < 23.5 || box.height < 23.5)
      .filter(({ element, box }) => {
        // It may be smaller where a circle of 24 px around its middle touches no other.
        const [x, y] = [box.left + box.width / 2, box.top + box.height / 2];
        return targets.some((other) => other.element !== element && !element.contains(other.element) && !other.element.contains(element) && Math.hypot(Math.max(other.box.left - x, 0, x - other.box.right), Math.max(other.box.top - y, 0, y - other.box.bottom)) < 12);
      })
      .map(({ element, box }) => `${place}: ${everyone.named(element)} is ${box.width.toFixed(0)} x ${box.height.toFixed(0)} px`);
  }, where);
}

/** How far the page is wider than its window, px: a person should not have to scroll to both sides (1.4.10). */
const overflow = (page: Page): Promise<number> => page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** The tabs of the desk under the plate. */
const tabCount = async (page: Page): Promise<number> => (await at(page, ['hm-app', 'hm-desk'], (desk) => desk.shadowRoot!.querySelectorAll('[role=tab]').length)) ?? 0;

for (const [name, appearance] of APPEARANCES) {
  scenario(`The page, every panel of the desk and every dialog are accessible ${name}, with targets of 24 px`, async ({ page, open }) => {
    await show(page, appearance);
    await open();
    await untilSolved(page);
    await bring(page);
    const found: string[] = [];
    const look = async (where: string): Promise<void> => {
      found.push(...(await breaches(page, where)), ...(await smallTargets(page, where)));
      const wide = await overflow(page);
      if (wide > 0) found.push(`${where}: the page is ${wide} px wider than its window`);
    };
    await look('page');
    for (let i = 0; i < (await tabCount(page)); i++) {
      const words = await at(page, ['hm-app', 'hm-desk'], (desk, index) => {
        const tab = desk.shadowRoot!.querySelectorAll<HTMLElement>('[role=tab]')[index];
        tab.click();
        return tab.textContent!.trim();
      }, i);
      await until(`the panel of ${words}`, async () => (await at(page, ['hm-app', 'hm-desk'], (desk, index) => desk.shadowRoot!.querySelectorAll('[role=tab]')[index].getAttribute('aria-selected') === 'true', i)) === true);
      await until(`what stands in the panel of ${words}`, async () => (await at(page, ['hm-app', 'hm-desk', '[role=tabpanel]:not([hidden])'], (panel) => [...panel.children].some((child) => (child.shadowRoot?.childElementCount ?? 0) > 0))) === true);
      await new Promise((done) => setTimeout(done, 100));
      if (i > 0) await look(`panel ${words}`);
    }
    // Two dialogs are filled when they are asked for.
    for (const words of ['Starters', 'Projects']) {
      await press(page, ['hm-app', 'hm-conditions'], words);
      await until(`the dialog of ${words}`, () => page.evaluate(() => (window as unknown as Tools).everyone.all('dialog').some((dialog) => (dialog as HTMLDialogElement).open)));
      await page.keyboard.press('Escape');
    }
    const dialogs = await page.evaluate(() => (window as unknown as Tools).everyone.all('hm-dialog').length);
    assert.ok(dialogs >= 5, `${dialogs} dialogs`);
    for (let i = 0; i < dialogs; i++) {
      const heading = await page.evaluate(async (index) => {
        const dialog = (window as unknown as Tools).everyone.all('hm-dialog')[index] as HTMLElement & { show(): Promise<void>; heading: string };
        await dialog.show();
        return dialog.heading;
      }, i);
      await look(`dialog ${heading}`);
      await page.evaluate((index) => ((window as unknown as Tools).everyone.all('hm-dialog')[index] as HTMLElement & { close(): void }).close(), i);
    }
    assert.deepEqual(found, []);
  });
}

scenario('What is not accessible is found: pale words, a nameless button, targets too small and too close, a page too wide', async ({ page, open }) => {
  await open();
  await untilSolved(page);
  await bring(page);
  await at(page, ['hm-app'], (app) => {
    const planted = document.createElement('div');
    planted.innerHTML = '<p>pale</p><button></button><button class="small">a</button><button class="small">b</button><div class="wide">wide</div>';
    const sheet = new CSSStyleSheet();
    sheet.replaceSync('p { color: #ddd; background: #fff } .small { all: unset; display: inline-block; width: 10px; height: 10px } .wide { width: 3000px }');
    app.shadowRoot!.adoptedStyleSheets.push(sheet);
    app.shadowRoot!.append(planted);
  });
  const found = await breaches(page, 'planted');
  for (const id of ['color-contrast', 'button-name']) assert.ok(found.some((line) => line.includes(id)), id);
  assert.ok((await smallTargets(page, 'planted')).filter((line) => line.includes('small')).length === 2);
  assert.ok((await overflow(page)) > 1000);
});
