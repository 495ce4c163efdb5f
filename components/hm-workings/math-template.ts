import { html, mathml, type TemplateResult } from 'lit';
import { mathText, type MathNode } from '../../src/workings/math.ts';

/** A formula as MathML, with its line of text as its name. */
export function mathTemplate(node: MathNode, display: 'block' | 'inline' = 'inline'): TemplateResult {
  return html`<math display=${display} aria-label=${mathText(node)}>${part(node)}</math>`;
}

function part(node: MathNode): TemplateResult<3> {
  switch (node.tag) {
    case 'mi':
      return mathml`<mi>${node.text}</mi>`;
    case 'mn':
      return mathml`<mn>${node.text}</mn>`;
    case 'mo':
      return mathml`<mo>${node.text}</mo>`;
    case 'mtext':
      return mathml`<mtext>${node.text}</mtext>`;
    case 'mrow':
      return mathml`<mrow>${node.children.map(part)}</mrow>`;
    case 'mfrac':
      return mathml`<mfrac>${node.children.map(part)}</mfrac>`;
    case 'msup':
      return mathml`<msup>${node.children.map(part)}</msup>`;
    case 'msub':
      return mathml`<msub>${node.children.map(part)}</msub>`;
    case 'msubsup':
      return mathml`<msubsup>${node.children.map(part)}</msubsup>`;
    case 'msqrt':
      return mathml`<msqrt>${node.children.map(part)}</msqrt>`;
    case 'munderover':
      return mathml`<munderover>${node.children.map(part)}</munderover>`;
  }
}
