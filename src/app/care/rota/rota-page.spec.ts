import type { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { BreakpointObserver } from '@angular/cdk/layout';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatMenuHarness } from '@angular/material/menu/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { OpenSwap, Task } from '@shared/contracts/care';
import type { Rota } from '@shared/contracts/care-rota';
import type { Role } from '@shared/contracts/people';
import { dayAfter } from '@shared/growing/calendar-day';
import { of, Subject } from 'rxjs';
import { liveSocket } from '../../core/live-socket';
import { Notices } from '../../core/notices';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId, task } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { signedInAs } from '../../core/testing/signed-in';
import { answerAll, members, roomAddress } from '../testing/answer-all';
import { RotaPage } from './rota-page';

const [maren, jo] = members;
const joHolds = { holders: [{ personId: jo.personId, name: jo.name }], personName: jo.name };

const rota: Rota = {
  isKept: true,
  week: Array.from({ length: 7 }, (_, index) => ({ weekday: index + 1, isClosed: false, onDuty: [] })),
  days: Array.from({ length: 7 }, (_, index) => ({
    day: dayAfter('2026-11-30', index),
    isClosed: index === 6,
    onDuty: index === 1 ? joHolds.holders : [],
    absent: [],
    isException: false,
    note: '',
  })),
  absences: [],
  uncovered: [],
};

function offer(changes: Partial<OpenSwap> = {}): OpenSwap {
  return {
    id: inventedId(900),
    offeredById: jo.personId,
    offeredByName: jo.name,
    toPersonId: null,
    toPersonName: null,
    note: 'At the dentist',
    offeredAt: '2026-12-01T08:00:00Z',
    ...changes,
  };
}

