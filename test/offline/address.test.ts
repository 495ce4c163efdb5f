import { describe, expect, it } from 'vitest';
import { fileAt } from '../../src/offline/address.ts';

const SCOPE = 'https://example.org/tools/halfmark/';
const files = new Set(['', 'assets/a.js', 'icon-192.png']);

describe('the kept file that answers an address', () => {
  it('is the page for its folder, by either name and whatever stands behind ? and #', () => {
    for (const end of ['', 'index.html', '?a=1', '#design=abc']) expect(fileAt(SCOPE + end, SCOPE, files)).toBe('');
  });
  it('is the file of that name', () => {
    expect(fileAt(`${SCOPE}assets/a.js`, SCOPE, files)).toBe('assets/a.js');
  });
  it('is none outside the folder, on another server, or for a name that the build has not', () => {
    for (const address of ['https://example.org/tools/', 'https://example.org/tools/halfmark2/', 'https://example.com/tools/halfmark/', `${SCOPE}assets/b.js`, `${SCOPE}assets/`, 'http://example.org/tools/halfmark/']) {
      expect(fileAt(address, SCOPE, files), address).toBe(null);
    }
  });
});
