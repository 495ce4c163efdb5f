import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { APPEARANCES, bring, breaches, overflow, show, smallTargets } from './accessible.ts';
import { scenario } from './harness.ts';
import { at, press, until, untilSolved, type Path } from './inside.ts';

const DESK: Path = ['hm-app', 'hm-desk'];
const STRIP: Path = ['hm-app', 'hm-strip'];
const MESSAGES: Path = ['hm-app', 'hm-messages'];

/** Fires an event of the page's own from an element, as a press there does. */
const tell = (page: Page, from: Path, name: string, detail: unknown): Promise<null | void> =>
  at(page, from, (element, [type, given]) => void element.dispatchEvent(new CustomEvent(type as string, { bubbles: true, composed: true, detail: given })), [name, detail] as const);
const act = (page: Page, what: string): Promise<null | void> => tell(page, ['hm-app', 'hm-conditions'], 'hm-act', { act: what });
/** Properties of an element for a state that cannot be brought about at will; the page sets them back at its next change. */
const set = (page: Page, path: Path, values: Record<string, unknown>): Promise<null | void> =>
  at(page, path, async (element, given) => {
    Object.assign(element, given);
    await (element as HTMLElement & { updateComplete: Promise<unknown> }).updateComplete;
  }, values);
const edit = (page: Page, change: Record<string, unknown>): Promise<null | void> =>
  at(page, STRIP, (strip, given) => {
    const { design } = strip as unknown as { design: object };
    strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next: { ...design, ...given }, label: 'a change' } }));
  }, change);
const count = async (page: Page, path: Path, selector: string): Promise<number> => (await at(page, path, (element, what) => (element.shadowRoot ?? element).querySelectorAll(what).length, selector)) ?? 0;
const unfold = (page: Page, path: Path): Promise<null | void> =>
  at(page, path, async (element) => {
    for (const details of element.shadowRoot!.querySelectorAll('details')) details.open = true;
    await new Promise((done) => setTimeout(done, 60));
  });
async function panel(page: Page, title: string, tag: string): Promise<Path> {
  await at(page, DESK, (desk, words) => [...desk.shadowRoot!.querySelectorAll<HTMLElement>('[role=tab]')].find((tab) => tab.textContent!.trim().startsWith(words))!.click(), title);
  const path = [...DESK, tag];
  await until(`the panel ${title}`, async () => (await at(page, path, (element) => element.shadowRoot!.childElementCount > 0)) === true);
  return path;
}
/** Shows a dialog of the page by the element that it is in. */
const showDialog = (page: Page, path: Path): Promise<null | void> => at(page, path, (element) => (element as HTMLElement & { show(): Promise<void> | void }).show());
const shut = (page: Page): Promise<void> => page.keyboard.press('Escape');

interface State {
  name: string;
  /** brings it about. @returns where to look; nothing: the whole page, or the dialog that is open */
  bring(page: Page): Promise<Path | void>;
  /** back to where the next one begins */ leave?(page: Page): Promise<unknown>;
}

const metal = { kind: 'barrier', metal: 'Al', imageForce: true };

