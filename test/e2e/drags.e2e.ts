import assert from 'node:assert/strict';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, press, until, untilSolved, type Path } from './inside.ts';

const APP: Path = ['hm-app'];
const STRIP: Path = [...APP, 'hm-strip'];
const PLATE: Path = [...APP, 'hm-plate'];
const DESK: Path = [...APP, 'hm-desk'];
const SWEEPS: Path = [...DESK, 'hm-sweeps'];
const FILM: Path = [...SWEEPS, 'hm-film'];
const MAP: Path = [...DESK, 'hm-map'];
const VARIABLES: Path = [...APP, 'hm-variables'];

type Point = [x: number, y: number];
/** A point of an element, as shares of its width and height. */
async function place(page: Page, path: Path, across = 0.5, down = 0.5): Promise<Point> {
  const found = await at(page, path, (element, [x, y]) => {
    element.scrollIntoView({ block: 'center' });
    const box = element.getBoundingClientRect();
    return [box.left + box.width * x, box.top + box.height * y] as [number, number];
  }, [across, down] as const);
  assert.ok(found !== null, `there is no ${path.join(' ')}`);
  return found!;
}
async function drag(page: Page, [x, y]: Point, dx: number, dy = 0): Promise<void> {
  await page.mouse.move(x, y);
  await page.mouse.down();
  for (let i = 1; i <= 8; i++) await page.mouse.move(x + (dx * i) / 8, y + (dy * i) / 8);
  await page.mouse.up();
}
const click = async (page: Page, path: Path, across = 0.5, down = 0.5): Promise<void> => page.mouse.click(...(await place(page, path, across, down)));
async function keys(page: Page, path: Path, ...names: string[]): Promise<void> {
  await at(page, path, (element) => element.focus());
  for (const name of names) {
    const [key, ...held] = name.split('+').reverse() as Parameters<Page['keyboard']['press']>[0][];
    for (const other of held) await page.keyboard.down(other);
    await page.keyboard.press(key);
    for (const other of held) await page.keyboard.up(other);
  }
}
/** Opens the field of an element by a click, and types into it. */
async function type(page: Page, path: Path, text: string): Promise<void> {
  await click(page, [...path, 'input']);
  await page.keyboard.down('Control');
  await page.keyboard.press('KeyA');
  await page.keyboard.up('Control');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
}
async function panel(page: Page, title: string, tag: string): Promise<void> {
  await at(page, DESK, (desk, words) => [...desk.shadowRoot!.querySelectorAll<HTMLElement>('[role=tab]')].find((tab) => tab.textContent!.trim().startsWith(words))!.click(), title);
  await until(`the panel ${title}`, async () => (await at(page, [...DESK, tag], (element) => element.shadowRoot!.childElementCount > 0)) === true);
}
const property = (page: Page, path: Path, name: string): Promise<string | null> => at(page, path, (element, key) => JSON.stringify((element as unknown as Record<string, unknown>)[key as string] ?? null), name);
const view = async (page: Page, name: string): Promise<string> => JSON.stringify((JSON.parse((await property(page, PLATE, 'view'))!) as Record<string, unknown>)[name] ?? null);
const said = (path: Path) => async (page: Page): Promise<string> => (await at(page, [...path, '.surface'], (element) => element.getAttribute('aria-valuetext') ?? '')) ?? '';
interface Stack {
  layers: { name: string; thickness: string }[];
  variables?: { value: string }[];
}
const stack = async (page: Page): Promise<Stack> => JSON.parse((await property(page, STRIP, 'design'))!) as Stack;
/** The design as it was, so that each way begins at the same place. */
const put = (page: Page, design: string): Promise<null | void> =>
  at(page, STRIP, (strip, next) => void strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next: JSON.parse(next), label: 'as it was' } })), design);
const thickness = async (page: Page): Promise<string> => (await stack(page)).layers[0].thickness;
const order = async (page: Page): Promise<string> => (await stack(page)).layers.map(({ name }) => name).join();
const value = async (page: Page): Promise<string> => (await stack(page)).variables![0].value;
const toPlate = (page: Page): Promise<string> => at(page, FILM, (film) => film.shadowRoot!.querySelector('.surface')!.getAttribute('aria-valuetext')!) as Promise<string>;

interface Drag {
  what: string;
  /** sources that listen to it */ files: string[];
  /** what it changes, as text */ state(page: Page): Promise<string>;
  /** before any of the ways */ ready?(page: Page): Promise<unknown>;
  drag(page: Page): Promise<unknown>;
  /** each of them comes to a change of the same kind */ instead: Record<string, (page: Page) => Promise<unknown>>;
}

const COLUMN = '[data-layer="0"]';

