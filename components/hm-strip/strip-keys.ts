import type { Design } from '../../src/design/types.ts';
import type { HalfmarkEvents } from '../shared/events.ts';
import { inserted, moved, removed, type StackAct } from './strip-acts.ts';

type Choice = NonNullable<HalfmarkEvents['hm-choose']>;

/** What a key on a column means. */
export type Meaning =
  | { kind: 'choose'; choice: Choice; focus: 'column' | 'form' }
  | { kind: 'act'; act: StackAct }
  | { kind: 'nudge'; layer: number; share: number }
  | { kind: 'say'; text: string }
  /** the key is the strip's, but there is nothing to do: the end is reached */ | { kind: 'nothing' };

/** Share of the thickness that a press of a bracket changes. */
const NUDGE = 0.05;

/** @returns null where the key means nothing here and is left to the page */
export function meaningOf(event: { key: string; altKey: boolean }, design: Design, chosen: Choice): Meaning | null {
  const count = design.layers.length;
  const layer = chosen.kind === 'layer' ? chosen.index : null;
  const act = (a: StackAct | null): Meaning => (a ? { kind: 'act', act: a } : { kind: 'nothing' });
  switch (event.key) {
    case 'ArrowLeft':
    case 'ArrowRight': {
      const step = event.key === 'ArrowLeft' ? -1 : 1;
      if (event.altKey) return layer === null ? { kind: 'nothing' } : act(moved(design, layer, layer + step));
      return column(columnOf(chosen, count) + step, count);
    }
    case 'Home': return column(0, count);
    case 'End': return column(count + 1, count);
    case 'ArrowDown': return layer !== null && layer < count - 1 ? { kind: 'choose', choice: { kind: 'interface', index: layer }, focus: 'column' } : { kind: 'nothing' };
    case 'ArrowUp': return chosen.kind === 'interface' ? { kind: 'choose', choice: { kind: 'layer', index: chosen.index }, focus: 'column' } : { kind: 'nothing' };
    case 'Enter': return { kind: 'choose', choice: chosen, focus: 'form' };
    case 'Insert':
    case '+': return act(inserted(design, chosen.kind === 'contact' ? (chosen.index === 0 ? 0 : count) : chosen.index + 1));
    case 'Delete':
      if (layer === null) return { kind: 'nothing' };
      return count === 1 ? { kind: 'say', text: 'The last layer stays: a stack has at least one.' } : act(removed(design, layer));
    case '[':
    case ']': return layer === null ? { kind: 'nothing' } : { kind: 'nudge', layer, share: event.key === '[' ? -NUDGE : NUDGE };
    default: return null;
  }
}

/** Columns from left to right: the top contact, the layers, the bottom contact. An interface counts as the layer above it. */
function columnOf(chosen: Choice, count: number): number {
  return chosen.kind === 'contact' ? (chosen.index === 0 ? 0 : count + 1) : chosen.index + 1;
}

function column(at: number, count: number): Meaning {
  const held = Math.min(Math.max(at, 0), count + 1);
  const choice: Choice = held === 0 ? { kind: 'contact', index: 0 } : held === count + 1 ? { kind: 'contact', index: 1 } : { kind: 'layer', index: held - 1 };
  return { kind: 'choose', choice, focus: 'column' };
}
