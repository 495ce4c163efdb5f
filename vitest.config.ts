import { defineConfig } from 'vitest/config';

// Apart from vite.config.ts: the tests in Node need nothing of the page's build, and leave *.browser.ts and *.e2e.ts to their own runners.
export default defineConfig({
  test: { include: ['test/**/*.test.{ts,mjs}'], environment: 'node' },
});
