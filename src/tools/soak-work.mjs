// The work of a soak: what a person does in an hour, done by the page's own events, and what it leaves behind.

/** Most that a round may leave behind. A leaked result alone is some 0.3 MB an edit; this is noise of the collector. */
export const MOST_A_ROUND = { heap_MB: 0.5, elements: 5, listeners: 5 };

/**
 * @param {import('puppeteer-core').Browser} browser
 * @param {{edits: number, undos: number, starters: number, sweeps: number, exports: number, rounds: number}} asked shared out over the rounds
 */
export async function soak(browser, url, asked) {
  const problems = [];
  const context = await browser.createBrowserContext();
  try {
    const page = await context.newPage();
    page.on('pageerror', (error) => problems.push(`error in the page: ${error.stack ?? error}`));
    page.on('console', (message) => message.type() === 'error' && problems.push(`console error: ${message.text()}`));
    await page.setViewport({ width: 1440, height: 900 });
    await page.goto(url, { waitUntil: 'networkidle0' });
    await page.evaluate(prepare);
    const session = await page.createCDPSession();
    await session.send('HeapProfiler.enable');
    const share = (count) => Math.ceil(count / asked.rounds);
    const rounds = [];
    for (let round = 0; round < asked.rounds; round++) {
      const started = Date.now();
      await page.evaluate(work, { round, edits: share(asked.edits), undos: share(asked.undos), starters: share(asked.starters), sweeps: share(asked.sweeps), exports: share(asked.exports) });
      // Two collections: what the first one's finalisers let go of is free only in the second.
      for (let i = 0; i < 2; i++) await session.send('HeapProfiler.collectGarbage');
      const { metrics } = await session.send('Performance.enable').then(() => session.send('Performance.getMetrics'));
      const metric = (name) => metrics.find((m) => m.name === name).value;
      rounds.push({ heap_MB: metric('JSHeapUsedSize') / 1e6, elements: metric('Nodes'), listeners: metric('JSEventListeners'), seconds: (Date.now() - started) / 1000 });
    }
    const [from, to] = [rounds[1] ?? rounds[0], rounds.at(-1)];
    const between = Math.max(1, rounds.length - 2);
    const growth = Object.fromEntries(Object.keys(MOST_A_ROUND).map((key) => [key, (to[key] - from[key]) / between]));
    for (const [key, most] of Object.entries(MOST_A_ROUND)) if (growth[key] > most) problems.push(`${key} grows by ${growth[key].toFixed(2)} a round; at most ${most}`);
    problems.push(...(await page.evaluate(() => window.soakProblems)));
    return { rounds, problems, growth };
  } finally {
    await context.close();
  }
}

/** Runs in the page: catches what would leave it. */
function prepare() {
  window.soakProblems = [];
  addEventListener('unhandledrejection', (event) => window.soakProblems.push(`unhandled: ${event.reason}`));
  window.soakFiles = 0;
  Object.defineProperty(window, 'showSaveFilePicker', { value: undefined });
  HTMLAnchorElement.prototype.click = function () {
    window.soakFiles++;
    URL.revokeObjectURL(this.href);
  };
}

