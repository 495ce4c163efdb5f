import { defineConfig } from 'vitest/config';

// Apart from vite.config.ts: the tests in Node need nothing of the page's build, and leave *.browser.ts and *.e2e.ts to their own runners.
export default defineConfig({
  // The limit is there for a test that hangs; how fast things are is for `npm run bench` to say, and a busy machine fails nothing.
  test: { include: ['test/**/*.test.{ts,mjs}'], environment: 'node', testTimeout: 120_000 },
});
