/** What tabs tell each other. */
export interface TabNotice {
  kind: 'saved' | 'deleted';
  id: string;
  /** after the save; 0 for a deleted project */ revision: number;
}

/** The other tabs of this page. A browser without channels has none to speak of: the check inside each save still holds. */
export class Tabs {
  /** null where there are no channels, and once closed */ #channel: BroadcastChannel | null;

  constructor(heard: (notice: TabNotice) => void, name = 'halfmark') {
    this.#channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(name);
    if (this.#channel !== null) this.#channel.onmessage = ({ data }: MessageEvent<unknown>) => isNotice(data) && heard(data);
  }

  tell(notice: TabNotice): void {
    this.#channel?.postMessage(notice);
  }

  close(): void {
    this.#channel?.close();
    this.#channel = null;
  }
}

function isNotice(value: unknown): value is TabNotice {
  if (typeof value !== 'object' || value === null) return false;
  const { kind, id, revision } = value as Partial<TabNotice>;
  return (kind === 'saved' || kind === 'deleted') && typeof id === 'string' && typeof revision === 'number';
}