/** Every drag of the page, with what does the same without one. */
const DRAGS: Drag[] = [
  {
    what: 'the edge of a layer on the strip', files: ['hm-strip/strip-pointer.ts', 'hm-strip/hm-strip.ts'], state: thickness,
    drag: async (page) => drag(page, await place(page, [...STRIP, '.edge']), 40),
    instead: {
      'its value pressed and typed': async (page) => {
        await click(page, [...STRIP, `${COLUMN} [data-value=thickness], [data-value=thickness]`]);
        await until('a field in place', async () => (await at(page, [...STRIP, '.inplace hm-field', 'input'], () => true)) === true);
        await type(page, [...STRIP, '.inplace hm-field'], '123 nm');
      },
      'a bracket on its column': (page) => keys(page, [...STRIP, COLUMN], ']'),
    },
  },
  {
    what: 'a column of the strip', files: ['hm-strip/strip-pointer.ts', 'hm-strip/hm-strip.ts'], state: order,
    drag: async (page) => {
      const [from, to] = [await place(page, [...STRIP, COLUMN], 0.5, 0.9), await place(page, [...STRIP, '[data-layer="1"]'], 0.8, 0.9)];
      await drag(page, from, to[0] - from[0]);
    },
    instead: {
      'Alt and an arrow': (page) => keys(page, [...STRIP, COLUMN], 'Alt+ArrowRight'),
      'a button of its form': async (page) => {
        await click(page, [...STRIP, COLUMN], 0.5, 0.9);
        await until('its form', async () => (await at(page, [...STRIP, '.acts'], () => true)) === true);
        await press(page, STRIP, 'Move down');
      },
    },
  },
  {
    what: 'the reading of the plate', files: ['hm-plate/hm-plate.ts'], state: (page) => said(PLATE)(page),
    drag: async (page) => drag(page, await place(page, [...PLATE, '.surface'], 0.4, 0.5), 60),
    instead: {
      'a click': (page) => click(page, [...PLATE, '.surface'], 0.7, 0.4),
      'the arrows': (page) => keys(page, [...PLATE, '.surface'], 'ArrowRight', 'ArrowRight'),
    },
  },
  {
    what: 'the part of the depth in view', files: ['hm-plate/hm-plate.ts'], state: (page) => view(page, 'window'),
    ready: async (page) => {
      await at(page, [...PLATE, '[aria-label=nearer]'], (button) => button.click());
      await until('a part in view', async () => (await view(page, 'window')) !== 'null');
    },
    drag: async (page) => {
      // On the axis below the picture, where no figure of a dimension line lies.
      const from = await place(page, [...PLATE, '.surface'], 0.5, 0.97);
      await drag(page, from, -60);
      await drag(page, from, 30);
    },
    instead: {
      'Alt and an arrow': (page) => keys(page, [...PLATE, '.surface'], 'Alt+ArrowLeft'),
      'the buttons, on what is chosen in the strip': async (page) => {
        await at(page, [...PLATE, '.surface'], (surface) => surface.blur());
        await press(page, PLATE, 'all');
        await until('the whole', async () => (await view(page, 'window')) === 'null');
        await at(page, [...PLATE, '[aria-label=nearer]'], (button) => button.click());
      },
    },
  },
  {
    what: 'a dimension line of the plate', files: ['hm-plate/hm-plate.ts'], state: (page) => view(page, 'moved'),
    ready: async (page) => {
      await at(page, [...PLATE, '[aria-label=farther]'], (button) => button.parentElement!.querySelector<HTMLButtonElement>('button:last-of-type')!.click());
      await until('the whole', async () => (await view(page, 'window')) === 'null');
    },
    drag: async (page) => {
      const figure = await at(page, PLATE, (plate) => {
        const { dimensions } = (plate as unknown as { plate: { dimensions: { box: { x: number; y: number; w: number; h: number } | null; hidden: boolean }[] } | null }).plate ?? { dimensions: [] };
        const { box } = dimensions.find((line) => line.box && !line.hidden)!;
        const surface = plate.shadowRoot!.querySelector('.surface')!.getBoundingClientRect();
        return [surface.left + box!.x + box!.w / 2, surface.top + box!.y + box!.h / 2] as [number, number];
      });
      await drag(page, figure!, 24, 10);
    },
    instead: {
      'the buttons of the list': async (page) => {
        if ((await at(page, [...PLATE, '.dimensions'], () => true)) === null) await press(page, PLATE, 'dimensions');
        await until('the list', async () => (await at(page, [...PLATE, '.moves button'], () => true)) === true);
        await click(page, [...PLATE, '.moves button[aria-label=down]']);
      },
    },
  },
  {
    what: 'the slider of a variable', files: ['hm-variables/hm-variables.ts'], state: value,
    drag: async (page) => drag(page, await place(page, [...VARIABLES, '[type=range]']), 30),
    instead: {
      'the arrows': (page) => keys(page, [...VARIABLES, '[type=range]'], 'ArrowLeft', 'ArrowLeft'),
      'a click': (page) => click(page, [...VARIABLES, '[type=range]'], 0.85, 0.5),
      'a value typed': (page) => type(page, [...VARIABLES, 'hm-field.value'], '77 nm'),
    },
  },
  {
    what: 'the point of a sweep', files: ['hm-sweeps/hm-sweeps.ts'], state: said(SWEEPS),
    ready: async (page) => {
      await panel(page, 'Sweeps', 'hm-sweeps');
      await press(page, SWEEPS, 'Run the sweep');
      await until('the sweep', async () => (await at(page, [...SWEEPS, '.surface'], () => true)) === true && (await at(page, [...SWEEPS, 'progress'], () => true)) === null);
    },
    drag: async (page) => {
      // It follows the pointer without a button: nothing has to be held.
      const [x, y] = await place(page, [...SWEEPS, '.surface'], 0.4, 0.5);
      await page.mouse.move(x, y);
      await page.mouse.move(x + 90, y, { steps: 6 });
    },
    instead: { 'the arrows': (page) => keys(page, [...SWEEPS, '.surface'], 'Home', 'ArrowRight') },
  },
  {
    what: 'the frame of a film', files: ['hm-sweeps/hm-film.ts'], state: toPlate,
    ready: async (page) => {
      await press(page, FILM, 'Make the film');
      await until('the film', async () => (await at(page, [...FILM, 'tbody tr:nth-child(6)'], () => true)) === true && (await at(page, [...FILM, 'progress'], () => true)) === null, 40_000);
    },
    drag: async (page) => drag(page, await place(page, [...FILM, '.surface'], 0.2, 0.5), 200),
    instead: {
      'a click': (page) => click(page, [...FILM, '.surface'], 0.85, 0.5),
      'the buttons': (page) => press(page, FILM, 'Colder'),
      'the arrows': (page) => keys(page, [...FILM, '.surface'], 'Home', 'ArrowRight'),
    },
  },
  {
    what: 'the point of the regime map', files: ['hm-map/hm-map.ts'], state: said(MAP),
    ready: async (page) => {
      await panel(page, 'Regime map', 'hm-map');
      await until('the map', async () => (await at(page, [...MAP, '.surface'], () => true)) === true);
    },
    drag: async (page) => drag(page, await place(page, [...MAP, '.surface'], 0.4, 0.5), 80),
    instead: {
      'a click': (page) => click(page, [...MAP, '.surface'], 0.7, 0.3),
      'the arrows': (page) => keys(page, [...MAP, '.surface'], 'ArrowUp', 'ArrowUp'),
    },
  },
];
/** Listens to the pointer, and nothing is dragged there: it only notes that one is at work. Files are dropped on the page, and chosen there by a button as well. */
const NO_DRAG = ['hm-app/offline-controller.ts', 'hm-app/incoming.ts'];

