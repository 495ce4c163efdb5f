import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';

/** Runs a function in the page on the desk. */
async function desk<T>(page: Page, read: (desk: HTMLElement & { verdicts: { status: string; stale: boolean; rows: { met: boolean }[] } }) => T): Promise<T> {
  return (await page.evaluate(`(${read.toString()})(document.querySelector('hm-app').shadowRoot.querySelector('hm-desk'))`)) as T;
}

async function until(what: string, holds: () => Promise<boolean>, seconds = 20): Promise<void> {
  for (let i = 0; i < 10 * seconds; i++) {
    if (await holds()) return;
    await new Promise((done) => setTimeout(done, 100));
  }
  assert.fail(`never came about: ${what}`);
}

/** Presses Tab until the focus stands on an element whose words or label begin so. */
async function tabTo(page: Page, words: string): Promise<void> {
  for (let i = 0; i < 150; i++) {
    await page.keyboard.press('Tab');
    const there = await page.evaluate(`(() => {
      let node = document.activeElement;
      while (node?.shadowRoot?.activeElement) node = node.shadowRoot.activeElement;
      return (node?.getAttribute('aria-label') ?? node?.textContent ?? '').trim().startsWith(${JSON.stringify(words)});
    })()`);
    if (there === true) return;
  }
  assert.fail(`the Tab key never came to ${words}`);
}

const judged = (page: Page) => desk(page, ({ verdicts }) => verdicts.status === 'complete' && !verdicts.stale);
const unmet = (page: Page) => desk(page, ({ verdicts }) => verdicts.rows.filter((row) => !row.met).length);

scenario('A requirement that the first design misses is met by sizing a variable, with the keyboard alone, and undo takes that back', async ({ page, open }) => {
  await open();
  await until('verdicts', () => judged(page));
  assert.equal(await unmet(page), 1);

  await tabTo(page, 'Ledger');
  await page.keyboard.press('ArrowRight');
  await until('the requirements', () => desk(page, (d) => d.shadowRoot!.querySelector('hm-requirements') !== null));
  await tabTo(page, 'Size a variable to meet this');
  await page.keyboard.press('Enter');
  await until('the sizing', () => desk(page, (d) => d.shadowRoot!.querySelector('hm-sizing') !== null));
  await tabTo(page, 'Find the values');
  await page.keyboard.press('Enter');
  await until('an interval', () => desk(page, (d) => /^Everything is met with Nanode from/.test(d.shadowRoot!.querySelector('hm-sizing')!.shadowRoot!.querySelector('.outcome')?.textContent ?? '')), 40);
  await tabTo(page, 'Nanode = ');
  await page.keyboard.press('Enter');
  await until('all met', async () => (await judged(page)) && (await unmet(page)) === 0);

  await page.keyboard.down('Control');
  await page.keyboard.press('KeyZ');
  await page.keyboard.up('Control');
  await until('one not met again', async () => (await judged(page)) && (await unmet(page)) === 1);
});