/** Everything that a person may meet beside the page at rest: what the page says and its forms; the results of the desk; dialogs and what is still empty. */
const SAID: State[] = [
  { name: 'an input that cannot be read', async bring(page) {
    await edit(page, { conditions: { temperature: '300 parsec', temperatureRange: ['-40 degC', '125 degC'] } });
    await until('the complaint', async () => (await count(page, MESSAGES, '.trouble')) > 0);
  }, leave: async (page) => { await act(page, 'undo'); await untilSolved(page); } },
  { name: 'no accepted answer', async bring(page) {
    await set(page, MESSAGES, { findings: { status: 'complete', result: null, stale: false, complaints: [], refusal: 'the mesh error stays above what is asked' } });
    return MESSAGES;
  } },
  { name: 'a long solve', async bring(page) {
    await set(page, MESSAGES, { findings: { status: 'pending', result: null, stale: false, complaints: [], refusal: null }, long: true });
    return MESSAGES;
  } },
  { name: 'a save that failed', async bring(page) {
    await set(page, MESSAGES, { saving: { kind: 'failed', failure: { code: 'full', sentence: 'There is no room left in this browser.' } } });
    return MESSAGES;
  } },
  { name: 'a project changed in another tab', async bring(page) {
    await set(page, MESSAGES, { saving: { kind: 'conflict', other: {} }, remark: { text: 'Something urgent.', urgent: true } });
    return MESSAGES;
  } },
  { name: 'a project deleted in another tab', async bring(page) {
    await set(page, MESSAGES, { saving: { kind: 'conflict', other: null } });
    return MESSAGES;
  } },
  { name: 'cautions', async bring(page) {
    await set(page, MESSAGES, { saving: { kind: 'saved' }, remark: null });
    await edit(page, {});
    await untilSolved(page);
    await unfold(page, MESSAGES);
    return MESSAGES;
  } },
  ...(['layer', 'interface', 'contact'] as const).map((kind): State => ({ name: `the form of a ${kind}`, async bring(page) {
    await tell(page, STRIP, 'hm-choose', { kind, index: 0 });
    await until('the form', async () => (await count(page, STRIP, `hm-${kind}-form`)) > 0);
    return STRIP;
  } })),
  { name: 'the form of a pinned surface', async bring(page) {
    await edit(page, { top: { kind: 'pinned', level: '0.6 eV' } });
    return STRIP;
  } },
  { name: 'the form of an open surface', async bring(page) {
    await edit(page, { top: { kind: 'open', sheetCharge: '1e12 cm^-2' } });
    return STRIP;
  }, leave: async (page) => { await edit(page, { top: metal }); await untilSolved(page); } },
  { name: 'the plate as a table', async bring(page) {
    await press(page, ['hm-app', 'hm-plate'], 'data table');
    await until('the table', async () => (await count(page, ['hm-app', 'hm-plate'], 'table')) > 0);
    return ['hm-app', 'hm-plate'];
  } },
  { name: 'the dimension lines', async bring(page) {
    await press(page, ['hm-app', 'hm-plate'], 'dimensions');
    return ['hm-app', 'hm-plate'];
  }, leave: (page) => shut(page) },
  { name: 'the rail as a table', async bring(page) {
    await unfold(page, ['hm-app', 'hm-rail']);
    return ['hm-app', 'hm-rail'];
  } },
  { name: 'light or dark', async bring(page) {
    await press(page, ['hm-app', 'hm-conditions'], 'View');
    return ['hm-app', 'hm-conditions'];
  }, leave: (page) => shut(page) },
];
const RESULTS: State[] = [
  { name: 'verdicts', async bring(page) {
    const path = await panel(page, 'Requirements', 'hm-requirements');
    await until('a verdict', async () => (await count(page, path, '.verdict')) > 0);
    return path;
  } },
  { name: 'a size found', async bring(page) {
    const path = await panel(page, 'Sizing', 'hm-sizing');
    await press(page, path, 'Find the values');
    await until('what was found', async () => (await count(page, path, 'table')) > 0, 40_000);
    await unfold(page, path);
    return path;
  } },
  { name: 'contacts from near', async bring(page) {
    const path = await panel(page, 'Contacts', 'hm-contacts');
    await until('a picture', async () => (await count(page, path, 'svg.picture')) > 0);
    await unfold(page, path);
    return path;
  } },
];
const LONG_RESULTS: State[] = [
  { name: 'metals ranked', async bring(page) {
    await panel(page, 'Contacts', 'hm-contacts');
    const path = [...DESK, 'hm-contacts', 'hm-metals'];
    await until('the panel of metals', async () => (await count(page, path, 'button')) > 0);
    await press(page, path, 'Rank the metals');
    await until('the ranking', async () => (await count(page, path, 'tbody tr')) > 5 && (await count(page, path, 'progress')) === 0, 40_000);
    return path;
  } },
  { name: 'a sweep as curves', async bring(page) {
    const path = await panel(page, 'Sweeps', 'hm-sweeps');
    await press(page, path, 'Run the sweep');
    await until('the sweep', async () => (await count(page, path, 'tbody tr')) > 5 && (await count(page, path, 'progress')) === 0);
    await unfold(page, path);
    return path;
  } },
];
const MAPS_OF_SWEEPS: State[] = [
  { name: 'a sweep as a map', async bring(page) {
    const path = await panel(page, 'Sweeps', 'hm-sweeps');
    await press(page, path, 'Sweep a second quantity');
    // Few points: what is looked at is how they are shown, and the checks go through every cell of their table.
    await at(page, path, (element) => {
      const { view } = element as unknown as { view: { second: object } };
      element.dispatchEvent(new CustomEvent('hm-view', { bubbles: true, composed: true, detail: { change: { sweeps: { ...view, second: { ...view.second, points: '5' } } } } }));
    });
    await new Promise((done) => setTimeout(done, 100));
    await press(page, path, 'Run the sweep');
    await until('the map', async () => (await count(page, path, 'tbody tr')) > 100 && (await count(page, path, 'progress')) === 0, 40_000);
    return path;
  } },
  { name: 'a film', async bring(page) {
    const path: Path = [...DESK, 'hm-sweeps', 'hm-film'];
    await press(page, path, 'Make the film');
    await until('the film', async () => (await count(page, path, 'tbody tr')) > 5 && (await count(page, path, 'progress')) === 0);
    await unfold(page, path);
    return path;
  } },
];
const MORE_RESULTS: State[] = [
  { name: 'a regime map', async bring(page) {
    const path = await panel(page, 'Regime map', 'hm-map');
    await until('the map', async () => (await count(page, path, 'table')) > 0);
    await unfold(page, path);
    return path;
  } },
  { name: 'variations on their way', async bring(page) {
    const path = await panel(page, 'Tolerances', 'hm-tolerances');
    await press(page, path, 'Draw the variations');
    await until('progress', async () => (await count(page, path, 'progress')) > 0);
    return path;
  } },
  { name: 'spreads', async bring(page) {
    const path: Path = [...DESK, 'hm-tolerances'];
    await at(page, path, (element) => [...element.shadowRoot!.querySelectorAll('button')].find((button) => button.textContent!.trim() === 'Stop')?.click());
    await until('an end', async () => (await count(page, path, 'progress')) === 0);
    await tell(page, path, 'hm-view', { change: { tolerances: { count: '60' } } });
    await press(page, path, 'Draw the variations');
    await until('the spreads', async () => (await count(page, path, 'svg.picture')) > 0 && (await count(page, path, 'progress')) === 0, 40_000);
    await unfold(page, path);
    return path;
  } },
  { name: 'two variants', async bring(page) {
    const path = await panel(page, 'Variants', 'hm-variants');
    await press(page, path, 'Copy what is on the page');
    await until('the copy', async () => (await count(page, path, 'button.to')) > 0);
    return path;
  } },
  { name: 'an entry of one’s own', async bring(page) {
    const path = await panel(page, 'Parameters', 'hm-parameters');
    await unfold(page, path);
    await at(page, path, (element) => element.shadowRoot!.querySelector<HTMLButtonElement>('button[data-path]')!.click());
    await until('the form of a value', async () => (await count(page, path, 'hm-value-form')) > 0);
    return path;
  } },
  { name: 'workings', async bring(page) {
    await panel(page, 'Ledger', 'hm-ledger');
    await tell(page, [...DESK, 'hm-ledger'], 'hm-view', { change: { workings: { table: 'layers', index: 0, column: 'ec_minus_ef' } } });
    await at(page, [...DESK, 'hm-ledger'], (ledger) => ledger.shadowRoot!.querySelector<HTMLElement>('td button, td [role=button], button.plain')?.click());
    await until('the workings', async () => (await count(page, ['hm-app'], 'hm-workings')) > 0);
    await new Promise((done) => setTimeout(done, 200));
  }, leave: (page) => shut(page) },
];
const DIALOGS: State[] = [
  { name: 'the review sheet', async bring(page) {
    await act(page, 'sheet');
    await until('its picture', async () => (await count(page, ['hm-app', 'hm-sheet'], 'img')) > 0);
  }, leave: (page) => shut(page) },
  { name: 'worked designs on their way', async bring(page) {
    await showDialog(page, ['hm-app', 'hm-starters']);
    await set(page, ['hm-app', 'hm-starters'], { starters: null });
  }, leave: (page) => shut(page) },
  { name: 'the bin and what was set aside', async bring(page) {
    await act(page, 'projects');
    const entry = { name: 'former', created: 1e12, changed: 1.7e12, binned: 1.71e12 };
    await set(page, ['hm-app', 'hm-projects'], { entries: [{ ...entry, id: 'a', name: 'here', binned: null }, { ...entry, id: 'b' }], damaged: [{ key: 1, found: 1.7e12, why: 'its design is cut short or garbled', text: '{' }], remark: 'It is in the bin, and can be taken out again.', sure: 'b' });
  }, leave: (page) => shut(page) },
  { name: 'nothing saved and another one asked for', async bring(page) {
    await showDialog(page, ['hm-app', '#unsaved']);
  }, leave: (page) => shut(page) },
  { name: 'help', async bring(page) {
    await act(page, 'help');
    await until('a page of the help', async () => (await at(page, ['hm-app', 'hm-help-door', 'hm-help', 'article'], (article) => article.textContent!.length > 200)) === true);
  }, leave: (page) => shut(page) },
  { name: 'a new project, of which nothing is known yet', async bring(page) {
    await tell(page, ['hm-app', 'hm-projects'], 'hm-project', { act: 'new' });
    await until('the new project', async () => (await at(page, STRIP, (strip) => (strip as unknown as { design: { title: string } }).design.title)) === 'untitled');
    await untilSolved(page);
  } },
  ...([['Requirements', 'hm-requirements'], ['Sizing', 'hm-sizing'], ['Contacts', 'hm-contacts'], ['Variants', 'hm-variants']] as const).map(([title, tag]): State => ({ name: `${title}, empty`, bring: (page) => panel(page, title, tag) })),
  { name: 'a take-away without a result', async bring(page) {
    await edit(page, { conditions: { temperature: '300 parsec' } });
    await act(page, 'leave');
  }, leave: (page) => shut(page) },
];

