import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Task } from '@shared/contracts/care';
import type { Role } from '@shared/contracts/people';
import { liveSocket } from '../../core/live-socket';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId, task } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { signedInAs } from '../../core/testing/signed-in';
import { answerAll, members, roomAddress } from '../testing/answer-all';
import { RecordPage } from './record-page';

const done = task({
  outcome: 'done',
  doneAt: '2026-11-30T09:05:00Z',
  doneByName: 'Jo Ashdown',
  millilitres: 600,
});

describe('the record of care', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  async function open(url: string, tasks: Task[], role: Role = 'grower', nextCursor: string | null = null) {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'care/record', component: RecordPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: new FakeSocket() },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(url);
    harness.fixture.detectChanges();
    const asked = server.expectOne(({ url: address }) => address === `${roomAddress}/care/record`);
    asked.flush({ tasks, nextCursor });
    await answerAll(server, harness.fixture, {
      'care/compliance': {
        due: 30,
        inTime: 28,
        late: 1,
        notDone: 1,
        share: 28 / 30,
        kinds: [{ kind: 'water', due: 30, inTime: 28, late: 1, notDone: 1, share: 28 / 30 }],
      },
      'care/yields': {
        crops: [
          {
            cropId: 'basil',
            crop: 'Basil',
            grams: 1240,
            count: 0,
            harvests: 6,
            plantings: [
              { plantingId: inventedId(500), label: 'Basil Corvid', grams: 1240, count: 0, harvests: 6 },
            ],
          },
        ],
      },
      racks: [],
      plantings: { plantings: [], nextCursor: null },
      members,
    });
    page = harness.routeNativeElement as HTMLElement;
    return asked.request.params;
  }
  const text = (selector: string): string =>
    (page.querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();

  it('tells by the day what was done, how much and by whom', async () => {
    await open('/care/record', [done]);
    expect(text('app-record-list h3')).toBe('Monday 30 November');
    expect(text('app-record-list li')).toContain('Feed strawberries · A1');
    expect(text('app-record-list li')).toContain('600 ml');
    expect(text('app-record-list li')).toContain('09:05 by Jo Ashdown');
  });

  it('says when it was due of what was done late, and what was not done', async () => {
    await open('/care/record', [
      { ...done, dueOn: '2026-11-28', inTimeUntil: '2026-11-29' },
      task({ id: inventedId(802), outcome: 'couldNot', doneAt: '2026-11-30T08:00:00Z', note: 'No key' }),
    ]);
    expect(text('.by small')).toBe('due 28 Nov 2026');
    expect(text('.outcome')).toBe('Could not be done');
    expect(text('app-record-list')).toContain('No key');
  });

  it('asks by the address, and saves the same as CSV', async () => {
    const params = await open('/care/record?kind=water&from=2026-11-01&to=2026-11-30', [done]);
    expect([params.get('kind'), params.get('from'), params.get('to')]).toEqual([
      'water',
      '2026-11-01',
      '2026-12-01',
    ]);
    expect(page.querySelector('header a')?.getAttribute('href')).toBe(
      `${roomAddress}/care/record.csv?kind=water&from=2026-11-01&to=2026-12-01`,
    );
  });

  it('sums up what was in time and what was harvested', async () => {
    await open('/care/record', [done]);
    expect(text('app-compliance-card .figure')).toBe('93 %');
    expect(text('app-compliance-card')).toContain('28 of 30 tasks were done, or found not needed, in time.');
    expect(text('app-yields-card')).toContain('1.24 kg');
    expect(page.querySelector('app-yields-card a')?.getAttribute('href')).toBe(
      `/plantings/${inventedId(500)}`,
    );
  });

  it('goes on to earlier care by the cursor', async () => {
    await open('/care/record', [done], 'grower', 'next');
    page.querySelector<HTMLButtonElement>('.more')?.click();
    const request = server.expectOne(({ url }) => url === `${roomAddress}/care/record`);
    expect(request.request.params.get('cursor')).toBe('next');
    request.flush({
      tasks: [{ ...done, id: inventedId(803), title: 'Turn pots', doneAt: '2026-11-29T09:00:00Z' }],
      nextCursor: null,
    });
    await harness.fixture.whenStable();
    expect([...page.querySelectorAll('app-record-list h3')].map((day) => day.textContent)).toEqual([
      'Monday 30 November',
      'Sunday 29 November',
    ]);
    expect(page.querySelector('.more')).toBeNull();
  });

  it('offers no file to a helper', async () => {
    await open('/care/record', [done], 'helper');
    expect(page.querySelector('header a')).toBeNull();
  });

  it('tells nothing yet from nothing of that kind', async () => {
    await open('/care/record', []);
    expect(text('app-empty-state h2')).toBe('Nothing done so far');
    TestBed.resetTestingModule();
    await open('/care/record?kind=trim', []);
    expect(text('app-empty-state h2')).toBe('Nothing of that kind');
  });
});
