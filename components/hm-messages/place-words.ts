import type { HalfmarkEvents } from '../shared/events.ts';

const PARTS: Record<string, string> = {
  thickness: 'thickness', material: 'material', x: 'composition', name: 'name', dopants: 'dopants', concentration: 'concentration', dopant: 'dopant',
  activation: 'activation', compensation: 'compensation', depth: 'depth of the level', temperature: 'temperature', temperatureRange: 'temperature range', bias: 'bias',
  metal: 'metal', barrier: 'barrier', level: 'level', sheetCharge: 'sheet charge', pinning: 'pinning', value: 'value', tolerance: 'tolerance', range: 'range',
};

/** The place of a complaint in the page's words: "layers[1].dopants[0].concentration" is "cap, dopant 1, concentration". What has no words is given as it is. */
export function placeWords(path: string, layers: readonly string[]): string {
  if (path === '') return '';
  const steps = path.match(/[^.[\]]+/g) ?? [];
  const words: string[] = [];
  for (let i = 0; i < steps.length; i++) {
    const number = /^\d+$/.test(steps[i + 1] ?? '') ? Number(steps[i + 1]) : null;
    const step = steps[i];
    if (step === 'layers' && number !== null) words.push(layers[number] ?? `layer ${number + 1}`);
    else if (step === 'dopants' && number !== null) words.push(`dopant ${number + 1}`);
    else if (step === 'interfaces' && number !== null) words.push(`interface ${number + 1}`);
    else if (step === 'variables' && number !== null) words.push(`variable ${number + 1}`);
    else if (step === 'requirements' && number !== null) words.push(`requirement ${number + 1}`);
    else if (step === 'top' || step === 'bottom') words.push(`${step} contact`);
    else if (step === 'conditions') continue;
    else if (PARTS[step] !== undefined && number === null) words.push(PARTS[step]);
    else return `${path}:`;
    if (number !== null) i++;
  }
  return `${words.join(', ')}:`;
}

/** What can be chosen on the page to mend a complaint; null where there is nothing to choose. */
export function targetOf(path: string, layers: readonly string[]): HalfmarkEvents['hm-choose'] {
  const layer = /^layers\[(\d+)\]/.exec(path);
  if (layer !== null) return Number(layer[1]) < layers.length ? { kind: 'layer', index: Number(layer[1]) } : null;
  if (/^top\b/.test(path)) return { kind: 'contact', index: 0 };
  if (/^bottom\b/.test(path)) return { kind: 'contact', index: 1 };
  return null;
}
