import { sendKeys } from '@web/test-runner-commands';
import { presetCatalogue } from '../../src/design/catalogue.ts';
import { modelsKnown } from '../../src/design/ionisation-models.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';

/** What the elements are shown in their tests: a worked design with its real result. */
export function sample(id = 'modulation-doped'): { design: Design; result: Result } {
  const design = structuredClone(starters.find((s) => s.id === id)!.design);
  return { design, result: solved(design) };
}

export function solved(design: Design): Result {
  const answer = solveDesign(design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

/** The menus, as the page fills them from the presets. */
export function menus() {
  return {
    materials: [...presetCatalogue.materials.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id, alloy: entry.alloy !== undefined })),
    dopants: [...presetCatalogue.dopants.values()].flatMap((rows) => [...rows.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id, host: entry.host, kind: entry.kind, models: modelsKnown(entry) }))),
    metals: [...presetCatalogue.metals.values()].map(({ entry }) => ({ id: entry.id, name: entry.name ?? entry.id })),
  };
}

/** Puts an element on the page alone, with its properties, once it has drawn itself. */
export async function mounted<T extends HTMLElement & { updateComplete: Promise<unknown> }>(name: string, properties: Partial<T>): Promise<T> {
  document.body.replaceChildren();
  const element = Object.assign(document.createElement(name), properties) as T;
  document.body.append(element);
  await settled(element);
  return element;
}

/** After the size observers have spoken and what follows from it is drawn. */
export async function settled(element: { updateComplete: Promise<unknown> }): Promise<void> {
  for (let i = 0; i < 3; i++) {
    await new Promise((done) => requestAnimationFrame(done));
    await element.updateComplete;
  }
}

/** Everything that an element tells while it stands on the page. */
export function heard<K extends keyof HTMLElementEventMap | string>(element: EventTarget, name: K): CustomEvent[] {
  const events: CustomEvent[] = [];
  element.addEventListener(name, (event) => events.push(event as CustomEvent));
  return events;
}

/** The middle of a thing on the page, whole px. */
export function middle(thing: Element): [number, number] {
  const box = thing.getBoundingClientRect();
  return [Math.round(box.left + box.width / 2), Math.round(box.top + box.height / 2)];
}

/** A key with modifiers held: "Alt+ArrowRight". */
export async function pressed(chord: string): Promise<void> {
  const keys = chord === '+' ? ['+'] : chord.split('+');
  const last = keys.pop()!;
  for (const key of keys) await sendKeys({ down: key });
  await sendKeys({ press: last });
  for (const key of keys.reverse()) await sendKeys({ up: key });
}
