// The part of the build that makes the page installable and has it kept: manifest, icons, licences, service worker.
import { readFileSync } from 'node:fs';
import type { Plugin } from 'vite';
import { styleOf } from '../drawing/styles.ts';
import { markPng } from './icon-png.ts';
import { LICENCES_FILE } from './licences.mjs';
import { WORKER_FILE, writeOfflineWorker } from './offline-worker.mjs';

const { ground } = styleOf('light');
const MANIFEST_FILE = 'halfmark.webmanifest';

/** Icons by their file: side in px, share of it that the mark takes. */
const ICONS = [
  { file: 'icon-192.png', side: 192, share: 0.86, purpose: 'any' },
  { file: 'icon-512.png', side: 512, share: 0.86, purpose: 'any' },
  { file: 'icon-mask-512.png', side: 512, share: 0.6, purpose: 'maskable' },
] as const;

/** What a system is told when the page is installed as an application. Addresses are relative, so it may lie in any folder. */
export const WEB_MANIFEST = {
  id: './',
  name: 'Halfmark',
  short_name: 'Halfmark',
  description: 'Band diagrams of semiconductor layer stacks, solved in this browser, offline.',
  lang: 'en',
  start_url: './',
  scope: './',
  display: 'standalone',
  background_color: ground,
  theme_color: ground,
  categories: ['productivity', 'utilities', 'education'],
  icons: ICONS.map(({ file, side, purpose }) => ({ src: `./${file}`, sizes: `${side}x${side}`, type: 'image/png', purpose })),
};

export function offlinePage(): Plugin {
  let folder = '';
  return {
    name: 'offline-page',
    apply: 'build',
    enforce: 'post',
    configResolved: (config) => void (folder = config.build.outDir.startsWith('/') ? config.build.outDir : `${config.root}/${config.build.outDir}`),
    generateBundle() {
      this.emitFile({ type: 'asset', fileName: MANIFEST_FILE, source: `${JSON.stringify(WEB_MANIFEST, null, 1)}\n` });
      // Authors ask that their licences go wherever their work goes.
      this.emitFile({ type: 'asset', fileName: 'licences.txt', source: readFileSync(LICENCES_FILE) });
      for (const { file, side, share } of ICONS) this.emitFile({ type: 'asset', fileName: file, source: markPng(side, share) });
    },
    transformIndexHtml: {
      order: 'post',
      handler: () => [
        { tag: 'link', attrs: { rel: 'manifest', href: `./${MANIFEST_FILE}` }, injectTo: 'head' },
        { tag: 'link', attrs: { rel: 'apple-touch-icon', href: './icon-192.png' }, injectTo: 'head' },
        { tag: 'meta', attrs: { name: 'theme-color', media: '(prefers-color-scheme: light)', content: ground }, injectTo: 'head' },
        { tag: 'meta', attrs: { name: 'theme-color', media: '(prefers-color-scheme: dark)', content: styleOf('dark').ground }, injectTo: 'head' },
        { tag: 'meta', attrs: { name: 'offline-worker', content: `./${WORKER_FILE}` }, injectTo: 'head' },
      ],
    },
    // After the last file of the build is written: the worker names them all.
    closeBundle: { order: 'post', sequential: true, handler: () => writeOfflineWorker(folder) },
  };
}
