import { describe, expect, it } from 'vitest';
import { REQUIREMENT_QUANTITIES } from '../../src/design/requirement-quantities.ts';
import { starters } from '../../src/design/starters/index.ts';
import { MOBILITY_NOTE, restsOnMobility } from '../../src/result/mobility-note.ts';
import { figuresOf } from '../../src/sweep/figures.ts';

describe('what a mobility leaves out', () => {
  it('is said of every figure that rests on one, and of no other', () => {
    const design = starters.find(({ id }) => id === 'pn-diode')!.design;
    const words = figuresOf(design).filter(({ path }) => restsOnMobility(path)).map(({ words: text }) => text);
    expect(words.filter((text) => text.startsWith('anode'))).toEqual(['anode: mobility of the majority', 'anode: mobility of electrons', 'anode: mobility of holes', 'anode: resistivity', 'anode: sheet resistance']);
    expect(words.some((text) => text.includes('contact'))).toBe(false);
    expect(Object.keys(REQUIREMENT_QUANTITIES).filter(restsOnMobility)).toEqual(['sheetResistance', 'resistivity']);
    expect(MOBILITY_NOTE).toContain('300 K');
  });
});
