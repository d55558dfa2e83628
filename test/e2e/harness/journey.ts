import type { Page } from 'playwright-core';
import { TestBrowser } from './test-browser';
import { startWholeApplication, type WholeApplication } from './whole-application';

/** What a journey goes through. */
export interface Journey {
  readonly application: WholeApplication;
  readonly browser: TestBrowser;
  /** At a desk, by day. */
  readonly page: Page;
}

/**
 * Starts the application and the browser for the tests of one `describe`, and stops both after them. A page that
 * complained on the console fails its test.
 *
 * @returns The journey, filled in before the first test.
 */
export function prepareJourney(): Journey {
  const journey = {} as { -readonly [Part in keyof Journey]: Journey[Part] };
  beforeAll(async () => {
    journey.application = await startWholeApplication();
    journey.browser = await TestBrowser.start();
    journey.page = await journey.browser.open();
  });
  afterEach(() => {
    expect(journey.browser.takeComplaints()).toEqual([]);
  });
  afterAll(async () => {
    await journey.browser.stop();
    await journey.application.stop();
  });
  return journey;
}
