/** What a key of the whole page asks for. */
export type PageKey = 'undo' | 'redo' | 'open-file' | 'save-design';

/**
 * @returns null for a key that is not the page's: among them undo inside a field whose text was not accepted yet, which is the browser's
 */
export function pageKey(event: KeyboardEvent): PageKey | null {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return null;
  const key = event.key.toLowerCase();
  if (key === 'o' && !event.shiftKey) return 'open-file';
  if (key === 's' && !event.shiftKey) return 'save-design';
  const asked = key === 'z' ? (event.shiftKey ? 'redo' : 'undo') : key === 'y' && !event.shiftKey ? 'redo' : null;
  return asked !== null && typing(event) ? null : asked;
}

function typing(event: KeyboardEvent): boolean {
  const path = event.composedPath();
  const box = path[0];
  if (!(box instanceof HTMLTextAreaElement) && !(box instanceof HTMLInputElement && !['checkbox', 'radio', 'range', 'file', 'button'].includes(box.type))) return false;
  const field = path.find((node): node is HTMLElement & { value: string } => node instanceof HTMLElement && node.localName === 'hm-field');
  return field === undefined || field.value !== box.value;
}
