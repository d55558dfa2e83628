import { HttpEventType, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { Session } from '../../core/session';
import { account, membership } from '../../core/testing/account-builder';
import { loggerFile, loggerFileDetail } from '../testing/logger-file-builder';
import { ChooseFile } from './choose-file';

const address = `/api/v1/rooms/${membership().roomId}/logger-files`;
const csv = new File(['time,air\n'], 'shelf-a3.csv', { type: 'text/csv' });

describe('choosing a logger file', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<ChooseFile>;
  let page: HTMLElement;

  beforeEach(async () => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account());
    fixture = TestBed.createComponent(ChooseFile);
    page = fixture.nativeElement as HTMLElement;
    await fixture.whenStable();
  });
  afterEach(() => server.verify());

  const drop = (...files: File[]): void => {
    const event = Object.assign(new Event('drop', { cancelable: true }), { dataTransfer: { files } });
    page.querySelector('.zone')?.dispatchEvent(event);
    TestBed.tick();
  };

  it('sends a dropped file, says how far it is, and goes on to its page', async () => {
    drop(csv);
    const request = server.expectOne(address);
    expect((request.request.body as FormData).get('file')).toEqual(csv);
    request.event({ type: HttpEventType.UploadProgress, loaded: 500, total: 2000 });
    TestBed.tick();
    expect(page.querySelector('[role=status]')?.textContent).toBe('Sending shelf-a3.csv: 25 % of 2\u00a0kB');
    request.flush(loggerFileDetail(), { status: 201, statusText: 'Created' });
    await fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe(`/loggers/${loggerFile().id}`);
  });

  it('says why a file was refused, and takes another', () => {
    drop(csv);
    server.expectOne(address).flush(
      {
        type: 'about:blank',
        title: 'Not usable',
        detail: 'This is a spreadsheet. Save it as CSV.',
        status: 422,
        code: 'SPREADSHEET_FILE',
      },
      { status: 422, statusText: 'x' },
    );
    TestBed.tick();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('This is a spreadsheet');
    expect(page.textContent).toContain('Choose a file');
  });

  it('stops sending when told to', () => {
    drop(csv);
    const request = server.expectOne(address);
    [...page.querySelectorAll('button')].find((one) => /Stop/.test(one.textContent ?? ''))?.click();
    expect(request.cancelled).toBe(true);
    TestBed.tick();
    expect(page.textContent).toContain('Choose a file');
  });

  it.each([
    ['several files', [csv, csv], 'One file at a time'],
    ['an empty file', [new File([], 'empty.csv')], 'empty.csv is empty'],
  ])('refuses %s without sending anything', (_, files, problem) => {
    drop(...files);
    expect(page.querySelector('[role=alert]')?.textContent).toContain(problem);
  });
});
