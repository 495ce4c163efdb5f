/**
 * How a project is looked at: saved with it, never undone. Elements keep entries of their own under their own keys (`ledger`, `dimensions`...); what stands
 * there is theirs to read with care, since an older or newer version of the page may have written it.
 */
export type View = Record<string, unknown>;

/** Most characters that a view may take as JSON; a larger one is not kept. */
const LIMIT = 200_000;

/** The view with a change laid over it; an entry set to undefined goes. */
export function changedView(view: View, change: View): View {
  const next = { ...view, ...change };
  for (const [key, value] of Object.entries(next)) if (value === undefined) delete next[key];
  return next;
}

/** Reads back what was saved; anything else than a plain record gives an empty view. */
export function readView(saved: unknown): View {
  if (typeof saved !== 'object' || saved === null || Array.isArray(saved)) return {};
  try {
    const text = JSON.stringify(saved);
    return text.length > LIMIT ? {} : (JSON.parse(text) as View);
  } catch {
    return {};
  }
}
