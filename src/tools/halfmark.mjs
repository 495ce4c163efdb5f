// `npm run -s halfmark -- ...`: the command line, src/cli/main.ts.
import { runBundled } from './bundled.mjs';

// npm moves to the project's folder; paths a person types count from where they typed them.
if (process.env.npm_lifecycle_event === 'halfmark' && process.env.INIT_CWD) process.chdir(process.env.INIT_CWD);
await runBundled('halfmark', 'src/cli/main.ts', ['src', 'solver', 'presets']);
