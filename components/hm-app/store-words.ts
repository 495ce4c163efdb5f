/** What the page says when the browser's storage changes under it. */
export const STORE_WORDS = {
  blocked: 'An older version of this page is open in another tab and holds the projects. Close that tab, and this one goes on.',
  blocking: 'A newer version of this page was opened in another tab. Reload this one to go on saving; what is on it is still here.',
  terminated: 'The browser cut the connection to its storage. Saving is tried again at the next change.',
} as const;
