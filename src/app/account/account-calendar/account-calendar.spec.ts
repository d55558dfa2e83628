import { Clipboard } from '@angular/cdk/clipboard';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { Notices } from '../../core/notices';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { AccountCalendar } from './account-calendar';

const address = '/api/v1/account/calendar-feed';
const made = {
  madeAt: '2026-12-01T14:00:00Z',
  url: 'https://room.example.org/api/v1/calendar/secret/care.ics',
};

describe('the calendar feed', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<AccountCalendar>;
  let loader: HarnessLoader;
  const notices = { say: jest.fn(), sayFailure: jest.fn() };
  const copy = jest.fn();

  async function open(madeAt: string | null): Promise<void> {
    jest.resetAllMocks();
    TestBed.configureTestingModule({
      providers: [
        providePlayedServer(),
        { provide: Notices, useValue: notices },
        { provide: Clipboard, useValue: { copy } },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs();
    fixture = TestBed.createComponent(AccountCalendar);
    fixture.detectChanges();
    server.expectOne(address).flush({ madeAt });
    await fixture.whenStable();
    loader = TestbedHarnessEnvironment.documentRootLoader(fixture);
  }
  const press = async (text: string): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  const text = (): string => (fixture.nativeElement as HTMLElement).textContent ?? '';

  it('is made, and its link shown once to be copied', async () => {
    await open(null);
    await press('Make the link');
    server.expectOne({ method: 'POST', url: address }).flush(made, { status: 201, statusText: 'x' });
    await fixture.whenStable();
    expect(await (await loader.getHarness(MatInputHarness)).getValue()).toBe(made.url);
    copy.mockReturnValue(true);
    await press('Copy the link');
    expect(copy).toHaveBeenCalledWith(made.url);
    expect(notices.say).toHaveBeenCalledWith('Link copied');
  });

  it('that was made before shows no link, and a new one only once that is confirmed', async () => {
    await open(made.madeAt);
    expect(text()).toContain('There is a link since 14:00.');
    await press('Renew it');
    server.expectNone({ method: 'POST', url: address });
    await press('Renew the link');
    server.expectOne({ method: 'POST', url: address }).flush(made, { status: 201, statusText: 'x' });
    await fixture.whenStable();
    expect(await (await loader.getHarness(MatInputHarness)).getValue()).toBe(made.url);
  });

  it('ends once that is confirmed', async () => {
    await open(made.madeAt);
    await press('End it');
    await press('End the feed');
    server.expectOne({ method: 'DELETE', url: address }).flush(null);
    await fixture.whenStable();
    expect(text()).toContain('Make the link');
  });
});
