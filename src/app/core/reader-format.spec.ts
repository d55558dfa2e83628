import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { ReaderFormat } from './reader-format';
import { RoomClock } from './room-clock';
import { Session } from './session';
import { account, membership } from './testing/account-builder';
import { alert, boardAt } from './testing/board-builder';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('what a reader is told', () => {
  function formatFor(person: Parameters<typeof account>[0]): ReaderFormat {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])],
    });
    TestBed.inject(Session).load().subscribe();
    TestBed.inject(HttpTestingController).expectOne('/api/v1/account').flush(account(person));
    TestBed.inject(RoomClock).setBy(boardAt);
    return TestBed.inject(ReaderFormat);
  }

  it('is in their unit', () => {
    const format = formatFor({ temperatureUnit: 'fahrenheit' });
    expect(plain(format.value('airTemperature', 20))).toBe('68.0 °F');
    expect(format.value('airTemperature', null)).toBe('–');
    expect(plain(format.describe(alert()).title)).toBe('A1 air is 4.1 °F too warm');
  });

  it('is on the clock of their room', () => {
    const format = formatFor({ memberships: [membership({ timeZone: 'America/Halifax' })] });
    expect(format.time(boardAt)).toBe('10:20');
    expect(format.when('2026-12-01T03:54:00Z')).toBe('yesterday 23:54');
    expect(format.describe(alert()).sentence).toContain('since 09:54');
  });
});
