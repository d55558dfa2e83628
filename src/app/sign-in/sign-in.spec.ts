import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { provideRouter, Router } from '@angular/router';
import { account } from '../core/testing/account-builder';
import { ThemeChoice } from '../ui/theme/theme-choice';
import { SignIn } from './sign-in';

describe('signing in', () => {
  let fixture: ComponentFixture<SignIn>;
  let loader: HarnessLoader;
  let server: HttpTestingController;

  beforeEach(() => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
      ],
    });
    fixture = TestBed.createComponent(SignIn);
    loader = TestbedHarnessEnvironment.loader(fixture);
    server = TestBed.inject(HttpTestingController);
  });
  afterEach(() => server.verify());

  async function enter(email: string, password: string): Promise<void> {
    const [emailInput, passwordInput] = await loader.getAllHarnesses(MatInputHarness);
    await emailInput?.setValue(email);
    await passwordInput?.setValue(password);
  }
  const send = async (): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text: /Sign/ }))).click();
  const said = (): string =>
    (fixture.nativeElement as HTMLElement).querySelector('[role=alert]')?.textContent ?? '';

  async function refusedWith(status: number, headers = {}): Promise<string> {
    await enter('maren@example.org', 'not the right one');
    await send();
    server.expectOne('/api/v1/session').flush(null, { status, statusText: 'x', headers });
    await fixture.whenStable();
    return said();
  }

  it('goes on to the page that was asked for, in the view of the account', async () => {
    fixture.componentRef.setInput('to', '/alerts?open=true');
    await enter('maren@example.org', 'a long enough secret');
    await send();
    const request = server.expectOne('/api/v1/session');
    expect(request.request.body).toEqual({ email: 'maren@example.org', password: 'a long enough secret' });
    request.flush(account({ theme: 'lampsOff' }));
    await fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/alerts?open=true');
    expect(TestBed.inject(ThemeChoice).shown()).toBe('lamps-off');
  });

  it('with nothing entered says what is missing and asks nothing', async () => {
    await send();
    const fields = await loader.getAllHarnesses(MatFormFieldHarness);
    expect(await Promise.all(fields.map((field) => field.getTextErrors()))).toEqual([
      ['Enter the e-mail address that your room knows you by.'],
      ['Enter your password.'],
    ]);
  });

  it('with a wrong password says so without saying which of both is wrong', async () => {
    expect(await refusedWith(401)).toContain('don’t belong together');
  });

  it('too often says how long to wait', async () => {
    expect(await refusedWith(429, { 'Retry-After': '600' })).toContain('Wait 10 minutes');
  });

  it('without a connection says that the server can’t be reached', async () => {
    expect(await refusedWith(503)).toContain('can’t be reached');
  });

  it('shows the password and hides it again', async () => {
    const [, password] = await loader.getAllHarnesses(MatInputHarness);
    expect(await password?.getType()).toBe('password');
    await (
      await loader.getHarness(MatButtonHarness.with({ selector: '[aria-label="Show the password"]' }))
    ).click();
    expect(await password?.getType()).toBe('text');
    await (
      await loader.getHarness(MatButtonHarness.with({ selector: '[aria-label="Hide the password"]' }))
    ).click();
    expect(await password?.getType()).toBe('password');
  });

  it('after the session has ended says why', async () => {
    fixture.componentRef.setInput('ended', 'true');
    await fixture.whenStable();
    expect((fixture.nativeElement as HTMLElement).textContent).toContain('Your session has ended');
  });
});
