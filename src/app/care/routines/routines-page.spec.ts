import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatMenuHarness } from '@angular/material/menu/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Routine } from '@shared/contracts/care-routines';
import type { Role } from '@shared/contracts/people';
import { liveSocket } from '../../core/live-socket';
import { account, membership } from '../../core/testing/account-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { signedInAs } from '../../core/testing/signed-in';
import { answerAll, members, roomAddress } from '../testing/answer-all';
import { routine } from '../testing/routine-builder';
import { RoutinesPage } from './routines-page';

describe('the page of routines', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  async function open(routines: Routine[], role: Role = 'grower', url = '/care/routines'): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'care/routines', component: RoutinesPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: new FakeSocket() },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(url);
    await answerAll(server, harness.fixture, { routines, members });
    page = harness.routeNativeElement as HTMLElement;
  }
  const text = (): string => (page.textContent ?? '').replace(/\s+/g, ' ');

  it('says what, when, by whom and when next', async () => {
    await open([
      routine({
        who: { how: 'person', personId: members[1].personId },
        season: { fromMonth: 3, toMonth: 10 },
      }),
    ]);
    expect(page.querySelector('h2')?.textContent?.trim()).toBe('Shelf A1');
    expect(text()).toContain('Every 2 days, March to October');
    expect(text()).toContain('always Jo Ashdown');
    expect(text()).toContain('Next tomorrow');
  });

  it('names a routine as late whose task is still open', async () => {
    await open([routine({ nextDueOn: '2026-11-28' })]);
    expect(page.querySelector('.late')?.textContent).toBe('Was due Sat 28 Nov');
  });

  it('names nothing as late that may wait', async () => {
    await open([routine({ nextDueOn: '2026-11-30', windowDays: 1 })]);
    expect(page.querySelector('.late')).toBeNull();
    expect(text()).toContain('Was due yesterday');
  });

  it('finds by title, place and kind, from the address', async () => {
    const other = routine({ id: members[0].personId, title: 'Tie in', kind: 'trim', placeLabel: 'B2' });
    await open([routine(), other], 'grower', '/care/routines?find=b2%20trim');
    expect([...page.querySelectorAll('li b')].map((title) => title.textContent)).toEqual(['Tie in']);
  });

  it('ends one once that is confirmed', async () => {
    await open([routine()]);
    const loader = TestbedHarnessEnvironment.documentRootLoader(harness.fixture);
    await (await loader.getHarness(MatMenuHarness)).clickItem({ text: /End it/ });
    await (await loader.getHarness(MatButtonHarness.with({ text: 'End the routine' }))).click();
    server.expectOne({ method: 'DELETE', url: `${roomAddress}/routines/${routine().id}` }).flush(null);
    await answerAll(server, harness.fixture, { routines: [] });
    expect(text()).toContain('No routine yet');
  });

  it('lets a helper look and change nothing', async () => {
    await open([routine()], 'helper');
    expect(page.querySelector('header a')).toBeNull();
    expect(page.querySelector('li button')).toBeNull();
  });
});
