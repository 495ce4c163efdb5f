import type { HalfmarkEvents } from '../../components/shared/events.ts';

/** Everything of one kind that an element tells from now on. */
export function heard<K extends keyof HalfmarkEvents>(from: EventTarget, name: K): HalfmarkEvents[K][] {
  const list: HalfmarkEvents[K][] = [];
  from.addEventListener(name, (event) => list.push((event as CustomEvent<HalfmarkEvents[K]>).detail));
  return list;
}

/** Waits until something holds; fails with its words after two seconds, or as long as said. */
export async function until(what: string, holds: () => boolean, patience_ms = 2000): Promise<void> {
  const end = performance.now() + patience_ms;
  while (!holds()) {
    if (performance.now() > end) throw new Error(`never came about: ${what}`);
    await new Promise((done) => setTimeout(done, 10));
  }
}

/** The button whose words begin like this, anywhere in an element's shadow tree. */
export function button(within: Element, words: string): HTMLButtonElement {
  const found = [...within.shadowRoot!.querySelectorAll('button')].find((candidate) => candidate.textContent!.trim().startsWith(words));
  if (found === undefined) throw new Error(`no button "${words}"`);
  return found;
}
