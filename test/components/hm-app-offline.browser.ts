import { expect } from 'chai';
import { LitElement } from 'lit';
import '../../components/hm-field/hm-field.ts';
import { OfflineController } from '../../components/hm-app/offline-controller.ts';
import { OfflineCopy } from '../../src/offline/register.ts';

const tick = (): Promise<void> => new Promise((done) => setTimeout(done, 20));
let said: string[];
let copy: OfflineCopy;
let host: LitElement;
let count = 0;

describe('word of a newer build', () => {
  beforeEach(async () => {
    said = [];
    copy = new OfflineCopy(null);
    const name = `offline-host-${count++}`;
    customElements.define(name, class extends LitElement {});
    host = document.createElement(name) as LitElement;
    new OfflineController(host, copy, (text) => said.push(text));
    document.body.append(host);
    await tick();
  });
  afterEach(() => host.remove());

  it('comes at once while nothing is being edited', () => {
    copy.dispatchEvent(new Event('update'));
    expect(said).to.have.length(1);
  });

  it('waits for the end of a drag', async () => {
    document.body.dispatchEvent(new PointerEvent('pointerdown', { bubbles: true }));
    copy.dispatchEvent(new Event('update'));
    await tick();
    expect(said).to.have.length(0);
    document.body.dispatchEvent(new PointerEvent('pointerup', { bubbles: true }));
    await tick();
    expect(said).to.have.length(1);
  });

  it('waits until a text that is being typed was accepted or left', async () => {
    const field = document.createElement('hm-field');
    field.value = '1 nm';
    document.body.append(field);
    await field.updateComplete;
    const box = field.shadowRoot!.querySelector('input')!;
    box.focus();
    box.value = '2';
    copy.dispatchEvent(new Event('update'));
    box.dispatchEvent(new KeyboardEvent('keyup', { bubbles: true, composed: true }));
    await tick();
    expect(said).to.have.length(0);
    field.remove();
    document.body.dispatchEvent(new FocusEvent('focusout', { bubbles: true }));
    await tick();
    expect(said).to.have.length(1);
    expect(said[0]).to.contain('newer version');
  });
});
