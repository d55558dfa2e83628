import axe from 'axe-core';
import type { Page } from 'playwright-core';

/** Longer than any colour takes to fade. */
const SETTLE_MS = 1_500;

/**
 * What axe finds on a page that keeps somebody from using it.
 *
 * @param page - As it stands.
 * @returns One line for each element with a serious or critical violation: the rule, the element, what is wrong.
 */
export async function seriousViolations(page: Page): Promise<string[]> {
  const found = await violationsNow(page);
  if (found.length === 0) return found;
  // A colour that was still fading is nobody's last word: only what stays is a violation.
  await page.waitForTimeout(SETTLE_MS);
  return violationsNow(page);
}

async function violationsNow(page: Page): Promise<string[]> {
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
