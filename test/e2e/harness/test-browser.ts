import { chromium, type Browser, type BrowserContext, type ConsoleMessage, type Page } from 'playwright-core';
import { demonstrationPassword } from '../../../server/demonstration/demonstration-content';

/** How somebody looks at a page. */
export interface View {
  readonly width: number;
  readonly colours: 'light' | 'dark';
  /** Takes a certificate that nobody signed. */
  readonly trustsAnyCertificate?: boolean;
  /** Keeps the application for when the network is gone; otherwise every page comes from the server itself. */
  readonly keepsApplication?: boolean;
}

const HEIGHT = 900;
const WAIT_MS = 20_000;

// Debian's Chromium refuses its sandbox to root, and would look for updates and friends of its own.
const switches = [
  ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** Chromium, with an ear for everything that pages complain about. */
export class TestBrowser {
  private readonly complaints: string[] = [];

  private constructor(private readonly browser: Browser) {}

  /** Starts Debian's Chromium, or the one that CHROMIUM_PATH names. */
  static async start(): Promise<TestBrowser> {
    const executablePath = process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium';
    return new TestBrowser(await chromium.launch({ executablePath, args: switches }));
  }

  /**
   * Opens a page of a browser that knows nobody yet.
   *
   * @param view - A desk by day, unless said otherwise.
   */
  async open(view: Partial<View> = {}): Promise<Page> {
    const context: BrowserContext = await this.browser.newContext({
      viewport: { width: view.width ?? 1440, height: HEIGHT },
      colorScheme: view.colours ?? 'light',
      reducedMotion: 'reduce',
      locale: 'en-IE',
      serviceWorkers: view.keepsApplication === true ? 'allow' : 'block',
      ignoreHTTPSErrors: view.trustsAnyCertificate ?? false,
    });
    context.setDefaultTimeout(WAIT_MS);
    return this.openPage(context);
  }

  /** Closes a page and opens another in the same browser, which keeps cookies and all that it knew. */
  async reopen(page: Page): Promise<Page> {
    await page.close();
    return this.openPage(page.context());
  }

  private async openPage(context: BrowserContext): Promise<Page> {
    const page = await context.newPage();
    page.on('pageerror', (error) => this.complaints.push(error.message));
    page.on('console', (message) => {
      if (message.type() !== 'error' || isAnsweredRefusal(message)) return;
      this.complaints.push(`${message.text()} ${message.location().url}`);
    });
    return page;
  }

  /** Ends this page's browser: its cookies and all it knew. */
  async close(page: Page): Promise<void> {
    await page.context().close();
  }

  /** Errors on pages since the last call: exceptions, violations of the content policy, what is missing. */
  takeComplaints(): string[] {
    return this.complaints.splice(0);
  }

  async stop(): Promise<void> {
    await this.browser.close();
  }
}

/** What the API refuses the page says in its own words; Chromium calls it an error all the same. */
function isAnsweredRefusal(message: ConsoleMessage): boolean {
  return (
    /^Failed to load resource: the server responded with a status of 4\d\d /.test(message.text()) &&
    new URL(message.location().url).pathname.startsWith('/api/')
  );
}

/**
 * Signs a person of the demonstration in and waits for their room.
 *
 * @param page - On any page of the application.
 * @param address - Of the application.
 * @param who - The name before the at.
 * @param password - The demonstration's, unless they changed it.
 */
export async function signIn(
  page: Page,
  address: string,
  who: string,
  password = demonstrationPassword,
): Promise<void> {
  await page.goto(`${address}/sign-in`);
  await fillIn(page, who, password);
  await page.getByRole('heading', { level: 1, name: 'Kestrel Lane growing room' }).waitFor();
}

/**
 * Fills in the sign-in page and sends it.
 *
 * @param page - On the sign-in page.
 * @param who - The name before the at.
 * @param password - Right or wrong.
 */
export async function fillIn(page: Page, who: string, password: string): Promise<void> {
  await page.getByLabel('E-mail').fill(`${who}@example.org`);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}
