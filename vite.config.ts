import { defineConfig, type Plugin } from 'vite';
import { offlinePage } from './src/tools/offline-page.ts';
import { PAGE_POLICY } from './src/tools/policy.mjs';

/** Puts the content security policy into the built page, so that it holds on any server. Not in development, where vite adds scripts of its own. */
function contentSecurityPolicy(): Plugin {
  return {
    name: 'content-security-policy',
    apply: 'build',
    transformIndexHtml: (html) =>
      /http-equiv=["']?content-security-policy/i.test(html)
        ? html
        : { html, tags: [{ tag: 'meta', attrs: { 'http-equiv': 'Content-Security-Policy', content: PAGE_POLICY }, injectTo: 'head-prepend' }] },
  };
}

export default defineConfig({
  // Relative addresses: the built page runs from any folder of any server.
  base: './',
  plugins: [contentSecurityPolicy(), offlinePage()],
  worker: { format: 'es' },
  // The manifest is what src/tools/size.mjs reads. The warning about single chunks is off: what counts is the first load, and size.mjs limits that.
  build: { outDir: 'dist', target: 'es2022', sourcemap: false, manifest: true, assetsInlineLimit: 0, chunkSizeWarningLimit: 5000, rolldownOptions: { checks: { pluginTimings: false } } },
});
