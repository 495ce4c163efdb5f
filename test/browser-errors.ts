/**
 * Part of every test in a browser: fails a file whose code throws outside its tests, also shortly after the last of them. The runner on its own
 * would report such a file as passed.
 */
const errors: string[] = [];
window.addEventListener('error', (event) => errors.push(event.message));
window.addEventListener('unhandledrejection', (event) => errors.push(String(event.reason)));

/** How long to wait for late errors, ms: longer than any timer the page uses for a single step. */
const GRACE = 100;

after(async () => {
  await new Promise((done) => setTimeout(done, GRACE));
  if (errors.length > 0) throw new Error(`thrown outside any test: ${errors.join('; ')}`);
});
