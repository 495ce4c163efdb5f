// A browser under program control, with no way out of this machine.
import { launch } from 'puppeteer-core';
import { chromium } from './chromium.mjs';

/** @returns {Promise<import('puppeteer-core').Browser>} */
export async function openBrowser() {
  const { executablePath, env, args, headless } = await chromium();
  // Any other host is unknown: a page that asks for one fails at once instead of reaching it.
  return launch({ executablePath, env, headless, args: [...args, '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE localhost, EXCLUDE 127.0.0.1'] });
}
