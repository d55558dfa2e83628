import { weekdayOf } from '@shared/care/rota';
import { dayAfter } from '@shared/growing/calendar-day';
import type { Locator, Page } from 'playwright-core';
import { seriousViolations } from './harness/accessibility';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const sweep = 'Sweep the aisle';

describe('a week of care', () => {
  const journey = prepareJourney();
  let desk: Page;
  let pia: Page;
  let elin: Page;

  beforeAll(async () => {
    const { application, browser } = journey;
    desk = journey.page;
    await signIn(desk, application.address, 'maren');
    pia = await browser.open({ width: 390 });
    await signIn(pia, application.address, 'pia');
    elin = await browser.open({ width: 390 });
    await signIn(elin, application.address, 'elin');
  });

  const inspect = async (page: Page): Promise<void> => expect(await seriousViolations(page)).toEqual([]);
  const rowOf = (name: RegExp): Locator =>
    desk.getByRole('row').filter({ has: desk.getByRole('rowheader', { name }) });
  /** The column of a weekday of the shown week, Monday the first. */
  const sweepOn = (row: Locator, weekday: number): Locator =>
    row
      .getByRole('cell')
      .nth(weekday - 1)
      .getByRole('button', { name: sweep });

  /** Next week, which is all to come whatever day it is. */
  async function openNextWeek(page: Page): Promise<void> {
    await page.goto(`${journey.application.address}/care/rota`);
    await page.getByRole('link', { name: 'The week after' }).click();
    await page.waitForURL(/week=/);
    await page.getByText(sweep).first().waitFor();
  }

  it('begins with a routine that the keeper adds', async () => {
    await desk.goto(`${journey.application.address}/care/routines`);
    await desk.getByRole('link', { name: 'Add a routine' }).click();
    await desk.getByRole('combobox', { name: 'Kind of care' }).click();
    await desk.getByRole('option', { name: 'Clean', exact: true }).click();
    await desk.getByLabel('Title').fill(sweep);
    await desk.getByLabel('Every', { exact: true }).fill('1');
    await desk.getByText('Due every day').waitFor();
    await desk.getByRole('radio', { name: 'One person' }).check();
    await desk.getByRole('combobox', { name: 'Person' }).click();
    await desk.getByRole('option', { name: 'Pia Lindqvist' }).click();
    await inspect(desk);
    await desk.getByRole('button', { name: 'Add the routine' }).click();
    await desk.getByRole('heading', { level: 1, name: 'Routines' }).waitFor();
    const line = desk.getByRole('listitem').filter({ hasText: sweep });
    expect(await line.textContent()).toMatch(/Every day[\s\S]*always Pia Lindqvist[\s\S]*Next today/);
  });

  it('shows its tasks in the week, and moves one by keyboard', async () => {
    await openNextWeek(desk);
    await inspect(desk);
    const mondays = sweepOn(rowOf(/^Pia/), 1);
    await mondays.focus();
    await desk.keyboard.press('Enter');
    await desk.getByRole('menuitem', { name: 'Move to another day' }).waitFor();
    await desk.keyboard.press('ArrowRight');
    await desk.getByRole('menuitem', { name: /^Tue / }).first().waitFor();
    await desk.keyboard.type('tue');
    await desk
      .locator('[role=menuitem]:focus')
      .filter({ hasText: /^\s*Tue / })
      .waitFor();
    await desk.keyboard.press('Enter');
    await desk.getByText(new RegExp(`“${sweep}” moved to Tue .*, with Pia Lindqvist`)).waitFor();
    await sweepOn(rowOf(/^Pia/), 2).nth(1).waitFor();
    expect(await sweepOn(rowOf(/^Pia/), 1).count()).toBe(0);
  });

  it('lets a helper offer a task and another take it', async () => {
    await openNextWeek(pia);
    await pia.getByRole('button', { name: sweep }).last().click();
    await inspect(pia);
    await pia.getByRole('menuitem', { name: 'Offer it to others' }).click();
    await pia.getByLabel('Note').fill('At the dentist');
    await pia.getByRole('button', { name: 'Offer it' }).click();
    await pia.getByText(`“${sweep}” is on offer`).waitFor();

    await openNextWeek(elin);
    await elin.getByText('“At the dentist”').waitFor();
    await elin.getByRole('button', { name: new RegExp(`^Take it.*${sweep}`) }).click();
    await elin.getByText(`“${sweep}” is yours. Pia Lindqvist is told.`).waitFor();
    await sweepOn(rowOf(/^Elin/), 7).waitFor();
  });

  it('names as short of hands what nobody is there for', async () => {
    await desk.getByRole('button', { name: 'Note an absence' }).click();
    await desk.getByRole('combobox', { name: 'Person' }).click();
    await desk.getByRole('option', { name: 'Pia Lindqvist' }).click();
    const [shown = ''] = /\d{4}-\d\d-\d\d/.exec(desk.url()) ?? [];
    const wednesday = dayAfter(shown, 3 - weekdayOf(shown));
    await desk.getByLabel('First day').fill(wednesday);
    await desk.getByLabel('Last day').fill(wednesday);
    await desk.getByRole('button', { name: 'Note it' }).click();
    await desk.getByText(/Pia Lindqvist is away on /).waitFor();
    await sweepOn(rowOf(/^Short of hands/), 3).waitFor();
    expect(await sweepOn(rowOf(/^Pia/), 3).count()).toBe(0);

    await desk.getByRole('button', { name: 'Undo' }).click();
    await sweepOn(rowOf(/^Pia/), 3).waitFor();
  });
});
