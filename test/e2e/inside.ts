import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';

/** Names of the elements that hold each other, from the page inwards; the last may be any selector. */
export type Path = string[];

/** Runs a function in the page on the first element at a path through shadow trees; null where there is none. It may use nothing from outside but its second argument. */
export async function at<T, A = undefined>(page: Page, path: Path, read: (element: HTMLElement, given: A) => T | Promise<T>, given?: A): Promise<T | null> {
  const body = `(() => {
    let node = document;
    for (const step of ${JSON.stringify(path)}) {
      node = (node.shadowRoot ?? node).querySelector(step);
      if (node === null) return null;
    }
    return (${read.toString()})(node, ${JSON.stringify(given) ?? 'undefined'});
  })()`;
  return (await page.evaluate(body)) as T | null;
}

export async function until(what: string, holds: () => Promise<boolean>, patience_ms = 30_000): Promise<void> {
  for (const end = Date.now() + patience_ms; Date.now() < end; ) {
    if (await holds()) return;
    await new Promise((done) => setTimeout(done, 50));
  }
  assert.fail(`never came about: ${what}`);
}

/** Whether the design on the page has its result, and the plate shows it. */
export async function solved(page: Page): Promise<boolean> {
  const status = await at(page, ['hm-app', 'hm-messages'], (messages) => (messages as unknown as { findings: { status: string } }).findings.status);
  return status === 'complete' && (await at(page, ['hm-app', 'hm-plate', 'svg path'], () => true)) === true;
}

export async function untilSolved(page: Page): Promise<void> {
  await until('a solved design with its diagram', () => solved(page));
}

/** Text of the design on the page, as it would be written into its file. */
export async function designText(page: Page): Promise<string> {
  return (await at(page, ['hm-app', 'hm-strip'], (strip) => JSON.stringify((strip as unknown as { design: object }).design))) ?? '';
}

export async function title(page: Page): Promise<string> {
  return (await at(page, ['hm-app', 'hm-strip'], (strip) => (strip as unknown as { design: { title: string } }).design.title)) ?? '';
}

/** Everything that the page's messages say. */
export async function said(page: Page): Promise<string> {
  return (await at(page, ['hm-app', 'hm-messages'], (messages) => messages.shadowRoot!.textContent!.replace(/\s+/g, ' '))) ?? '';
}

/** Presses the button whose words begin like this inside an element. @returns whether it is there and can be pressed */
export async function press(page: Page, within: Path, words: string): Promise<void> {
  const pressed = await at(
    page,
    within,
    (element, wanted) => {
      const button = [...(element.shadowRoot ?? element).querySelectorAll('button')].find((candidate) => candidate.textContent!.trim().startsWith(wanted));
      button?.click();
      return button !== undefined && !button.disabled;
    },
    words,
  );
  assert.equal(pressed, true, `no button "${words}" to press in ${within.join(' ')}`);
}

/** Hands every file that the page would download to the scenario instead. */
export async function catchFiles(page: Page): Promise<() => Promise<{ name: string; text: string }[]>> {
  await page.evaluate(() => {
    const held = new Map<string, Blob>();
    const caught: Promise<{ name: string; text: string }>[] = [];
    (window as unknown as { caught: typeof caught }).caught = caught;
    // A picker of files cannot be answered here: the page falls back to a download.
    Object.defineProperty(window, 'showSaveFilePicker', { value: undefined });
    const make = URL.createObjectURL.bind(URL);
    URL.createObjectURL = (blob: Blob) => {
      const address = make(blob);
      held.set(address, blob);
      return address;
    };
    HTMLAnchorElement.prototype.click = function () {
      const { download } = this;
      caught.push(held.get(this.href)!.text().then((text) => ({ name: download, text })));
    };
  });
  return () => page.evaluate(() => Promise.all((window as unknown as { caught: Promise<{ name: string; text: string }>[] }).caught));
}
