import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import type { Task } from '@shared/contracts/care';
import { task } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { lateness } from './lateness';
import { TodaysCare, type Tick } from './todays-care';

describe('how late care is', () => {
  it.each([
    ['2026-12-02', null],
    ['2026-12-01', null],
    ['2026-11-30', 'One day late'],
    ['2026-10-24', '38 days late'],
  ])('due on %s, on 1 December, is %s', (dueOn, words) => {
    expect(lateness(dueOn, '2026-12-01')).toBe(words);
  });
});

describe('today’s care', () => {
  let fixture: ComponentFixture<TodaysCare>;
  let ticks: Tick[];
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector: string): string =>
    (page().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();
  const box = (): Promise<MatCheckboxHarness> =>
    TestbedHarnessEnvironment.loader(fixture).getHarness(MatCheckboxHarness);

  async function shown(tasks: Task[], mayTick = true): Promise<void> {
    TestBed.configureTestingModule({ providers: providePlayedServer() });
    signedInAs();
    fixture = TestBed.createComponent(TodaysCare);
    Object.entries({ tasks, today: '2026-12-01', mayTick }).forEach(([name, value]) =>
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
    await shown([task({ dueOn: '2026-11-30' })]);
    expect(text('p')).toBe('One day late Half strength');
  });

  it('says when it was done and by whom, and no longer that it was late', async () => {
    await shown([task({ dueOn: '2026-11-30', doneAt: '2026-12-01T09:05:00Z', doneByName: 'Maren Oxley' })]);
    expect(text('p')).toBe('09:05 by Maren Oxley');
    expect(page().querySelector('li')?.classList).toContain('done');
  });

  it('asks for a tick, but shows it only once it is stored', async () => {
    await shown([task()]);
    await (await box()).toggle();
    expect(ticks).toEqual([{ task: task(), isDone: true }]);
    expect(await (await box()).isChecked()).toBe(false);
    const done = task({ doneAt: '2026-12-01T14:21:00Z' });
    fixture.componentRef.setInput('tasks', [done]);
    expect(await (await box()).isChecked()).toBe(true);
    await (await box()).toggle();
    expect(ticks[1]).toEqual({ task: done, isDone: false });
  });

  it('asks only once while a tick is under way', async () => {
    await shown([task()]);
    fixture.componentRef.setInput('busyIds', new Set([task().id]));
    expect(await (await box()).isDisabled()).toBe(true);
    page()
      .querySelector('mat-checkbox')
      ?.dispatchEvent(new MouseEvent('click', { bubbles: true }));
    expect(ticks).toEqual([]);
  });

  it('can’t be ticked by somebody who may only look', async () => {
    await shown([task()], false);
    expect(await (await box()).isDisabled()).toBe(true);
  });

  it('keeps what is due on a later day apart, with its day and nothing to tick', async () => {
    await shown([task({ dueOn: '2026-12-03' })]);
    expect(text('.quiet')).toBe('Nothing is due today.');
    expect(text('.coming-up b')).toBe('Feed strawberries · A1');
    expect(text('.coming-up p')).toBe('Thu 3 Dec · Jo Ashdown');
    expect(page().querySelector('.coming-up mat-checkbox')).toBeNull();
  });

  it('says so when nothing is due', async () => {
    await shown([]);
    expect(text('.quiet')).toBe('Nothing is due today.');
  });
});