/** Drawings that say nothing to those who do not see them, or have no figures to read beside them. */
function muteDrawings(page: Page, where: string): Promise<string[]> {
  return page.evaluate((place) => {
    const { everyone } = window as unknown as { everyone: { all(selector: string): HTMLElement[]; named(element: Element): string } };
    return everyone
      .all('svg')
      .filter((drawing) => drawing.getAttribute('aria-hidden') !== 'true' && drawing.closest('[aria-hidden=true]') === null && drawing.getBoundingClientRect().width > 0)
      .flatMap((drawing) => {
        const root = drawing.getRootNode() as ShadowRoot;
        const words = `${drawing.getAttribute('aria-label') ?? ''} ${root.querySelector(`#${drawing.getAttribute('aria-describedby') ?? 'none'}`)?.textContent ?? ''} ${root.querySelector('#summary')?.textContent ?? ''}`;
        const lacking = [...(drawing.getAttribute('role') === 'img' && words.trim().length > 40 ? [] : ['no summary in words']), ...(root.querySelector('table') === null && ![...root.querySelectorAll('summary, button')].some((door) => /table/.test(door.textContent!)) ? ['no table of its figures'] : [])];
        return lacking.map((what) => `${place}: ${what}: ${everyone.named(drawing)}`);
      });
  }, where);
}

