// `npm run schema`: writes the JSON Schema of the design document from the rows that the reader itself checks.
import { build } from 'esbuild';
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { CACHE, ROOT } from './root.mjs';

const outfile = join(CACHE, 'schema.mjs');
mkdirSync(CACHE, { recursive: true });
await build({ entryPoints: [join(ROOT, 'src/tools/schema-text.ts')], absWorkingDir: ROOT, bundle: true, platform: 'node', format: 'esm', outfile, logLevel: 'error' });
const { schemaText } = await import(pathToFileURL(outfile).href);
writeFileSync(join(ROOT, 'src/design/halfmark-design-1.schema.json'), schemaText());
