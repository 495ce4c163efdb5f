import assert from 'node:assert/strict';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, catchFiles, press, said, until, untilSolved } from './inside.ts';

/** Waits until the page is kept whole. */
const kept = (page: Page) => page.evaluate(async () => void (await navigator.serviceWorker.ready));
/** A refused request is what these scenarios are about. */
const network = /^request failed: |net::ERR_|^answer 404/;
function forget(problems: string[], expected: RegExp): void {
  problems.splice(0, problems.length, ...problems.filter((problem) => !expected.test(problem)));
}

scenario('With the network cut after the first load the page opens again, solves an edit and gives its files away', async ({ page, problems, serveCopy }) => {
  const server = await serveCopy();
  await page.goto(server.url, { waitUntil: 'networkidle0' });
  await untilSolved(page);
  await kept(page);
  await server.close();

  await page.reload({ waitUntil: 'load' });
  await untilSolved(page);
  const before = await at(page, ['hm-app', 'hm-plate', '[data-role="conduction-edge"]'], (path) => path.getAttribute('d'));
  await at(page, ['hm-app', 'hm-strip'], (strip) => {
    const { design } = strip as unknown as { design: { conditions: object } };
    strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next: { ...design, conditions: { ...design.conditions, temperature: '150 K' } }, label: 'temperature' } }));
  });
  await until('another diagram', async () => (await at(page, ['hm-app', 'hm-plate', '[data-role="conduction-edge"]'], (path) => path.getAttribute('d'))) !== before);
  await untilSolved(page);

  // Parts that were never asked for while there was a network.
  const files = await catchFiles(page);
  await press(page, ['hm-app', 'hm-conditions'], 'Take away');
  for (const words of ['SVG', 'PNG', 'Profiles', 'Ledger', 'Design file']) {
    const count = (await files()).length;
    await press(page, ['hm-app', 'hm-leave'], words);
    await until(`the file of "${words}"`, async () => (await files()).length > count);
  }
  const endings = (await files()).map(({ name }) => name.replace(/^.*?(-profile|-ledger)?(\.[a-z.]+)$/, '$1$2'));
  assert.deepEqual(endings.sort(), ['-ledger.tsv', '-profile.csv', '.halfmark.json', '.png', '.svg'].sort());
  forget(problems, network);
});

scenario('Parts that were not loaded yet still come when the network is cut without a reload', async ({ page, problems, serveCopy }) => {
  const server = await serveCopy();
  await page.goto(server.url, { waitUntil: 'networkidle0' });
  await untilSolved(page);
  await kept(page);
  await until('the worker in charge', () => page.evaluate(() => navigator.serviceWorker.controller !== null));
  await server.close();
  await press(page, ['hm-app', 'hm-conditions'], 'Starters');
  await until('the shelf', async () => ((await at(page, ['hm-app', 'hm-starters'], (shelf) => (shelf as unknown as { starters: unknown[] | null }).starters?.length ?? 0)) ?? 0) > 5);
  forget(problems, network);
});

scenario('A newer build waits while the page is worked on, and a reload takes it', async ({ page, serveCopy }) => {
  const server = await serveCopy();
  await page.goto(server.url, { waitUntil: 'networkidle0' });
  await untilSolved(page);
  await kept(page);
  const mark = () => page.evaluate(() => document.querySelector('meta[name="build"]')?.getAttribute('content') ?? 'first');
  const waits = () => page.evaluate(async () => ((await navigator.serviceWorker.getRegistration())?.waiting ?? null) !== null);

  const file = join(server.folder, 'index.html');
  writeFileSync(file, readFileSync(file, 'utf8').replace('</head>', '<meta name="build" content="second"></head>'));
  await server.publish();
  await page.evaluate(async () => void (await (await navigator.serviceWorker.getRegistration())!.update()));
  await until('the newer build', waits);
  await until('word of it', async () => (await said(page)).includes('A newer version of this page is ready'));
  // It waits for as long as the person works.
  await new Promise((done) => setTimeout(done, 500));
  assert.equal(await waits(), true);
  assert.equal(await mark(), 'first');

  await page.reload({ waitUntil: 'networkidle0' });
  await until('the newer page', async () => (await mark().catch(() => '')) === 'second');
  await untilSolved(page);
  assert.equal(await waits(), false);
});

scenario('A build of which a file was altered on its way is not kept, and the former one stays', async ({ page, problems, serveCopy }) => {
  const server = await serveCopy();
  await page.goto(server.url, { waitUntil: 'networkidle0' });
  await untilSolved(page);
  await kept(page);
  const file = join(server.folder, 'index.html');
  writeFileSync(file, readFileSync(file, 'utf8').replace('</head>', '<meta name="build" content="second"></head>'));
  await server.publish();
  writeFileSync(file, readFileSync(file, 'utf8').replace('second', 'altered'));
  await page.evaluate(async () => void (await (await navigator.serviceWorker.getRegistration())!.update().catch(() => {})));
  await until('the refusal', () => page.evaluate(async () => {
    const { installing, waiting } = (await navigator.serviceWorker.getRegistration())!;
    return installing === null && waiting === null;
  }));
  await page.reload({ waitUntil: 'networkidle0' });
  await untilSolved(page);
  assert.equal(await page.evaluate(() => document.querySelector('meta[name="build"]')), null);
  forget(problems, /integrity|digest|ERR_|request failed/i);
});

scenario('The page can be installed: a manifest with icons of the sizes that it says', async ({ page, open, url }) => {
  await open();
  const found = await page.evaluate(async () => {
    const address = document.querySelector<HTMLLinkElement>('link[rel="manifest"]')!.href;
    const manifest = await (await fetch(address)).json();
    const icons = await Promise.all(
      (manifest.icons as { src: string }[]).map(async ({ src }) => {
        const image = new Image();
        image.src = new URL(src, address).href;
        await image.decode();
        return `${image.naturalWidth}x${image.naturalHeight}`;
      }),
    );
    return { manifest, icons, start: new URL(manifest.start_url, address).href };
  });
  assert.equal(found.start, url);
  assert.deepEqual(found.icons, found.manifest.icons.map((icon: { sizes: string }) => icon.sizes));
  assert.ok(found.manifest.icons.some((icon: { purpose: string }) => icon.purpose === 'maskable'));
  const session = await page.createCDPSession();
  const { errors } = await session.send('Page.getAppManifest');
  assert.deepEqual(errors, []);
});
