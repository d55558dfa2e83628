import { TestBed } from '@angular/core/testing';
import { RoomClock } from './room-clock';

describe('the room clock', () => {
  const start = Date.parse('2026-12-01T14:20:03Z');

  beforeEach(() => jest.useFakeTimers({ now: start }));
  afterEach(() => jest.useRealTimers());

  it('goes by this device until the server has said its time, then by the server', () => {
    const clock = TestBed.inject(RoomClock);
    expect(clock.now()).toBe(start);
    clock.setBy('2026-12-01T14:25:00Z');
    expect(clock.now()).toBe(Date.parse('2026-12-01T14:25:00Z'));
    jest.advanceTimersByTime(2000);
    expect(clock.now()).toBe(Date.parse('2026-12-01T14:25:02Z'));
  });

  it('has a calm hand that moves every ten seconds', () => {
    const clock = TestBed.inject(RoomClock);
    expect(clock.calmNow()).toBe(Date.parse('2026-12-01T14:20:00Z'));
    jest.advanceTimersByTime(6000);
    expect(clock.calmNow()).toBe(Date.parse('2026-12-01T14:20:00Z'));
    jest.advanceTimersByTime(1000);
    expect(clock.calmNow()).toBe(Date.parse('2026-12-01T14:20:10Z'));
  });

  it('stops with the application', () => {
    TestBed.inject(RoomClock);
    expect(jest.getTimerCount()).toBe(1);
    TestBed.resetTestingModule();
    expect(jest.getTimerCount()).toBe(0);
  });
});
