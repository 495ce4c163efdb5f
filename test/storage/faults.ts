/** How a write to the browser's database goes wrong. */
export type Fault =
  /** refused at once, as when the disk is full */ | 'refused'
  /** accepted, and taken back when the transaction ends */ | 'taken back'
  /** the connection is cut under it, and says so */ | 'cut'
  /** the connection is cut and says nothing */ | 'cut in silence';
export const FAULTS: readonly Fault[] = ['refused', 'taken back', 'cut', 'cut in silence'];

const METHODS = ['put', 'add', 'delete'] as const;
const originals = { put: IDBObjectStore.prototype.put, add: IDBObjectStore.prototype.add, delete: IDBObjectStore.prototype.delete };

/** Counts the writes to every database of the page from now on, and lets some of them go wrong. */
export class Faults {
  writes = 0;
  happened = 0;
  readonly #wrong: (write: number) => boolean;

  /** @param wrong  whether the write of this number, counted from 0, goes wrong */
  constructor(fault: Fault, wrong: (write: number) => boolean) {
    this.#wrong = wrong;
    const faults = this;
    for (const method of METHODS) {
      const failing = function (this: IDBObjectStore, ...given: unknown[]): IDBRequest<never> {
        const asked = (): IDBRequest<never> => Reflect.apply(originals[method], this, given) as IDBRequest<never>;
        if (!faults.#wrong(faults.writes++)) return asked();
        faults.happened++;
        if (fault === 'refused') throw new DOMException('no room', 'QuotaExceededError');
        const { transaction } = this;
        const { db } = transaction;
        const request = asked();
        if (fault === 'taken back') {
          request.addEventListener('success', () => transaction.abort());
        } else {
          // What a browser does that loses its disk: the transaction ends without effect and the connection says that it is closed.
          db.close();
          transaction.abort();
          if (fault === 'cut') queueMicrotask(() => db.dispatchEvent(new Event('close')));
        }
        return request;
      };
      Object.assign(IDBObjectStore.prototype, { [method]: failing });
    }
  }

  /** Everything works again. */
  mend(): void {
    for (const method of METHODS) Object.assign(IDBObjectStore.prototype, { [method]: originals[method] });
  }
}
