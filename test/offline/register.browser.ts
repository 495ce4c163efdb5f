import { expect } from 'chai';
import { TAKE_OVER } from '../../src/offline/messages.ts';
import { OfflineCopy } from '../../src/offline/register.ts';

/** A service worker that goes through its states when it is told to. */
class Worker extends EventTarget {
  state = 'installing';
  heard: unknown[] = [];
  postMessage(message: unknown): void {
    this.heard.push(message);
  }
  become(state: string): void {
    this.state = state;
    this.dispatchEvent(new Event('statechange'));
  }
}
class Registration extends EventTarget {
  active: Worker | null = null;
  waiting: Worker | null = null;
  installing: Worker | null = null;
  looks = 0;
  async update(): Promise<void> {
    this.looks++;
    throw new TypeError('no network');
  }
  found(worker: Worker): void {
    this.installing = worker;
    this.dispatchEvent(new Event('updatefound'));
  }
}
class Container extends EventTarget {
  registered: string[] = [];
  registration: Registration | null = new Registration();
  async register(address: URL): Promise<Registration> {
    this.registered.push(address.pathname);
    if (this.registration === null) throw new DOMException('no', 'SecurityError');
    return this.registration;
  }
}

let meta: HTMLMetaElement;
let container: Container;
let reloads: number;
let events: string[];
function copy(): OfflineCopy {
  const made = new OfflineCopy(container as unknown as ServiceWorkerContainer, () => reloads++);
  for (const name of ['ready', 'update']) made.addEventListener(name, () => events.push(name));
  return made;
}

describe('the copy of the page that the browser keeps', () => {
  beforeEach(() => {
    meta = Object.assign(document.createElement('meta'), { name: 'offline-worker', content: './offline-worker.js' });
    document.head.append(meta);
    container = new Container();
    reloads = 0;
    events = [];
  });
  afterEach(() => meta.remove());

  it('is not asked for by a page from its sources, nor where the browser has no service workers or forbids them', async () => {
    const plain = new OfflineCopy(null);
    await plain.start();
    expect(plain.state).to.equal('none');
    container.registration = null;
    const forbidden = copy();
    await forbidden.start();
    expect(forbidden.state).to.equal('none');
    meta.remove();
    container.registered = [];
    await copy().start();
    expect(container.registered).to.deep.equal([]);
    expect(forbidden.apply()).to.equal(false);
  });

  it('is told once it is whole', async () => {
    const first = new Worker();
    container.registration!.installing = first;
    const made = copy();
    await made.start();
    expect(made.state).to.equal('fetching');
    first.become('installed');
    container.registration!.active = first;
    first.become('activated');
    expect(made.state).to.equal('ready');
    expect(events).to.deep.equal(['ready']);
    made.stop();
  });

  it('says so when it could not be fetched whole', async () => {
    const first = new Worker();
    container.registration!.installing = first;
    const made = copy();
    await made.start();
    first.become('redundant');
    expect(made.state).to.equal('none');
    expect(events).to.deep.equal([]);
    made.stop();
  });

  it('tells of a newer build, found now or on an earlier visit, and does nothing by itself', async () => {
    container.registration!.active = new Worker();
    const made = copy();
    await made.start();
    expect(made.state).to.equal('ready');
    const newer = new Worker();
    container.registration!.found(newer);
    expect(events).to.deep.equal([]);
    newer.become('installed');
    expect(events).to.deep.equal(['update']);
    expect(newer.heard).to.deep.equal([]);
    container.registration!.waiting = newer;
    const later = copy();
    await later.start();
    expect(later.state).to.equal('update');
    expect(events).to.deep.equal(['update', 'update']);
    expect(reloads).to.equal(0);
    made.stop();
    later.stop();
  });

  it('takes the newer build over when it is asked to, and reloads once that is in charge', async () => {
    container.registration!.active = new Worker();
    const newer = (container.registration!.waiting = new Worker());
    const made = copy();
    await made.start();
    expect(made.apply()).to.equal(true);
    expect(newer.heard).to.deep.equal([TAKE_OVER]);
    expect(reloads).to.equal(0);
    container.dispatchEvent(new Event('controllerchange'));
    container.dispatchEvent(new Event('controllerchange'));
    expect(reloads).to.equal(1);
    made.stop();
  });

  it('looks for a newer build without minding that there is no network', async () => {
    container.registration!.active = new Worker();
    const made = copy();
    await made.start();
    await made.look();
    expect(container.registration!.looks).to.equal(1);
    expect(made.state).to.equal('ready');
    made.stop();
  });
});
