import assert from 'node:assert/strict';
import { deflateRawSync } from 'node:zlib';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';

/** Names of the elements that hold each other, from the page inwards; the last may be any selector. */
type Path = string[];

/** Runs a function in the page on the first element at a path through shadow trees; null where there is none. */
async function at<T>(page: Page, path: Path, read: (element: Element) => T): Promise<T | null> {
  const body = `(() => {
    let node = document;
    for (const step of ${JSON.stringify(path)}) {
      node = (node.shadowRoot ?? node).querySelector(step);
      if (node === null) return null;
    }
    return (${read.toString()})(node);
  })()`;
  return (await page.evaluate(body)) as T | null;
}

async function until(what: string, holds: () => Promise<boolean>): Promise<void> {
  for (let i = 0; i < 150; i++) {
    if (await holds()) return;
    await new Promise((done) => setTimeout(done, 50));
  }
  assert.fail(`never came about: ${what}`);
}

const STRIP: Path = ['hm-app', 'hm-strip'];
const SAVING: Path = ['hm-app', 'hm-conditions', '.saving'];
const conductionEdge = (page: Page) => at(page, ['hm-app', 'hm-plate', '[data-role="conduction-edge"]'], (path) => path.getAttribute('d'));
const stripText = async (page: Page): Promise<string> => (await at(page, STRIP, (strip) => strip.shadowRoot!.textContent!.replace(/\s+/g, ' '))) ?? '';
const remark = async (page: Page): Promise<string> => (await at(page, ['hm-app', 'hm-messages', '.polite'], (element) => element.textContent!)) ?? '';
const solved = async (page: Page): Promise<boolean> => (await at(page, ['hm-app', 'hm-messages'], (messages) => (messages as unknown as { findings: { status: string } }).findings.status)) === 'complete';

/** Heights of the conduction edge at its two ends, and its highest and lowest point, px. */
function heights(path: string | null): number[] {
  const y = [...(path ?? '').matchAll(/[-\d.]+,([-\d.]+)/g)].map((pair) => Number(pair[1]));
  return [y[0], y[y.length - 1], Math.min(...y), Math.max(...y)];
}
/** The same picture to the eye: another start of the solver may place its mesh, and so the points of the line, a little differently. */
const alike = (a: string | null, b: string | null): boolean => heights(a).every((y, i) => Math.abs(y - heights(b)[i]) < 0.5);

/** Presses Tab until the focus stands on an element that answers. */
async function tabTo(page: Page, what: string, found: string): Promise<void> {
  for (let i = 0; i < 120; i++) {
    await page.keyboard.press('Tab');
    const there = await page.evaluate(`(() => {
      let node = document.activeElement;
      while (node?.shadowRoot?.activeElement) node = node.shadowRoot.activeElement;
      return node !== null && (${found})(node);
    })()`);
    if (there === true) return;
  }
  assert.fail(`the Tab key never came to ${what}`);
}

scenario('A doping is changed by the keyboard alone, seen in the diagram, taken back, saved, and there after a reload', async ({ page, open }) => {
  await open();
  await until('a diagram', async () => (await conductionEdge(page)) !== null && (await solved(page)));
  const before = await conductionEdge(page);

  await tabTo(page, 'the first layer', '(node) => node.getAttribute("role") === "option" && node.dataset.layer !== undefined');
  await page.keyboard.press('Enter');
  await tabTo(page, 'the concentration', '(node) => node.localName === "input" && /^(?=.*conc)/i.test(node.getRootNode().host?.label ?? "")');
  await page.keyboard.down('Control');
  await page.keyboard.press('KeyA');
  await page.keyboard.up('Control');
  await page.keyboard.type('5e16');
  await page.keyboard.press('Enter');
  await until('another diagram', async () => (await solved(page)) && !alike(await conductionEdge(page), before));
  assert.match(await stripText(page), /5e16 cm⁻³/);

  const undo = async (): Promise<void> => {
    await page.keyboard.down('Control');
    await page.keyboard.press('KeyZ');
    await page.keyboard.up('Control');
  };
  await undo();
  await until('the first diagram', async () => (await solved(page)) && alike(await conductionEdge(page), before));
  assert.match(await remark(page), /^Taken back: /);

  await page.keyboard.down('Control');
  await page.keyboard.down('Shift');
  await page.keyboard.press('KeyZ');
  await page.keyboard.up('Shift');
  await page.keyboard.up('Control');
  await until('the other diagram again', async () => (await solved(page)) && !alike(await conductionEdge(page), before));
  await until('the save', async () => /^All changes saved/.test((await at(page, SAVING, (element) => element.textContent)) ?? ''));

  await page.reload({ waitUntil: 'networkidle0' });
  await until('a diagram', async () => (await conductionEdge(page)) !== null && (await solved(page)));
  assert.match(await stripText(page), /5e16 cm⁻³/);
  await undo();
  await until('undo through the reload', async () => (await solved(page)) && alike(await conductionEdge(page), before));
});

