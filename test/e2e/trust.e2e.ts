import assert from 'node:assert/strict';
import { readFileSync } from 'node:fs';
import { deflateRawSync } from 'node:zlib';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, catchFiles, designText, press, said, title, until, untilSolved } from './inside.ts';

/** Every breach of the page's security policy from now on, also of parts that are loaded later. */
async function watchPolicy(page: Page): Promise<() => Promise<string[]>> {
  await page.evaluateOnNewDocument(() => {
    const breaches: string[] = [];
    (window as unknown as { breaches: string[] }).breaches = breaches;
    document.addEventListener('securitypolicyviolation', ({ violatedDirective, blockedURI, sourceFile }) => breaches.push(`${violatedDirective} ${blockedURI} ${sourceFile}`));
  });
  return () => page.evaluate(() => (window as unknown as { breaches: string[] }).breaches);
}

/** A design with a name like markup in every place that takes one. */
const HOSTILE = '"><img src=x onerror="window.ran=1"><script>window.ran=1</script>';
function hostileDesign(): object {
  return {
    format: 'halfmark-design/1', title: HOSTILE, notes: HOSTILE, conditions: { temperature: '300 K' }, top: { kind: 'neutral' },
    layers: [
      { name: HOSTILE, material: 'GaAs', thickness: '300 nm', dopants: [{ kind: 'donor', depth: '5 meV', concentration: '1e17 cm^-3' }] },
      { name: `=HYPERLINK("http://x")${HOSTILE}`, material: 'GaAs', thickness: '300 nm', dopants: [{ kind: 'acceptor', depth: '5 meV', concentration: '1e17 cm^-3' }] },
    ],
    variables: [{ name: 'a', value: '1', note: HOSTILE }],
    custom: { metals: [{ id: 'own', workFunction: '4.5 eV', source: HOSTILE }] },
    bottom: { kind: 'neutral' },
  };
}
async function openByLink(page: Page, design: object): Promise<void> {
  const fragment = deflateRawSync(JSON.stringify(design)).toString('base64url');
  await page.evaluate((text) => void (location.hash = `design=${text}`), fragment);
}
/** Something else is said in between, so that an equal sentence is noticed. */
async function clearWords(page: Page): Promise<void> {
  await at(page, ['hm-app', 'hm-messages'], (messages) => void messages.dispatchEvent(new CustomEvent('hm-say', { bubbles: true, composed: true, detail: { text: 'In between.' } })));
  await until('words in between', async () => (await said(page)).includes('In between.'));
}
/** Names of all elements on the page, through every shadow tree. */
const elements = (page: Page) =>
  page.evaluate(() => {
    const names: string[] = [];
    const walk = (root: Document | ShadowRoot): void => {
      for (const element of root.querySelectorAll('*')) {
        names.push(element.localName);
        if (element.shadowRoot) walk(element.shadowRoot);
      }
    };
    walk(document);
    return names;
  });

scenario('The policy of the page allows no inline script, no inline style, no code made of text, and no other server', async ({ page, open, url }) => {
  const breaches = await watchPolicy(page);
  const response = await page.goto(url, { waitUntil: 'networkidle0' });
  const inPage = await page.evaluate(() => document.querySelector('meta[http-equiv="Content-Security-Policy"]')!.getAttribute('content')!);
  for (const policy of [inPage, response!.headers()['content-security-policy']]) {
    assert.doesNotMatch(policy, /unsafe|\*|https?:/);
    for (const rule of ["default-src 'none'", "script-src 'self'", "style-src 'self'", "connect-src 'self'", "worker-src 'self'", "base-uri 'none'", "form-action 'none'"]) assert.ok(policy.split('; ').includes(rule), rule);
  }
  await open();
  await untilSolved(page);
  assert.deepEqual(await breaches(), []);
});

scenario('The licences of what ships are there to be read beside the page', async ({ page, url }) => {
  const answer = await page.goto(`${url}licences.txt`);
  assert.equal(answer!.status(), 200);
  assert.equal(answer!.headers()['content-type'], 'text/plain; charset=utf-8');
  assert.equal(await answer!.text(), readFileSync('src/help/licences.txt', 'utf8'));
});