describe('the page of the rota', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let page: HTMLElement;
  let undo: Subject<void>;
  const notices = { say: jest.fn(), sayFailure: jest.fn(), sayUndoable: jest.fn() };

  async function open(tasks: Task[], role: Role = 'keeper', isWide = true): Promise<void> {
    undo = new Subject();
    jest.resetAllMocks();
    notices.sayUndoable.mockReturnValue(undo);
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'care/rota', component: RotaPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: new FakeSocket() },
        { provide: Notices, useValue: notices },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
        { provide: BreakpointObserver, useValue: { observe: () => of({ matches: isWide }) } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create('/care/rota');
    await answer(tasks);
    loader = TestbedHarnessEnvironment.documentRootLoader(harness.fixture);
    page = harness.routeNativeElement as HTMLElement;
  }

  async function answer(tasks: Task[]): Promise<void> {
    const swaps = tasks.flatMap((one) => (one.swap === null ? [] : [{ ...one.swap, task: one }]));
    const uncovered = tasks.filter(({ cover }) => cover === 'uncovered');
    await answerAll(server, harness.fixture, {
      rota: { ...rota, uncovered },
      tasks,
      swaps,
      'rota/share': { shares: [], uncoveredTasks: uncovered.length },
      members,
    });
  }

  /** Chooses in the menu of the only task, by the ways that its lines lead. */
  async function choose(...lines: readonly RegExp[]): Promise<void> {
    const menu = await loader.getHarness(MatMenuHarness.with({ selector: '.chip' }));
    const [first, ...others] = lines.map((text) => ({ text }));
    if (first !== undefined) await menu.clickItem(first, ...others);
  }
  const rowTitles = (): (string | undefined)[] =>
    [...page.querySelectorAll('tbody th')].map((title) => title.textContent?.replace(/\s+/g, ' ').trim());

  it('is a table of people by days, with what is short of hands first', async () => {
    await open([
      task({ ...joHolds, id: inventedId(801) }),
      task({ holders: [], personName: null, cover: 'uncovered' }),
    ]);
    expect(rowTitles().slice(0, 3)).toEqual(['Short of hands', 'Maren Oxley you', 'Jo Ashdown']);
    expect(page.querySelector('.short')?.textContent).toContain('One task is short of hands.');
    expect(page.querySelector('thead th[aria-current=date]')?.textContent).toContain('Tue 1 Dec');
    expect(page.querySelectorAll('thead .shut-word')).toHaveLength(1);
  });

  it('moves a task to another day by its menu, and back', async () => {
    await open([task(joHolds)]);
    await choose(/Move to another day/, /Thu 3 Dec/);
    const address = `${roomAddress}/tasks/${task().id}/day`;
    const moved = task({ ...joHolds, dueOn: '2026-12-03', movedFrom: '2026-12-01' });
    const request = server.expectOne({ method: 'PUT', url: address });
    expect(request.request.body).toEqual({ dueOn: '2026-12-03' });
    request.flush(moved);
    await answer([moved]);
    expect(notices.sayUndoable).toHaveBeenCalledWith(
      '“Feed strawberries” moved to Thu 3 Dec, with Jo Ashdown',
    );
    undo.next();
    const back = server.expectOne({ method: 'PUT', url: address });
    expect(back.request.body).toEqual({ dueOn: '2026-12-01' });
    back.flush(task(joHolds));
    await answer([task(joHolds)]);
  });

  it('gives a task to somebody, and back to those who held it', async () => {
    await open([task(joHolds)]);
    await choose(/Give to somebody/, /Maren Oxley/);
    const address = `${roomAddress}/tasks/${task().id}/holders`;
    const request = server.expectOne({ method: 'PUT', url: address });
    expect(request.request.body).toEqual({ personIds: [maren.personId] });
    const given = task({ holders: [{ personId: maren.personId, name: maren.name }], personName: maren.name });
    request.flush(given);
    await answer([given]);
    undo.next();
    const back = server.expectOne({ method: 'PUT', url: address });
    expect(back.request.body).toEqual({ personIds: [jo.personId] });
    back.flush(task(joHolds));
    await answer([task(joHolds)]);
  });

  it('lets a helper take what is offered, and move nothing', async () => {
    await open([task({ ...joHolds, swap: offer() })], 'helper');
    const menu = await loader.getHarness(MatMenuHarness.with({ selector: '.chip' }));
    await menu.open();
    expect((await Promise.all((await menu.getItems()).map((item) => item.getText()))).join()).toMatch(
      /Take it$/,
    );
    await menu.close();
    expect(page.querySelector('app-swaps-card')?.textContent).toContain('today, from Jo Ashdown to anybody');
    page.querySelector<HTMLButtonElement>('app-swaps-card button')?.click();
    server
      .expectOne({ method: 'PUT', url: `${roomAddress}/swaps/${offer().id}/taking` })
      .flush(task({ holders: [], cover: 'held' }));
    await answer([]);
    expect(notices.say).toHaveBeenCalledWith('“Feed strawberries” is yours. Jo Ashdown is told.');
  });

  it('does not offer to take what is for somebody else', async () => {
    await open(
      [task({ ...joHolds, swap: offer({ toPersonId: inventedId(5), toPersonName: 'Ada Fenn' }) })],
      'helper',
    );
    expect(page.querySelector('app-swaps-card button')).toBeNull();
  });

  it('shows a viewer the week without anything to press in it', async () => {
    await open([task(joHolds)], 'viewer');
    expect(page.querySelector('app-week-table button')).toBeNull();
    expect(page.querySelector('app-task-chip')?.textContent).toContain('Feed strawberries');
  });

  it('is a list of days on a phone, a pair told once', async () => {
    const pair = [...joHolds.holders, { personId: maren.personId, name: maren.name }];
    await open([task({ holders: pair, personName: 'Jo Ashdown and Maren Oxley' })], 'keeper', false);
    expect(page.querySelector('table.week, app-week-table')).toBeNull();
    const today = [...page.querySelectorAll('app-week-days section')][1];
    expect(today?.querySelector('h2')?.textContent).toContain('Tue 1 Dec');
    expect(today?.textContent).toContain('On duty: Jo Ashdown.');
    expect(today?.querySelectorAll('app-task-chip')).toHaveLength(1);
    expect(today?.textContent).toContain('Jo Ashdown and Maren Oxley');
  });

  it('sets a day apart from the usual week', async () => {
    await open([]);
    page.querySelector<HTMLButtonElement>('[aria-label$="on Thu 3 Dec"]')?.click();
    await harness.fixture.whenStable();
    document
      .querySelector<HTMLInputElement>('[value=closed] input, mat-radio-button:last-of-type input')
      ?.click();
    await harness.fixture.whenStable();
    document.querySelector<HTMLButtonElement>('mat-dialog-actions [type=submit]')?.click();
    const request = server.expectOne({ method: 'PUT', url: `${roomAddress}/rota/days/2026-12-03` });
    expect(request.request.body).toEqual({ isClosed: true, personIds: null, note: '' });
    request.flush({ ...rota.days[3], isClosed: true, isException: true });
    await answer([]);
    expect(notices.say).toHaveBeenCalledWith('The day is set; open tasks follow it');
  });
});