const FOLDER = 'components';
const listening = (): string[] =>
  readdirSync(FOLDER, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts') && /setPointerCapture|pointerdown|mousedown|touchstart|type="range"|draggable|dragstart|addEventListener\('drop'/.test(readFileSync(join(FOLDER, name), 'utf8')))
    .map((name) => name.replaceAll('\\', '/'))
    .sort();

scenario('Each drag of the page has a way without one', async ({ page, open }) => {
  assert.deepEqual(listening(), [...new Set([...DRAGS.flatMap(({ files }) => files), ...NO_DRAG])].sort());
  await open();
  await untilSolved(page);
  await at(page, STRIP, (strip) => {
    const { design } = strip as unknown as { design: { variables?: object[] } };
    strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next: { ...design, variables: [{ name: 'w', value: '100 nm', range: ['50 nm', '200 nm'] }, ...(design.variables ?? [])] }, label: 'a variable' } }));
  });
  await until('a slider', async () => (await at(page, [...VARIABLES, '[type=range]'], () => true)) === true);
  await untilSolved(page);
  const start = (await property(page, STRIP, 'design'))!;
  for (const { what, state, ready, drag: dragged, instead } of DRAGS) {
    await ready?.(page);
    for (const [way, act] of [['the drag', dragged], ...Object.entries(instead)] as [string, (page: Page) => Promise<unknown>][]) {
      const before = await state(page);
      await act(page);
      await until(`${what}: ${way}`, async () => (await state(page)) !== before, 5000);
      await put(page, start);
      await untilSolved(page);
    }
  }
  // A file that is dropped on the page can be chosen instead.
  await press(page, [...APP, 'hm-conditions'], 'Projects');
  assert.equal(await at(page, [...APP, 'hm-projects', 'input[type=file]'], () => true), true);
});
