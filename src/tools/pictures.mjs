// `npm run pictures`: the pictures of the README and of the help, taken of the built page. With an argument only those whose name holds it.
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { buildIfStale } from './build.mjs';
import { openBrowser } from './browser.mjs';
import { ROOT } from './root.mjs';
import { serve } from './serve.mjs';

const FOLDER = join(ROOT, 'src/help/pictures');
/** `panel` is opened first; `press` starts what is asked of it; `part` is what is taken of the page, the first of its name, once it is there. */
const PICTURES = [
  { name: 'plate', width: 1440, height: 900, scheme: 'light' },
  { name: 'narrow', width: 390, height: 844, scheme: 'light' },
  { name: 'dark', width: 1440, height: 900, scheme: 'dark' },
  { name: 'mesh', width: 1100, height: 900, scheme: 'light', part: 'hm-plate svg' },
  { name: 'contact', width: 1440, height: 900, scheme: 'light', panel: 'contacts', part: 'hm-contacts svg' },
  { name: 'sizing', width: 1200, height: 900, scheme: 'light', panel: 'sizing', press: 'Find the values', part: 'hm-sizing svg' },
  { name: 'tolerance', width: 1200, height: 900, scheme: 'light', panel: 'tolerances', press: 'Draw the variations', part: 'hm-tolerances svg' },
];
/** Time that the longest of them may take on a slow machine, ms. */
const PATIENCE = 120_000;

await buildIfStale();
mkdirSync(FOLDER, { recursive: true });
const { url, close } = await serve(0);
const browser = await openBrowser();
try {
  for (const { name, width, height, scheme, panel, press, part } of PICTURES.filter((picture) => picture.name.includes(process.argv[2] ?? ''))) {
    // A fresh profile each: nothing of the last picture's design or settings is left.
    const context = await browser.createBrowserContext();
    const page = await context.newPage();
    await page.setViewport({ width, height });
    await page.emulateMediaFeatures([
      { name: 'prefers-color-scheme', value: scheme },
      { name: 'prefers-reduced-motion', value: 'reduce' },
    ]);
    await page.goto(url, { waitUntil: 'networkidle0' });
    // The diagram comes from a worker, after the page is quiet on a slow machine.
    await page.waitForFunction(() => document.querySelector('hm-app')?.shadowRoot?.querySelector('hm-plate')?.shadowRoot?.querySelector('svg path'));
    if (panel) await (await within(page, `#tab-${panel}`)).click();
    if (press) await (await within(page, `hm-${panel} button`, press)).click();
    const taken = part ? await within(page, part) : page;
    // A run goes on after its first picture: it is over when its bar of progress has gone.
    while (press && (await (await page.evaluateHandle(deepFind, `hm-${panel} progress`, '')).asElement()) !== null) await new Promise((done) => setTimeout(done, 200));
    await page.evaluate(async () => {
      await document.fonts.ready;
      await new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done)));
    });
    await taken.screenshot({ path: join(FOLDER, `${name}.png`) });
    console.log(`src/help/pictures/${name}.png  ${width} x ${height}`);
    await context.close();
  }
} finally {
  await browser.close();
  await close();
}

/** Waits for an element anywhere in the page, shadow roots and all, by a selector whose parts may stand in roots of their own, and by how its text begins. */
async function within(page, selector, text = '') {
  return (await page.waitForFunction(deepFind, { timeout: PATIENCE, polling: 200 }, selector, text)).asElement();
}

/** Runs in the page. */
function deepFind(selector, text) {
  const parts = selector.split(' ');
  const seek = (root, at) => {
    for (const element of root.querySelectorAll('*')) {
      const fits = element.matches(parts[at]) && element.getClientRects().length > 0;
      if (fits && at === parts.length - 1 && element.textContent.trim().startsWith(text)) return element;
      const found = element.shadowRoot ? seek(element.shadowRoot, fits && at < parts.length - 1 ? at + 1 : at) : null;
      if (found) return found;
    }
    return null;
  };
  return seek(document, 0);
}
