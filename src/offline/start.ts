import { OfflineCopy } from './register.ts';

/** The one of this page. Keeping begins when the page has loaded: what the person waits for comes first. */
export const offlineCopy = new OfflineCopy();
if (document.readyState === 'complete') void offlineCopy.start();
else addEventListener('load', () => void offlineCopy.start(), { once: true });