/** Runs in the page: one round. */
async function work({ round, edits, undos, starters, sweeps, exports }) {
  const app = document.querySelector('hm-app').shadowRoot;
  const part = (name) => app.querySelector(name);
  const until = async (what, holds) => {
    for (const end = performance.now() + 20_000; !holds(); ) {
      if (performance.now() > end) throw new Error(`never came about: ${what}`);
      await new Promise((done) => setTimeout(done, 10));
    }
  };
  const solved = () => part('hm-messages').findings.status === 'complete';
  const tell = (from, name, detail) => from.dispatchEvent(new CustomEvent(name, { detail, bubbles: true, composed: true }));
  await until('a solved design', () => part('hm-strip') !== null && solved());

  tell(part('hm-conditions'), 'hm-act', { act: 'starters' });
  await until('the shelf', () => (part('hm-starters').starters?.length ?? 0) > 0);
  part('hm-starters').renderRoot.querySelector('hm-dialog').close();
  const shelf = part('hm-starters').starters.map(({ id }) => id);
  const openStarter = async (number) => {
    const before = part('hm-projects').openId;
    tell(part('hm-starters'), 'hm-starter', { id: shelf[number % shelf.length] });
    await until('another project', () => part('hm-projects').openId !== before && part('hm-projects').openId !== null);
    await until('its result', solved);
  };
  for (let i = 0; i < starters; i++) await openStarter(round * starters + i);
  // The same design at the end of every round: what is counted must be comparable.
  await openStarter(0);

  for (let i = 0; i < edits; i++) {
    const { design } = part('hm-strip');
    const layers = design.layers.map((layer, l) => (l === 0 ? { ...layer, thickness: `${200 + ((round * 37 + i * 7) % 100)} nm` } : layer));
    tell(part('hm-strip'), 'hm-edit', { next: { ...design, layers }, label: 'thickness' });
    // Some edits come faster than answers, as in a drag.
    if (i % 5 !== 0) await until('an answer', solved);
    tell(part('hm-plate'), 'hm-depth', { depth_nm: (i * 13) % 200 });
    await new Promise((done) => requestAnimationFrame(done));
  }
  await until('the last answer', solved);
  for (let i = 0; i < undos; i++) {
    tell(part('hm-conditions'), 'hm-act', { act: 'undo' });
    if (i % 3 === 0) tell(part('hm-conditions'), 'hm-act', { act: 'redo' });
    await until('an answer', solved);
  }

  const desk = part('hm-desk');
  const openTab = (words) => [...desk.renderRoot.querySelectorAll('[role=tab]')].find((tab) => tab.textContent.trim().startsWith(words)).click();
  openTab('Sweeps');
  await until('the panel of sweeps', () => (desk.renderRoot.querySelector('hm-sweeps')?.renderRoot?.childElementCount ?? 0) > 0);
  const swept = desk.renderRoot.querySelector('hm-sweeps');
  for (let i = 0; i < sweeps; i++) {
    const run = () => [...swept.renderRoot.querySelectorAll('button')].find((button) => button.textContent.trim() === 'Run the sweep');
    await until('a sweep that can be run', () => run() !== undefined && !run().disabled);
    const rows = swept.renderRoot.querySelector('tbody');
    run().click();
    await until('its figures', () => !run().disabled && swept.renderRoot.querySelector('progress') === null && swept.renderRoot.querySelectorAll('tbody tr').length > 5 && (i === 0 || rows !== null));
  }
  openTab('Ledger');

  tell(part('hm-conditions'), 'hm-act', { act: 'leave' });
  const leave = part('hm-leave');
  await leave.updateComplete;
  for (let i = 0; i < exports; i++) {
    await until('something to take away', () => !leave.stale && leave.result !== null);
    await leave.updateComplete;
    const kinds = ['SVG', 'PNG', 'Profiles', 'Ledger', 'Design file'];
    const before = window.soakFiles;
    [...leave.renderRoot.querySelectorAll('button')].find((button) => button.textContent.trim().startsWith(kinds[i % kinds.length])).click();
    await until('a file', () => window.soakFiles > before);
  }
  leave.renderRoot.querySelector('hm-dialog').close();
  for (const what of ['projects', 'about']) {
    tell(part('hm-conditions'), 'hm-act', { act: what });
    await until(`the dialog of ${what}`, () => part(`hm-${what}`).renderRoot.querySelector('hm-dialog').open);
    part(`hm-${what}`).renderRoot.querySelector('hm-dialog').close();
  }
  // The list of projects is part of what is counted: it goes down to one again.
  tell(part('hm-conditions'), 'hm-act', { act: 'projects' });
  await until('the list', () => part('hm-projects').entries.length > 1);
  part('hm-projects').renderRoot.querySelector('hm-dialog').close();
  const { openId } = part('hm-projects');
  for (const { id } of part('hm-projects').entries.filter((entry) => entry.id !== openId)) {
    tell(part('hm-projects'), 'hm-project', { act: 'bin', id });
    await until('the bin', () => part('hm-projects').entries.find((entry) => entry.id === id)?.binned !== null);
    tell(part('hm-projects'), 'hm-project', { act: 'delete', id });
    await until('its end', () => part('hm-projects').entries.every((entry) => entry.id !== id));
  }
  await until('all saved', () => part('hm-conditions').saving.kind === 'saved');
  // Remarks leave after some seconds; the judging of requirements comes to its end.
  await new Promise((done) => setTimeout(done, 300));
}
