import { expect } from 'chai';
import '../../components/hm-about/hm-about.ts';
import '../../components/hm-starters/hm-starters.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';

describe('the shelf of starters', () => {
  it('shows each with its case, and tells which was taken, closing itself', async () => {
    const element = document.createElement('hm-starters');
    document.body.append(element);
    try {
      await element.updateComplete;
      expect(element.shadowRoot!.textContent).to.contain('Fetching');
      element.starters = [{ id: 'pn', title: 'Clamp diode', summary: 'p-n diode', layers: ['Si', 'Si'] }, { id: 'q', title: 'Channel', summary: 'nitride channel', layers: ['GaN'] }];
      element.show();
      const dialog = element.shadowRoot!.querySelector('hm-dialog')!;
      await until('an open dialog', () => dialog.open);
      await expectAccessible(element);
      const taken = heard(element, 'hm-starter');
      button(element, 'nitride channel').click();
      expect(taken).to.deep.equal([{ id: 'q' }]);
      await until('a closed dialog', () => !dialog.open);
    } finally {
      element.remove();
    }
  });
});

describe('the about page', () => {
  it('is accessible, says the cautions and where the work is, and closes by Escape or a press beside it', async () => {
    const element = document.createElement('hm-about');
    document.body.append(element);
    try {
      await element.updateComplete;
      element.show();
      const dialog = element.shadowRoot!.querySelector('hm-dialog')!;
      await until('an open dialog', () => dialog.open);
      await expectAccessible(element);
      expect(element.shadowRoot!.textContent).to.contain('Confirm them by measurement').and.to.contain('Nothing is sent anywhere').and.to.contain('Hazardous gases');
      dialog.shadowRoot!.querySelector('dialog')!.click();
      await until('a closed dialog', () => !dialog.open);
    } finally {
      element.remove();
    }
  });
});
