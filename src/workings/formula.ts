import { isLaw, type Expression } from './expression.ts';
import type { Known } from './known.ts';

type Token = string | Expression;

/**
 * A formula written with its quantities in place: formula`${gap0} - ${alpha} * ${T} ^ 2 / (${T} + ${beta})`.
 *
 * Signs are + - * / ^ and brackets, with the usual order; names are those of the laws that expression.ts knows; a further formula may stand in place of a quantity. Only the program's own
 * text is ever read here.
 *
 * @throws {Error} a formula that cannot be read: our own mistake
 */
export function formula(texts: TemplateStringsArray, ...parts: (Known | Expression)[]): Expression {
  const tokens: Token[] = texts.flatMap((text, i) => [...(text.match(/[a-zA-Z]\w*|\d+(?:\.\d+)?(?:e-?\d+)?|[-+*/^(),]/g) ?? []), ...(i < parts.length ? [wrapped(parts[i])] : [])]);
  const reader = new Reader(tokens);
  const read = reader.sum();
  reader.end();
  return read;
}

const wrapped = (part: Known | Expression): Expression => ('kind' in part ? part : { kind: 'known', of: part });

class Reader {
  private at = 0;
  private readonly tokens: readonly Token[];

  constructor(tokens: readonly Token[]) {
    this.tokens = tokens;
  }

  sum(): Expression {
    const terms: Extract<Expression, { kind: 'sum' }>['terms'] = [];
    let sign: 1 | -1 = this.took('-') ? -1 : 1;
    for (;;) {
      terms.push({ sign, of: this.product() });
      if (this.took('+')) sign = 1;
      else if (this.took('-')) sign = -1;
      else break;
    }
    return terms.length === 1 && terms[0].sign === 1 ? terms[0].of : { kind: 'sum', terms };
  }

  end(): void {
    if (this.at < this.tokens.length) throw new Error(`formula: ${JSON.stringify(this.tokens[this.at])} is left over`);
  }

  private product(): Expression {
    let left = this.power();
    for (;;) {
      if (this.took('*')) {
        const right = this.power();
        left = { kind: 'product', factors: [...(left.kind === 'product' ? left.factors : [left]), right] };
      } else if (this.took('/')) left = { kind: 'quotient', over: left, under: this.power() };
      else return left;
    }
  }

  private power(): Expression {
    const base = this.single();
    return this.took('^') ? { kind: 'power', base, exponent: this.power() } : base;
  }

  private single(): Expression {
    const token = this.tokens[this.at++];
    if (token === undefined) throw new Error('formula: it ends too early');
    if (typeof token !== 'string') return token;
    if (token === '(') return this.closed(this.sum());
    if (/^\d/.test(token)) return { kind: 'number', value: Number(token), text: token };
    if (token === 'pi') return { kind: 'number', value: Math.PI, text: 'π' };
    if (!isLaw(token) || !this.took('(')) throw new Error(`formula: ${token} means nothing`);
    const of = [this.sum()];
    while (this.took(',')) of.push(this.sum());
    return this.closed({ kind: 'call', law: token, of });
  }

  private closed(e: Expression): Expression {
    if (!this.took(')')) throw new Error('formula: a bracket is open');
    return e;
  }

  private took(sign: string): boolean {
    if (this.tokens[this.at] !== sign) return false;
    this.at++;
    return true;
  }
}
