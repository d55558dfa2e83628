import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { Board } from '@shared/contracts/board';
import { RoomClock } from '../../core/room-clock';
import { board } from '../../core/testing/board-builder';
import { ThemeChoice } from '../../ui/theme/theme-choice';
import { RoomHeading } from './room-heading';

describe('the heading of the room', () => {
  let fixture: ComponentFixture<RoomHeading>;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const words = (): string =>
    (page().querySelector('p')?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();
  const button = (text: string): HTMLButtonElement | undefined =>
    [...page().querySelectorAll('button')].find((one) => one.textContent.includes(text));

  async function shown(changes: Partial<Board> = {}, mayNote = true): Promise<void> {
    localStorage.clear();
    TestBed.inject(RoomClock).setBy('2026-12-01T14:20:00Z');
    fixture = TestBed.createComponent(RoomHeading);
    fixture.componentRef.setInput('board', board(changes));
    fixture.componentRef.setInput('mayNote', mayNote);
    await fixture.whenStable();
  }

  it('says day and time in the room, what is measured and how fresh it is', async () => {
    await shown();
    expect(page().querySelector('h1')?.textContent).toBe('Kestrel Lane growing room');
    expect(words()).toBe('Tuesday 1 December, 14:20 · 1 shelf, 3 sensors reporting · last reading 4 s ago');
  });

  it('goes by the room’s clock, not the reader’s', async () => {
    await shown({ timeZone: 'Pacific/Auckland' });
    expect(words()).toContain('Wednesday 2 December, 03:20');
  });

  it('says how many of the sensors report when some don’t', async () => {
    await shown({ sensorsReporting: 2 });
    expect(words()).toContain('2 of 3 sensors reporting');
  });

  it('without any reading says so', async () => {
    await shown({ racks: [] });
    expect(words()).toContain('0 shelves, 3 sensors reporting · no reading yet');
  });

  it('changes the view and back', async () => {
    await shown();
    button('Lamps-off view')?.click();
    await fixture.whenStable();
    expect(TestBed.inject(ThemeChoice).shown()).toBe('lamps-off');
    button('Day view')?.click();
    expect(TestBed.inject(ThemeChoice).shown()).toBe('day');
  });

  it('offers a note only to those who may write one', async () => {
    await shown();
    let wanted = 0;
    fixture.componentInstance.noteWanted.subscribe(() => (wanted += 1));
    button('Note an observation')?.click();
    expect(wanted).toBe(1);
    fixture.componentRef.setInput('mayNote', false);
    await fixture.whenStable();
    expect(button('Note an observation')).toBeUndefined();
  });
});