scenario('The plate is taken away as an SVG file with its title and figures', async ({ page, open }) => {
  await open();
  await until('a diagram', async () => (await conductionEdge(page)) !== null && (await solved(page)));
  // A picker of files cannot be answered here: the page falls back to a download, whose content is caught.
  await page.evaluate(() => {
    const caught = window as unknown as { caught: Promise<string>[]; showSaveFilePicker?: unknown };
    caught.caught = [];
    Object.defineProperty(window, 'showSaveFilePicker', { value: undefined });
    HTMLAnchorElement.prototype.click = function () {
      const blobs = (URL as unknown as { held: Map<string, Blob> }).held;
      caught.caught.push(blobs.get(this.href)!.text().then((text) => `${this.download}\n${text}`));
    };
    const held = new Map<string, Blob>();
    (URL as unknown as { held: Map<string, Blob> }).held = held;
    const make = URL.createObjectURL.bind(URL);
    URL.createObjectURL = (blob: Blob) => {
      const address = make(blob);
      held.set(address, blob);
      return address;
    };
  });
  await at(page, ['hm-app', 'hm-conditions'], (head) => [...head.shadowRoot!.querySelectorAll('button')].find((button) => button.textContent === 'Take away')!.click());
  await at(page, ['hm-app', 'hm-leave'], (leave) => [...leave.shadowRoot!.querySelectorAll('button')].find((button) => button.textContent!.startsWith('SVG'))!.click());
  const caught = () => page.evaluate(() => Promise.all((window as unknown as { caught: Promise<string>[] }).caught));
  await until('a file', async () => (await caught()).length === 1);
  const [file] = await caught();
  const title = await at(page, STRIP, (strip) => (strip as unknown as { design: { title: string } }).design.title);
  assert.ok(/^[^\n]+\.svg\n(<\?xml[^\n]*\n)?<svg /.test(file), 'a file of that kind');
  assert.ok(file.includes(title!), 'the title stands in the drawing');
  assert.ok(!/<script|\sstyle=/.test(file), 'nothing that a strict policy would not show');
});

scenario('A value that cannot be read keeps the picture, and says where and how to mend it', async ({ page, open }) => {
  await open();
  await until('a diagram', async () => (await conductionEdge(page)) !== null && (await solved(page)));
  const before = await conductionEdge(page);
  await tabTo(page, 'the temperature', '(node) => node.localName === "input" && node.getRootNode().host?.label === "Temperature"');
  await page.keyboard.down('Control');
  await page.keyboard.press('KeyA');
  await page.keyboard.up('Control');
  await page.keyboard.type('300 parsec');
  await page.keyboard.press('Enter');
  const messages = async (): Promise<string> => (await at(page, ['hm-app', 'hm-messages'], (element) => element.shadowRoot!.textContent!.replace(/\s+/g, ' '))) ?? '';
  await until('a complaint', async () => (await messages()).includes('One thing to mend'));
  assert.match(await messages(), /temperature: .*parsec/);
  assert.equal(await conductionEdge(page), before);
  assert.equal(await at(page, ['hm-app', 'hm-plate'], (plate) => plate.hasAttribute('stale')), true);
});

scenario('A link opens the design that it carries as a project of its own, once', async ({ page, open }) => {
  await open();
  await until('a diagram', async () => (await conductionEdge(page)) !== null && (await solved(page)));
  const title = () => at(page, STRIP, (strip) => (strip as unknown as { design: { title: string } }).design.title);
  const own = await title();
  const design = { format: 'halfmark-design/1', title: 'sent by a colleague', conditions: { temperature: '300 K' }, top: { kind: 'neutral' }, layers: [{ name: 'one', material: 'GaAs', thickness: '1 um' }], bottom: { kind: 'neutral' } };
  const fragment = deflateRawSync(JSON.stringify(design)).toString('base64url');
  await page.evaluate((text) => void (location.hash = `design=${text}`), fragment);
  await until('the design', async () => (await title()) === 'sent by a colleague' && (await solved(page)));
  assert.equal(await page.evaluate(() => location.hash), '');
  await page.reload({ waitUntil: 'networkidle0' });
  await until('the project after a reload', async () => (await title()) === 'sent by a colleague');
  await at(page, ['hm-app', 'hm-conditions'], (head) => [...head.shadowRoot!.querySelectorAll('button')].find((button) => button.textContent === 'Projects')!.click());
  const names = () => at(page, ['hm-app', 'hm-projects'], (projects) => (projects as unknown as { entries: { name: string }[] }).entries.map((entry) => entry.name).sort().join());
  await until('both projects in the list', async () => (await names()) === [own, 'sent by a colleague'].sort().join());
});