scenario('Markup in every name of a design stays text on the page and in every file, and breaks no rule', async ({ page, open }) => {
  const breaches = await watchPolicy(page);
  await open();
  await untilSolved(page);
  const before = new Set(await elements(page));
  await openByLink(page, hostileDesign());
  await until('the design, or why not', async () => (await title(page)) === HOSTILE || /was not opened/.test(await said(page)));
  assert.equal(await title(page), HOSTILE, await said(page));
  await untilSolved(page);
  for (const act of ['Projects', 'Starters', 'Take away']) {
    await press(page, ['hm-app', 'hm-conditions'], act);
    await page.keyboard.press('Escape');
  }
  // Its notes, its own entries and its variants, unfolded.
  const desk = ['hm-app', 'hm-desk'];
  for (const [name, tag] of [['Parameters', 'hm-parameters'], ['Variants', 'hm-variants'], ['Ledger', 'hm-ledger']]) {
    await at(page, desk, (element, words) => [...element.shadowRoot!.querySelectorAll<HTMLElement>('[role=tab]')].find((tab) => tab.textContent!.trim().startsWith(words))!.click(), name);
    await until(`the panel ${name}`, async () => (await at(page, [...desk, tag], (element) => element.shadowRoot!.childElementCount > 0)) === true);
    if (name === 'Variants') await press(page, [...desk, tag], 'Copy what is on the page');
    await at(page, [...desk, tag], (element) => [...element.shadowRoot!.querySelectorAll('details')].forEach((details) => (details.open = true)));
  }
  await at(page, ['hm-app', 'hm-notes'], (notes) => [...notes.shadowRoot!.querySelectorAll('details')].forEach((details) => (details.open = true)));
  assert.equal(await at(page, ['hm-app', 'hm-notes', '.inforce'], (line) => line.textContent!.slice(0, 30)), HOSTILE.slice(0, 30));
  await untilSolved(page);
  const after = await elements(page);
  assert.ok(!after.includes('img') || before.has('img'));
  assert.ok(!after.some((name) => name === 'script') || before.has('script'));
  const files = await catchFiles(page);
  await press(page, ['hm-app', 'hm-conditions'], 'Take away');
  for (const [i, words] of ['SVG', 'Profiles', 'Ledger', 'Design file'].entries()) {
    await press(page, ['hm-app', 'hm-leave'], words);
    await until(`the file of "${words}"`, async () => (await files()).length > i);
  }
  const [svg, csv, tsv] = await files();
  assert.doesNotMatch(svg.text, /<(script|img)/);
  assert.doesNotMatch(`${csv.text}\n${tsv.text}`, /(^|[\t\n",])=HYPERLINK/);
  for (const { name } of await files()) assert.match(name, /^[\p{L}\p{N}-]+(\.[a-z]+)+$/u);
  assert.equal(await page.evaluate(() => (window as unknown as { ran?: number }).ran), undefined);
  assert.deepEqual(await breaches(), []);
});

scenario('Hostile links and pasted texts are refused in words, and what is on the page stays', async ({ page, open }) => {
  const breaches = await watchPolicy(page);
  await open();
  await untilSolved(page);
  const before = await designText(page);
  const bomb = deflateRawSync(Buffer.alloc(50e6, ' ')).toString('base64url');
  for (const fragment of [bomb, '%00', 'AAAA', deflateRawSync('{"__proto__":{"polluted":1}}').toString('base64url'), deflateRawSync('['.repeat(2e6)).toString('base64url')]) {
    await clearWords(page);
    await page.evaluate((text) => void (location.hash = `design=${text}`), fragment);
    await until(`words about ${fragment.slice(0, 20)}`, async () => /was not opened|holds no design/.test(await said(page)));
    assert.equal(await designText(page), before);
  }
  for (const text of ['{"__proto__":{"polluted":1}}', `{"a":${'['.repeat(1e5)}`, `{"format":"halfmark-design/1","title":"${'A'.repeat(6e6)}"}`]) {
    await clearWords(page);
    await page.evaluate((given) => {
      const clipboardData = new DataTransfer();
      clipboardData.setData('text/plain', given);
      document.body.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true }));
    }, text);
    await until(`words about ${text.slice(0, 20)}`, async () => (await said(page)).includes('The pasted text was not opened'));
    assert.equal(await designText(page), before);
  }
  assert.equal(await page.evaluate(() => ({} as { polluted?: unknown }).polluted), undefined);
  assert.deepEqual(await breaches(), []);
});