const PARTS: [what: string, states: readonly State[]][] = [
  ['what the page says, and each of its forms,', SAID],
  ['verdicts, sizes and contacts,', RESULTS],
  ['rankings and sweeps,', LONG_RESULTS],
  ['maps of sweeps and films,', MAPS_OF_SWEEPS],
  ['regime maps, spreads, variants, parameters and workings,', MORE_RESULTS],
  ['dialogs, and what is still empty,', DIALOGS],
];

for (const [look, appearance] of APPEARANCES) {
  for (const [what, states] of PARTS) {
    scenario(`With words and a table for each drawing, all accessible: ${what} ${look}`, async ({ page, open }) => {
      await show(page, appearance);
      await open();
      await untilSolved(page);
      await bring(page);
      const found: string[] = [];
      for (const state of states) {
        const within = (await state.bring(page)) ?? [];
        found.push(...(await breaches(page, state.name, within)), ...(await smallTargets(page, state.name, within)), ...(await muteDrawings(page, state.name)));
        const wide = await overflow(page);
        if (wide > 0) found.push(`${state.name}: the page is ${wide} px wider than its window`);
        const moving = await page.evaluate(() => document.getAnimations().filter(({ playState }) => playState === 'running').length);
        if (moving > 0) found.push(`${state.name}: ${moving} things move although less motion is asked for`);
        await state.leave?.(page);
      }
      assert.deepEqual([...new Set(found)], []);
    });
  }
}
