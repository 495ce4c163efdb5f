import axe from 'axe-core';
import type { Page } from 'puppeteer-core';
import type { Path } from './inside.ts';

/** How a page is looked at. */
export interface Appearance {
  width: number;
  height: number;
  /** device pixels a CSS pixel: at 200 % zoom a window of 1280 px is 640 wide */ zoom?: number;
  media?: { name: string; value: string }[];
}
export const APPEARANCES: [name: string, appearance: Appearance][] = [
  ['in light colours', { width: 1280, height: 800, media: [{ name: 'prefers-color-scheme', value: 'light' }] }],
  ['in dark colours', { width: 1280, height: 800, media: [{ name: 'prefers-color-scheme', value: 'dark' }] }],
  ['in forced colours', { width: 1280, height: 800, media: [{ name: 'forced-colors', value: 'active' }] }],
  ['360 px wide', { width: 360, height: 740 }],
  ['at 200 % zoom', { width: 640, height: 400, zoom: 2 }],
];

export async function show(page: Page, { width, height, zoom = 1, media = [] }: Appearance): Promise<void> {
  await page.setViewport({ width, height, deviceScaleFactor: zoom });
  const session = await page.createCDPSession();
  await session.send('Emulation.setEmulatedMedia', { features: [...media, { name: 'prefers-reduced-motion', value: 'reduce' }] });
}

/** What the scenarios put into the page beside axe. */
export interface Tools {
  axe: { run(context: unknown, options: object): Promise<{ violations: { id: string; nodes: { target: unknown; failureSummary?: string }[] }[] }> };
  everyone: { all(selector: string): HTMLElement[]; named(element: Element): string; at(steps: Path): HTMLElement | null };
}

export async function bring(page: Page): Promise<void> {
  await page.evaluate(axe.source);
  await page.evaluate(() => {
    /** Through every shadow tree. */
    const all = (selector: string, root: Document | ShadowRoot = document): HTMLElement[] =>
      [...root.querySelectorAll<HTMLElement>('*')].flatMap((element) => [...(element.matches(selector) ? [element] : []), ...(element.shadowRoot ? all(selector, element.shadowRoot) : [])]);
    const named = (element: Element): string => `${(element.getRootNode() as ShadowRoot).host?.localName ?? 'page'} ${element.localName}.${element.getAttribute('class') ?? ''} "${(element.getAttribute('aria-label') ?? element.textContent ?? '').trim().replace(/\s+/g, ' ').slice(0, 40)}"`;
    const at = (steps: string[]): HTMLElement | null => steps.reduce<ParentNode | null>((node, step) => node && ((node as Element).shadowRoot ?? node).querySelector(step), document) as HTMLElement | null;
    (window as unknown as { everyone: object }).everyone = { all: (selector: string) => all(selector), named, at };
  });
}

/** Everything that axe finds by WCAG 2.2 A and AA on the page as it stands; inside the open dialog, where there is one; inside one element, where a path to it is given. */
export function breaches(page: Page, where: string, within: Path = []): Promise<string[]> {
  return page.evaluate(async (place, steps) => {
    const { axe: checker, everyone } = window as unknown as Tools;
    const dialog = everyone.all('dialog').find((element) => (element as HTMLDialogElement).open && element.getBoundingClientRect().width > 0);
    const asked = steps.length === 0 ? null : everyone.at(steps);
    if (steps.length > 0 && asked === null) return [`${place}: there is no ${steps.join(' ')}`];
    const host = asked ?? (dialog === undefined ? null : ((dialog.getRootNode() as ShadowRoot).host ?? dialog));
    const { violations } = await checker.run(host ?? document, { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'], resultTypes: ['violations'] });
    return violations.map(({ id, nodes }) => `${place}: ${id}: ${nodes.slice(0, 4).map(({ target, failureSummary }) => `${JSON.stringify(target)} ${failureSummary?.replace(/\s+/g, ' ')}`).join('; ')}${nodes.length > 4 ? ` and ${nodes.length - 4} more` : ''}`);
  }, where, within);
}

/** Things to press that are smaller than 24 px in either direction (WCAG 2.2, 2.5.8), but for words of a link inside a sentence and what stands alone within 24 px. */
export function smallTargets(page: Page, where: string, within: Path = []): Promise<string[]> {
  return page.evaluate((place, steps) => {
    const { everyone } = window as unknown as Tools;
    const dialog = everyone.all('dialog').find((element) => (element as HTMLDialogElement).open);
    const owner = steps.length > 0 ? everyone.at(steps) : dialog === undefined ? null : (dialog.getRootNode() as ShadowRoot).host;
    const inside = (element: Element): boolean => {
      for (let node: Node | null = element; node !== null; node = node.parentNode ?? (node as ShadowRoot).host ?? null) if (node === owner || (steps.length === 0 && node === dialog)) return true;
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
  }, where, within);
}

/** How far the page is wider than its window, px: a person should not have to scroll to both sides (1.4.10). */
export const overflow = (page: Page): Promise<number> => page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
