// `npm start`: installs what is missing, builds the page if it is missing or old, and serves it.
import { installMissing } from './install.mjs';
import { buildIfStale } from './build.mjs';
import { serve } from './serve.mjs';

installMissing();
await buildIfStale();
const { url } = await serve(4173);
console.log(`Halfmark is at ${url}  (Ctrl+C ends it)`);
