/** A change this soon after a key came from that key, ms; one from an open menu comes later, or after Enter. */
const FROM_KEY_MS = 250;
const LOOKING = new Set(['ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight', 'Home', 'End', 'PageUp', 'PageDown']);

/** What the last key did to a menu, and whether its choice waits. */
const looked = new WeakMap<HTMLSelectElement, { at: number; waits: boolean }>();

/**
 * A closed menu reports every entry that arrows and letters pass. Here such a choice waits until Enter or until the menu is left; Escape gives it up. One that is picked from the open menu
 * counts at once. While it waits the menu carries `data-waits`.
 *
 * @param chosen  the value that stands
 * @param take    the person's choice, once it is one
 */
export function settledChoice(chosen: string, take: (value: string) => void): Record<'change' | 'keydown' | 'blur', (event: Event) => void> {
  const of = (event: Event): HTMLSelectElement => event.currentTarget as HTMLSelectElement;
  const waits = (menu: HTMLSelectElement): boolean => looked.get(menu)?.waits === true;
  const wait = (menu: HTMLSelectElement, still: boolean): void => {
    looked.set(menu, { at: looked.get(menu)?.at ?? -Infinity, waits: still });
    menu.toggleAttribute('data-waits', still);
  };
  const settle = (menu: HTMLSelectElement): void => {
    wait(menu, false);
    if (menu.value !== chosen) take(menu.value);
  };
  return {
    keydown(event): void {
      const { key, altKey, ctrlKey, metaKey, timeStamp } = event as KeyboardEvent;
      const menu = of(event);
      if (!altKey && !ctrlKey && !metaKey && (LOOKING.has(key) || key.length === 1)) return void looked.set(menu, { at: timeStamp, waits: waits(menu) });
      if (!waits(menu) || (key !== 'Enter' && key !== 'Escape')) return;
      event.preventDefault();
      event.stopPropagation();
      if (key === 'Escape') menu.value = chosen;
      settle(menu);
    },
    change(event): void {
      const menu = of(event);
      if (event.timeStamp - (looked.get(menu)?.at ?? -Infinity) < FROM_KEY_MS) wait(menu, menu.value !== chosen);
      else settle(menu);
    },
    blur(event): void {
      if (waits(of(event))) settle(of(event));
    },
  };
}
