import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { provideRouter } from '@angular/router';
import type { LoggerFile } from '@shared/contracts/logger-files';
import type { Role } from '@shared/contracts/people';
import { liveSocket } from '../../core/live-socket';
import { Session } from '../../core/session';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { loggerFile, loggerFileResult } from '../testing/logger-file-builder';
import { LoggersPage } from './loggers-page';

const address = `/api/v1/rooms/${membership().roomId}/logger-files`;
const broughtIn = loggerFile({ status: 'broughtIn', result: loggerFileResult(), differing: 'keep' });

describe('the list of logger files', () => {
  let server: HttpTestingController;
  let socket: FakeSocket;
  let fixture: ComponentFixture<LoggersPage>;
  let page: HTMLElement;

  async function open(files: LoggerFile[], role: Role = 'grower', nextCursor: string | null = null) {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([]),
        { provide: liveSocket, useValue: socket },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account({ memberships: [membership({ role })] }));
    fixture = TestBed.createComponent(LoggersPage);
    page = fixture.nativeElement as HTMLElement;
    TestBed.tick();
    server.expectOne(address).flush({ files, nextCursor });
    TestBed.tick();
    // The profiles are listed below the files.
    await Promise.resolve();
    TestBed.tick();
    server.expectOne(({ url }) => url.endsWith('/logger-file-profiles')).flush({ profiles: [] });
    await fixture.whenStable();
  }

  const rows = (): (string | undefined)[] =>
    [...page.querySelectorAll('li')].map((row) => row.textContent?.replace(/\s+/g, ' ').trim());

  it('says who brought in what, and what became of it', async () => {
    await open([broughtIn]);
    expect(rows()).toEqual([
      expect.stringMatching(
        /^shelf-a3-november\.csvMaren Oxley · .+ · 2\.0 MB120 214 readings new · 38 readings not usable · 1 Nov 2026 to 28 Nov 2026 Brought in/,
      ),
    ]);
  });

  it('follows a file that is being brought in, and shows one that somebody else uploads', async () => {
    await open([loggerFile({ status: 'bringingIn' })]);
    socket.tell('loggerFile:changed', broughtIn);
    socket.tell('loggerFile:changed', loggerFile({ id: inventedId(1001), name: 'another.csv' }));
    await fixture.whenStable();
    expect(rows()).toEqual([
      expect.stringMatching(/^another\.csv.*Columns to match/),
      expect.stringMatching(/^shelf-a3.*Brought in/),
    ]);
  });

  it('removes a file only after saying exactly what goes with it', async () => {
    await open([broughtIn]);
    const loader = TestbedHarnessEnvironment.documentRootLoader(fixture);
    page.querySelector<HTMLButtonElement>('[aria-label^=Remove]')?.click();
    const dialog = await loader.getHarness(MatDialogHarness);
    expect(await dialog.getText()).toContain('The 120\u202f214 readings that it brought in go.');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Leave it' }))).click();
    server.expectNone(`${address}/${broughtIn.id}`);

    page.querySelector<HTMLButtonElement>('[aria-label^=Remove]')?.click();
    const deed = await loader.getHarness(MatButtonHarness.with({ text: 'Remove the file' }));
    await deed.click();
    const request = server.expectOne(`${address}/${broughtIn.id}`);
    expect(request.request.method).toBe('DELETE');
    request.flush(null, { status: 204, statusText: 'No Content' });
    await fixture.whenStable();
    expect(rows()).toEqual([]);
    expect(page.textContent).toContain('No file was brought in yet');
  });

  it('shows earlier files a page at a time', async () => {
    await open([broughtIn], 'grower', 'next');
    const more = [...page.querySelectorAll('button')].find((one) => /earlier/.test(one.textContent ?? ''));
    more?.click();
    const request = server.expectOne(({ params }) => params.get('cursor') === 'next');
    request.flush({ files: [loggerFile({ id: inventedId(1001) })], nextCursor: null });
    await fixture.whenStable();
    expect(rows()).toHaveLength(2);
    expect(page.textContent).not.toContain('earlier');
  });

  it('lets viewers look, not bring in or remove', async () => {
    await open([broughtIn], 'viewer');
    expect(page.querySelector('[aria-label^=Remove]')).toBeNull();
    expect(page.querySelector('a[href="/loggers/new"]')).toBeNull();
  });
});
