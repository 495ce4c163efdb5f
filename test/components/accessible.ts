import axe from 'axe-core';
import { expect } from 'chai';

/**
 * Asserts that axe finds nothing wrong with an element by WCAG 2.2 A and AA and by its own best practice; what it finds is in the message.
 * @param apart  elements directly inside it that have a suite of their own
 */
export async function expectAccessible(element: Element, apart: readonly string[] = []): Promise<void> {
  const exclude = apart.map((name) => ({ fromShadowDom: [element.localName, name] }));
  const { violations } = await axe.run({ include: element, exclude } as unknown as axe.ElementContext, {
    // A lone element is no page: landmarks and a first heading are asked of the page.
    rules: { region: { enabled: false }, 'page-has-heading-one': { enabled: false }, 'landmark-one-main': { enabled: false }, 'heading-order': { enabled: false } },
  });
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${String(target)} ${failureSummary}`).join('; ')}`)).to.deep.equal([]);
}
