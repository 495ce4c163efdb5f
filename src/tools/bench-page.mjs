// The page's part of `npm run bench`: how long a change of one doping takes until the plate is drawn anew, on a stack of five layers.
import { openBrowser } from './browser.mjs';
import { buildIfStale } from './build.mjs';
import { serve } from './serve.mjs';

await buildIfStale();
const { url, close } = await serve(0);
const browser = await openBrowser();
try {
  const page = await browser.newPage();
  await page.setViewport({ width: 1440, height: 900 });
  await page.goto(url, { waitUntil: 'networkidle0' });
  await page.waitForFunction(() => document.querySelector('hm-app')?.shadowRoot?.querySelector('hm-plate')?.shadowRoot?.querySelector('svg path'));
  const times = await page.evaluate(async () => {
    const app = document.querySelector('hm-app');
    const strip = app.shadowRoot.querySelector('hm-strip');
    const plate = app.shadowRoot.querySelector('hm-plate');
    const layer = (name, kind, thickness) => ({ name, material: 'GaAs', thickness, dopants: [{ kind, depth: '5 meV', concentration: '1e17 cm^-3' }] });
    const design = {
      format: 'halfmark-design/1', title: 'bench', conditions: { temperature: '300 K' }, top: { kind: 'barrier', barrier: '0.8 eV' },
      layers: [layer('a', 'donor', '50 nm'), layer('b', 'acceptor', '100 nm'), layer('c', 'donor', '200 nm'), layer('d', 'acceptor', '300 nm'), layer('e', 'donor', '1 um')], bottom: { kind: 'neutral' },
    };
    const frame = () => new Promise((done) => requestAnimationFrame(done));
    /** From the change to the moment when the plate's new picture is in the document. */
    const change = (concentration) => new Promise((done) => {
      const next = structuredClone(design);
      next.layers[2].dopants[0].concentration = concentration;
      const before = plate.result;
      const started = performance.now();
      const watch = () => {
        if (plate.result !== before && plate.result !== null && !plate.stale) void plate.updateComplete.then(() => done(performance.now() - started));
        else channel.port1.postMessage(0);
      };
      const channel = new MessageChannel();
      channel.port2.onmessage = watch;
      strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next, label: 'doping', join: 'bench' } }));
      watch();
    });
    const times = [];
    for (let i = 0; i < 120; i++) {
      const time = await change(`${(1e17 * (1 + i / 40)).toExponential(4)} cm^-3`);
      // The first ones still warm up the engine.
      if (i >= 20) times.push(time);
      await frame();
      await frame();
    }
    return times.sort((a, b) => a - b);
  });
  const at = (share) => times[Math.floor(share * (times.length - 1))];
  const figures = { changes: times.length, median_ms: at(0.5), p95_ms: at(0.95), longest_ms: at(1) };
  console.log(`A change of one doping until the plate is drawn, five layers: median ${at(0.5).toFixed(1)} ms (goal 16), 95 % within ${at(0.95).toFixed(1)} ms (goal 33), longest ${at(1).toFixed(1)} ms`);
  console.log(JSON.stringify({ page: figures }));
} finally {
  await browser.close();
  await close();
}
