import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import type { CareDays } from '@shared/contracts/care';
import type { Role } from '@shared/contracts/people';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId, task } from '../../core/testing/board-builder';
import { careDays } from '../../core/testing/care-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { TodayPage } from './today-page';

const base = `/api/v1/rooms/${membership().roomId}`;
const mine = { holders: [{ personId: account().id, name: account().name }], personName: account().name };

describe('today’s care', () => {
  let fixture: ComponentFixture<TodayPage>;
  let server: HttpTestingController;
  let socket: FakeSocket;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector = ':scope'): string =>
    (page().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();
  const button = (words: string): HTMLButtonElement => {
    const found = [...page().querySelectorAll('button')].find((one) => one.textContent.trim() === words);
    if (found === undefined) throw new Error(`No button ${words}`);
    return found;
  };

  async function settled(): Promise<void> {
    for (let turn = 0; turn < 5; turn += 1) await new Promise((resolve) => setTimeout(resolve));
    await fixture.whenStable();
  }
  async function opened(role: Role = 'helper'): Promise<void> {
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(socket),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    fixture = TestBed.createComponent(TodayPage);
    await settled();
  }
  async function shown(days: CareDays = careDays(), role: Role = 'helper'): Promise<void> {
    await opened(role);
    server.expectOne(`${base}/care/days`).flush(days);
    await settled();
  }
  afterEach(() => server.verify());

  it('holds its place while it is fetched, and says when it can’t be', async () => {
    await opened();
    expect(text('app-loading-lines')).toBe('Loading today’s care');
    server.expectOne(`${base}/care/days`).flush(null, { status: 503, statusText: 'x' });
    await settled();
    expect(text('[role=alert]')).toContain('Today’s care could not be fetched');
  });

  it('stands under whose it is, late named as late, tomorrow folded', async () => {
    const nobodys = task({ id: inventedId(801), title: 'Turn the basil', holders: [], cover: 'uncovered' });
    const later = task({ id: inventedId(802), title: 'Pick chard', dueOn: '2026-12-02' });
    await shown(careDays({ tasks: [task({ ...mine, inTimeUntil: '2026-11-29' }), nobodys, later] }));
    const headings = [...page().querySelectorAll('section > h2')].map((one) => one.textContent.trim());
    expect(headings).toEqual(['Yours', 'Nobody’s yet']);
    expect(text('section em')).toBe('2 days late.');
    expect(text('details summary')).toBe('Tomorrow · 1');
    expect(page().querySelector('details')?.open).toBe(false);
  });

  it('says what is next when nothing is due', async () => {
    await shown(careDays({ tasks: [task({ dueOn: '2026-12-02' })] }));
    expect(text('app-empty-state')).toContain('Next is Feed strawberries · A1, tomorrow.');
  });

  it('asks for a reason before a task is closed as not needed, and sends it', async () => {
    await shown(careDays({ tasks: [task(mine)] }));
    page().querySelector<HTMLElement>('[aria-expanded]')?.click();
    await settled();
    expect(text('app-caution-line')).toContain('Usual caution');
    button('Not needed').click();
    await settled();
    expect(text('app-problem-text')).toContain('Say why');
    const note = page().querySelector('textarea');
    if (note !== null) note.value = 'still moist';
    note?.dispatchEvent(new Event('input'));
    button('Not needed').click();
    await settled();
    const request = server.expectOne(`${base}/tasks/${task().id}/completion`);
    expect(request.request.body).toEqual({ outcome: 'notNeeded', note: 'still moist' });
    request.flush(
      task({ ...mine, outcome: 'notNeeded', doneAt: '2026-12-01T14:20:00Z', note: 'still moist' }),
    );
    await settled();
    expect(text('.closed')).toContain('Not needed 14:20');
    expect(text('header p')).toContain('All done for today');
  });

  it('takes over what is told, in its place', async () => {
    await shown(careDays({ tasks: [task(mine)] }));
    const row = page().querySelector('app-task-row');
    socket.tell('task:changed', task({ ...mine, outcome: 'done', doneAt: '2026-12-01T14:19:00Z' }));
    await settled();
    expect(page().querySelector('[role=checkbox]')?.getAttribute('aria-checked')).toBe('true');
    expect(page().querySelector('app-task-row')).toBe(row);
  });

  it('lets a viewer look only', async () => {
    await shown(careDays(), 'viewer');
    expect(page().querySelector<HTMLButtonElement>('[role=checkbox]')?.disabled).toBe(true);
    expect(text()).not.toContain('Add care');
  });
});
