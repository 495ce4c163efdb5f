/**
 * A formula as it is set: a small tree with the element names of MathML Core. It is drawn from this tree, never from text that is taken for markup.
 */
export type MathNode = MathLeaf | MathBranch;

export interface MathLeaf {
  tag: 'mi' | 'mn' | 'mo' | 'mtext';
  text: string;
}

export interface MathBranch {
  tag: 'mrow' | 'mfrac' | 'msup' | 'msub' | 'msubsup' | 'msqrt' | 'munderover';
  children: MathNode[];
}

export const mi = (text: string): MathLeaf => ({ tag: 'mi', text });
export const mn = (text: string): MathLeaf => ({ tag: 'mn', text });
export const mo = (text: string): MathLeaf => ({ tag: 'mo', text });
export const mrow = (...children: MathNode[]): MathBranch => ({ tag: 'mrow', children });
export const mfrac = (over: MathNode, under: MathNode): MathBranch => ({ tag: 'mfrac', children: [over, under] });
export const msup = (base: MathNode, raised: MathNode): MathBranch => ({ tag: 'msup', children: [base, raised] });
export const msub = (base: MathNode, lowered: MathNode): MathBranch => ({ tag: 'msub', children: [base, lowered] });
export const msqrt = (of: MathNode): MathBranch => ({ tag: 'msqrt', children: [of] });
export const munderover = (sign: MathNode, under: MathNode, over: MathNode): MathBranch => ({ tag: 'munderover', children: [sign, under, over] });

/**
 * The sign of a quantity from its short notation: "E_g" is E with the index g, "N_D^+" has both, "E_c−E_F" is a difference that counts as one sign.
 */
export function signOf(notation: string): MathNode {
  const difference = /^\((.+)\)_([^()]+)$/.exec(notation);
  if (difference) return msub(mrow(mo('('), signOf(difference[1]), mo(')')), mi(difference[2]));
  const parts = notation.split(/((?<!\^)−)/).filter((part) => part !== '');
  const nodes = parts.map((part) => (part === '−' ? mo(part) : single(part)));
  return nodes.length === 1 ? nodes[0] : mrow(...nodes);
}

function single(notation: string): MathNode {
  const [, base, , index, , power] = /^([^_^]+)(_([^^]+))?(\^(.+))?$/.exec(notation) ?? [undefined, notation];
  const letter = mi(base);
  const low = index === undefined ? null : mi(index);
  const high = power === undefined ? null : mo(power);
  if (low && high) return { tag: 'msubsup', children: [letter, low, high] };
  if (low) return msub(letter, low);
  return high ? msup(letter, high) : letter;
}

/** What stands together without a bracket in a line of text. */
const isWhole = (node: MathNode): boolean => 'text' in node || (node.tag !== 'mrow' && node.tag !== 'mfrac') || (node.tag === 'mrow' && isBracketed(node));

function isBracketed({ children }: MathBranch): boolean {
  const [first, last] = [children[0], children[children.length - 1]];
  return first !== undefined && 'text' in first && first.text === '(' && 'text' in last && last.text === ')';
}

function enclosed(node: MathNode): string {
  return isWhole(node) ? mathText(node) : `(${mathText(node)})`;
}

/** Operators that stand between two things and are given room. */
const ROOMY = new Set(['+', '−', '=', '·', '<', '>', '≤', '≥', '≈', ',']);

/** The formula on one line, for copying, for the sheet and for reading aloud: "Eg = Eg0 − (α T^2)/(T + β)". */
export function mathText(node: MathNode): string {
  if ('text' in node) return node.text;
  const { tag, children } = node;
  switch (tag) {
    case 'mrow':
      return rowText(children);
    case 'mfrac':
      return `${enclosed(children[0])}/${enclosed(children[1])}`;
    case 'msup':
      return `${enclosed(children[0])}^${enclosed(children[1])}`;
    case 'msub':
      return `${mathText(children[0])}${mathText(children[1])}`;
    case 'msubsup':
      return `${mathText(children[0])}${mathText(children[1])}${mathText(children[2])}`;
    case 'msqrt':
      return `√(${mathText(children[0])})`;
    case 'munderover':
      return `${mathText(children[0])} from ${mathText(children[1])} to ${mathText(children[2])} of`;
  }
}

function rowText(children: readonly MathNode[]): string {
  let text = '';
  let apart = false;
  children.forEach((child, i) => {
    const piece = mathText(child);
    const operator = 'text' in child && child.tag === 'mo';
    if (operator && ROOMY.has(piece)) {
      // A sign in front belongs to what follows.
      text += i === 0 ? piece : piece === ',' ? ', ' : ` ${piece} `;
      apart = true;
    } else if (operator) {
      text += piece === '\u2062' ? ' ' : piece;
      apart = true;
    } else {
      text += apart || text === '' ? piece : ` ${piece}`;
      apart = false;
    }
  });
  return text.replace(/ {2,}/g, ' ');
}
