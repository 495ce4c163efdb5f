// Finds a Chromium for the browser tests, the end-to-end tests and the pictures: CHROME_PATH if set; on Linux x64 the headless shell carried inside
// @sparticuz/chromium; otherwise an installed Chrome or Chromium.
import { spawnSync } from 'node:child_process';
import { chmodSync, createReadStream, createWriteStream, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { createBrotliDecompress } from 'node:zlib';
import { CACHE, ROOT } from './root.mjs';

const PACKAGE = join(ROOT, 'node_modules/@sparticuz/chromium');
const FONTS = join(ROOT, 'node_modules/dejavu-fonts-ttf/ttf');

/** @returns {Promise<{executablePath: string, env: Record<string, string | undefined>, args: string[], headless: boolean | 'shell'}>} options for puppeteer's launch */
export async function chromium() {
  // Chromium refuses its sandbox to root, and most CI containers cannot give it one.
  const unsandboxed = process.getuid?.() === 0 || process.env.CI ? ['--no-sandbox'] : [];
  const args = [...unsandboxed, '--font-render-hinting=none', '--disable-dev-shm-usage'];
  if (process.env.CHROME_PATH) {
    if (!existsSync(process.env.CHROME_PATH)) throw new Error(`CHROME_PATH names no file: ${process.env.CHROME_PATH}`);
    return { executablePath: process.env.CHROME_PATH, env: { ...process.env }, args, headless: true };
  }
  if (process.platform === 'linux' && process.arch === 'x64' && existsSync(PACKAGE)) {
    const folder = await inflated();
    const libraries = [join(folder, 'al2023/lib'), process.env.LD_LIBRARY_PATH].filter(Boolean).join(':');
    const env = { ...process.env, LD_LIBRARY_PATH: libraries, FONTCONFIG_FILE: fontconfig() };
    // It has no setuid helper: where user namespaces are closed, as on some desktops, there is no sandbox for it. It only ever opens our own pages.
    const open = unsandboxed.length > 0 || spawnSync('unshare', ['--user', 'true']).status === 0;
    return { executablePath: join(folder, 'chromium'), env, args: [...args, ...(open ? [] : ['--no-sandbox']), '--disable-gpu'], headless: 'shell' };
  }
  const executablePath = installed().find((path) => existsSync(path));
  if (!executablePath) throw new Error('No Chrome or Chromium found: install one, or set CHROME_PATH to it.');
  return { executablePath, env: { ...process.env }, args, headless: true };
}

/** Inflates the packed browser once for each version of the package. */
async function inflated() {
  const version = JSON.parse(readFileSync(join(PACKAGE, 'package.json'), 'utf8')).version;
  const folder = join(CACHE, `chromium-${version}`);
  if (existsSync(folder)) return folder;
  // Unpacked beside its place and renamed when whole: a stopped run leaves no half browser, and of two runs at once one wins.
  const unfinished = `${folder}.${process.pid}`;
  rmSync(unfinished, { recursive: true, force: true });
  mkdirSync(unfinished, { recursive: true });
  // tar-fs is a dependency of the package that brings the archives, so it is looked up from there.
  const { extract } = createRequire(join(PACKAGE, 'package.json'))('tar-fs');
  const inflate = (file, target) => pipeline(createReadStream(join(PACKAGE, 'bin', file)), createBrotliDecompress(), target);
  await Promise.all([
    inflate('chromium.br', createWriteStream(join(unfinished, 'chromium'))),
    inflate('swiftshader.tar.br', extract(unfinished)),
    inflate('al2023.tar.br', extract(join(unfinished, 'al2023'))),
  ]);
  chmodSync(join(unfinished, 'chromium'), 0o755);
  try {
    renameSync(unfinished, folder);
  } catch (error) {
    rmSync(unfinished, { recursive: true, force: true });
    if (!existsSync(folder)) throw error;
  }
  return folder;
}

/** Writes the font configuration: the packed browser brings a font without the superscript minus, arrows and h-bar that units and axes need. */
function fontconfig() {
  const file = join(CACHE, 'fonts.conf');
  const escaped = (path) => path.replaceAll('&', '&amp;').replaceAll('<', '&lt;');
  const family = (generic, name) => `<alias><family>${generic}</family><prefer><family>${name}</family></prefer></alias>`;
  const text = `<?xml version="1.0"?>
<!DOCTYPE fontconfig SYSTEM "fonts.dtd">
<fontconfig>
<dir>${escaped(FONTS)}</dir>
<cachedir>${escaped(join(CACHE, 'fontconfig'))}</cachedir>
${family('sans-serif', 'DejaVu Sans')}
${family('system-ui', 'DejaVu Sans')}
${family('serif', 'DejaVu Serif')}
${family('monospace', 'DejaVu Sans Mono')}
</fontconfig>
`;
  mkdirSync(dirname(file), { recursive: true });
  const unfinished = `${file}.${process.pid}`;
  writeFileSync(unfinished, text);
  renameSync(unfinished, file);
  return file;
}

/** Usual places of an installed browser. */
function installed() {
  if (process.platform === 'darwin') {
    return ['/Applications/Google Chrome.app/Contents/MacOS/Google Chrome', '/Applications/Chromium.app/Contents/MacOS/Chromium'];
  }
  if (process.platform === 'win32') {
    return ['ProgramFiles', 'ProgramFiles(x86)', 'LocalAppData']
      .map((name) => process.env[name])
      .filter(Boolean)
      .map((folder) => join(folder, 'Google/Chrome/Application/chrome.exe'));
  }
  const names = ['google-chrome-stable', 'google-chrome', 'chromium', 'chromium-browser'];
  return ['/usr/bin', '/usr/local/bin', '/snap/bin'].flatMap((folder) => names.map((name) => join(folder, name)));
}
