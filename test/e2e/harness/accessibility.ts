import axe from 'axe-core';
import type { Page } from 'playwright-core';

/**
 * What axe finds on a page that keeps somebody from using it.
 *
 * @param page - As it stands.
 * @returns One line for each element with a serious or critical violation: the rule, the element, what is wrong.
 */
export async function seriousViolations(page: Page): Promise<string[]> {
  // A colour that is still fading is nobody's last word.
  await page.addStyleTag({ content: '*, *::before, *::after { transition: none !important; }' });
  // Evaluated rather than inserted: the content policy rightly lets no script in.
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate<{ violations: axe.Result[] }>(
    "axe.run(document, { resultTypes: ['violations'] })",
  );
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary ?? ''}`),
    );
}
