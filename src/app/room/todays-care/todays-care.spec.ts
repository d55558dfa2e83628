import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { Task } from '@shared/contracts/care';
import type { ShownTask } from '../../core/care/with-waiting';
import { task } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { TodaysCare } from './todays-care';

const done = (changes: Partial<Task> = {}): Task =>
  task({ outcome: 'done', doneAt: '2026-12-01T09:05:00Z', ...changes });

describe('today’s care', () => {
  let fixture: ComponentFixture<TodaysCare>;
  let ticks: Task[];
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector: string): string =>
    (page().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();
  const box = (): HTMLButtonElement => {
    const found = page().querySelector<HTMLButtonElement>('[role=checkbox]');
    if (found === null) throw new Error('No tick');
    return found;
  };

  const asShown = (tasks: Task[]): ShownTask[] =>
    tasks.map((one) => ({ task: one, isWaiting: false, waitingPhotos: 0 }));

  async function shown(tasks: Task[], mayTick = true): Promise<void> {
    TestBed.configureTestingModule({ providers: providePlayedServer() });
    signedInAs();
    fixture = TestBed.createComponent(TodaysCare);
    Object.entries({ tasks: asShown(tasks), today: '2026-12-01', mayTick }).forEach(([name, value]) =>
      fixture.componentRef.setInput(name, value),
    );
    ticks = [];
    fixture.componentInstance.ticked.subscribe((tick) => ticks.push(tick));
    await fixture.whenStable();
  }

  it('says what, where, how and by whom', async () => {
    await shown([task()]);
    expect(text('b')).toBe('Feed strawberries · A1');
    expect(text('p')).toBe('Half strength');
    expect(text('.who')).toContain('Jo Ashdown');
    expect(text('.who [aria-hidden]')).toBe('JA');
  });

  it('names what is late as late', async () => {
    await shown([task({ dueOn: '2026-11-28', inTimeUntil: '2026-11-30' })]);
    expect(text('p')).toBe('One day late Half strength');
  });

  it('says when it was done and by whom, and no longer that it was late', async () => {
    await shown([done({ inTimeUntil: '2026-11-30', doneByName: 'Maren Oxley' })]);
    expect(text('p')).toBe('09:05 by Maren Oxley');
    expect(page().querySelector('li')?.classList).toContain('done');
  });

  it('names what was found not needed as that', async () => {
    await shown([done({ outcome: 'notNeeded' })]);
    expect(text('p')).toBe('Not needed, 09:05');
  });

  it('asks for a tick, and for taking it back', async () => {
    await shown([task()]);
    expect(box().getAttribute('aria-checked')).toBe('false');
    box().click();
    fixture.componentRef.setInput('tasks', asShown([done()]));
    await fixture.whenStable();
    expect(box().getAttribute('aria-checked')).toBe('true');
    box().click();
    expect(ticks).toEqual([task(), done()]);
  });

  it('says that a tick waits for a signal only when the signal is lost', async () => {
    await shown([]);
    fixture.componentRef.setInput('tasks', [{ task: done(), isWaiting: true, waitingPhotos: 0 }]);
    await fixture.whenStable();
    expect(text('p')).not.toContain('Waits');
    fixture.componentRef.setInput('isHeldUp', true);
    await fixture.whenStable();
    expect(text('p')).toContain('Waits for signal.');
  });

  it('can’t be ticked by somebody who may only look', async () => {
    await shown([task()], false);
    expect(box().disabled).toBe(true);
  });

  it('keeps what is due on a later day apart, with its day and nothing to tick', async () => {
    await shown([task({ dueOn: '2026-12-03' })]);
    expect(text('.quiet')).toBe('Nothing is due today.');
    expect(text('.coming-up b')).toBe('Feed strawberries · A1');
    expect(text('.coming-up p')).toBe('Thu 3 Dec · Jo Ashdown');
    expect(page().querySelector('.coming-up [role=checkbox]')).toBeNull();
  });

  it('says so when nothing is due', async () => {
    await shown([]);
    expect(text('.quiet')).toBe('Nothing is due today.');
  });
});
