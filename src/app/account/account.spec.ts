import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioGroupHarness } from '@angular/material/radio/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { provideRouter } from '@angular/router';
import { usualMailChoice } from '@shared/mail/mail-choice';
import { Session } from '../core/session';
import { account, membership } from '../core/testing/account-builder';
import { Notices } from '../core/notices';
import { ThemeChoice } from '../ui/theme/theme-choice';
import { AccountPage } from './account';

describe('the account page', () => {
  let loader: HarnessLoader;
  let server: HttpTestingController;
  let fixture: ComponentFixture<AccountPage>;
  let page: HTMLElement;
  const notices = { say: jest.fn(), sayFailure: jest.fn() };

  beforeEach(async () => {
    localStorage.clear();
    jest.resetAllMocks();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
        { provide: Notices, useValue: notices },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account());
    fixture = TestBed.createComponent(AccountPage);
    fixture.detectChanges();
    server
      .expectOne(`/api/v1/rooms/${membership().roomId}/escalation`)
      .flush({ goNowMinutes: 60, lookTodayMinutes: 240 });
    server.expectOne('/api/v1/account/calendar-feed').flush({ madeAt: null });
    await fixture.whenStable();
    loader = TestbedHarnessEnvironment.loader(fixture);
    page = fixture.nativeElement as HTMLElement;
  });
  afterEach(() => server.verify());

  const press = async (text: RegExp): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  const inputs = async (selector: string): Promise<MatInputHarness> =>
    loader.getHarness(MatInputHarness.with({ selector }));

  it('saves a changed name, trimmed', async () => {
    await (await inputs('[autocomplete=name]')).setValue('  Maren Oxley-Bright ');
    await press(/Save the name/);
    const request = server.expectOne('/api/v1/account');
    expect(request.request.method).toBe('PATCH');
    expect(request.request.body).toEqual({ name: 'Maren Oxley-Bright' });
    request.flush(account({ name: 'Maren Oxley-Bright' }));
    expect(notices.say).toHaveBeenCalledWith('Name saved');
  });

  it('refuses a name of spaces without asking the server', async () => {
    await (await inputs('[autocomplete=name]')).setValue('   ');
    await press(/Save the name/);
    expect(page.querySelector('mat-error')?.textContent).toContain('Enter a name');
  });

  it('changes the unit of temperatures', async () => {
    const [unit] = await loader.getAllHarnesses(MatRadioGroupHarness);
    expect(await unit?.getCheckedValue()).toBe('celsius');
    await unit?.checkRadioButton({ label: '°F' });
    const request = server.expectOne('/api/v1/account');
    expect(request.request.body).toEqual({ temperatureUnit: 'fahrenheit' });
    request.flush(account({ temperatureUnit: 'fahrenheit' }));
    expect(TestBed.inject(Session).temperatureUnit()).toBe('°F');
  });

  it('changes the view at once, on this device and in the account', async () => {
    const [, view] = await loader.getAllHarnesses(MatRadioGroupHarness);
    expect(await view?.getCheckedValue()).toBe('system');
    await view?.checkRadioButton({ label: 'Lamps off' });
    expect(TestBed.inject(ThemeChoice).shown()).toBe('lamps-off');
    const request = server.expectOne('/api/v1/account');
    expect(request.request.body).toEqual({ theme: 'lampsOff' });
    request.flush(account({ theme: 'lampsOff' }));
  });

  it('chooses mails a room, and takes the choice back when it could not be saved', async () => {
    const over = await loader.getHarness(MatCheckboxHarness.with({ label: 'When it is over' }));
    await over.check();
    const request = server.expectOne(`/api/v1/rooms/${membership().roomId}/membership`);
    expect(request.request.body).toEqual({ cleared: true });
    expect(await over.isChecked()).toBe(true);
    request.flush(null, { status: 503, statusText: 'x' });
    expect(await over.isChecked()).toBe(false);
    expect(notices.sayFailure).toHaveBeenCalledTimes(1);
  });

  const choose = async (label: RegExp, text: string): Promise<void> => {
    const field = await loader.getHarness(MatFormFieldHarness.with({ floatingLabelText: label }));
    const select = await field.getControl(MatSelectHarness);
    await select?.open();
    await select?.clickOptions({ text });
  };
  const mailChoice = () => server.expectOne(`/api/v1/rooms/${membership().roomId}/membership`);

  it('turns the morning letter on with the first alerts that are left to it, and these back with it', async () => {
    await choose(/can wait a day$/, 'In the morning letter');
    const on = mailChoice();
    expect(on.request.body).toEqual({ lookToday: 'morningLetter', letterAt: '07:00' });
    on.flush(membership({ mails: { ...usualMailChoice, lookToday: 'morningLetter', letterAt: '07:00' } }));

    await (await loader.getHarness(MatCheckboxHarness.with({ label: 'Morning letter' }))).uncheck();
    const off = mailChoice();
    expect(off.request.body).toEqual({ letterAt: null, lookToday: 'atOnce', goNow: 'atOnce' });
    off.flush(membership());
  });

  it('sets quiet hours, and one end of them by itself', async () => {
    await (await loader.getHarness(MatCheckboxHarness.with({ label: 'Quiet hours' }))).check();
    mailChoice().flush(
      membership({ mails: { ...usualMailChoice, quietHours: { from: '22:00', to: '07:00' } } }),
    );
    const field = await loader.getHarness(MatFormFieldHarness.with({ floatingLabelText: 'To' }));
    const input = await field.getControl(MatInputHarness);
    await input?.setValue('06:15');
    await (await input?.host())?.dispatchEvent('change');
    const request = mailChoice();
    expect(request.request.body).toEqual({ quietHours: { from: '22:00', to: '06:15' } });
    request.flush(membership());
  });

  it('lets a keeper say when nobody’s silence is enough', async () => {
    await choose(/^Urgent, after/, 'Never');
    const request = server.expectOne(`/api/v1/rooms/${membership().roomId}/escalation`);
    expect(request.request.method).toBe('PUT');
    expect(request.request.body).toEqual({ goNowMinutes: null, lookTodayMinutes: 240 });
    request.flush({ goNowMinutes: null, lookTodayMinutes: 240 });
  });

  it('says since when and why mail to the person is refused', async () => {
    expect(page.querySelector('.refused')).toBeNull();
    TestBed.inject(Session).change({ name: 'Maren' }).subscribe();
    server
      .expectOne('/api/v1/account')
      .flush(account({ mailRefused: { since: '2026-04-15T10:00:00Z', reason: '550 No such mailbox here' } }));
    await fixture.whenStable();
    expect(page.querySelector('.refused')?.textContent).toContain('refused since Wed 15 Apr, 11:00');
    expect(page.querySelector('.refused')?.textContent).toContain('550 No such mailbox here');
  });

  it('changes the password and empties its fields', async () => {
    const current = await inputs('[formControlName=currentPassword]');
    await current.setValue('the old long secret');
    await (await inputs('[formControlName=newPassword]')).setValue('a new long secret');
    await press(/Change the password/);
    const request = server.expectOne('/api/v1/account/password');
    expect(request.request.body).toEqual({
      currentPassword: 'the old long secret',
      newPassword: 'a new long secret',
    });
    request.flush(null, { status: 204, statusText: 'No Content' });
    expect(await current.getValue()).toBe('');
    expect(page.querySelector('app-account-password mat-error')).toBeNull();
  });

  it('refuses a password under twelve characters without asking the server', async () => {
    await (await inputs('[formControlName=currentPassword]')).setValue('the old long secret');
    await (await inputs('[formControlName=newPassword]')).setValue('elevenchars');
    await press(/Change the password/);
    expect(page.querySelector('app-account-password mat-error')?.textContent).toContain('at least 12');
  });

  it('says when the current password is wrong', async () => {
    await (await inputs('[formControlName=currentPassword]')).setValue('not the old secret');
    await (await inputs('[formControlName=newPassword]')).setValue('a new long secret');
    await press(/Change the password/);
    const errors = [{ path: 'currentPassword', message: 'is not the one you use now' }];
    server
      .expectOne('/api/v1/account/password')
      .flush(
        { type: 'about:blank', title: 'Not changed', status: 422, code: 'INVALID', errors },
        { status: 422, statusText: 'x' },
      );
    await press(/Save the name/);
    server.expectOne('/api/v1/account').flush(account());
    expect(page.querySelector('app-account-password [role=alert]')?.textContent).toContain(
      'The current password is not the one you use now.',
    );
  });

  it('signs out', async () => {
    await press(/Sign out/);
    server.expectOne('/api/v1/session').flush(null, { status: 204, statusText: 'No Content' });
    expect(TestBed.inject(Session).account()).toBeNull();
  });
});
