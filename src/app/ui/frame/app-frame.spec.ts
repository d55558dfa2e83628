import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { Component, signal } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatMenuHarness } from '@angular/material/menu/testing';
import { provideRouter } from '@angular/router';
import { ThemeChoice } from '../theme/theme-choice';
import { AppFrame } from './app-frame';
import type { Connection, RoomChoice } from './destination';

const places = ['Room', 'Plantings', 'Care', 'Alerts', 'Sowing', 'Seed'];

@Component({
  template: `
    <app-frame
      roomName="Plum Yard"
      accountLink="/account"
      [destinations]="destinations"
      [personName]="person()"
      [otherRooms]="[{ id: '2', name: 'Cellar' }]"
      [connection]="connection()"
      [badges]="{ '/alerts': 3, '/seed': 1 }"
      (signOutChosen)="signedOut = signedOut + 1"
      (roomChosen)="chosen = $event"
    >
      <h1>The page</h1>
    </app-frame>
  `,
  imports: [AppFrame],
})
class Host {
  readonly destinations = places.map((label) => ({ label, icon: 'grain', link: `/${label.toLowerCase()}` }));
  readonly person = signal<string | null>('Mo Okafor-Lind');
  readonly connection = signal<Connection>('live');
  signedOut = 0;
  chosen: RoomChoice | null = null;
}

describe('the frame', () => {
  let fixture: ComponentFixture<Host>;
  const element = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const links = (selector: string): string[] =>
    [...element().querySelectorAll(`${selector} app-navigation-link a > span:first-of-type`)].map(
      (e) => e.textContent,
    );
  const menu = (): Promise<MatMenuHarness> =>
    TestbedHarnessEnvironment.loader(fixture).getHarness(MatMenuHarness.with({ selector: '.more' }));

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    fixture = TestBed.createComponent(Host);
    await fixture.whenStable();
  });

  it('shows every destination in the rail, and four with "More" in the bar', () => {
    expect(links('.rail')).toEqual(places);
    expect(links('.bar')).toEqual(['Room', 'Plantings', 'Care', 'Alerts']);
    expect(element().querySelector('.bar .more')?.textContent).toContain('More');
  });

  it('says what waits at a destination, also behind "More"', () => {
    expect(element().querySelector('.bar a[href="/alerts"]')?.textContent).toContain(', 3 waiting');
    expect(element().querySelector('.more')?.textContent).toContain(', 1 waiting');
  });

  it('before anyone is signed in shows the page alone', async () => {
    fixture.componentInstance.person.set(null);
    await fixture.whenStable();
    expect(element().querySelectorAll('nav')).toHaveLength(0);
    expect(element().querySelector('main h1')?.textContent).toBe('The page');
  });

  it('moves the focus past the navigation on request', () => {
    element().querySelector<HTMLAnchorElement>('.skip')?.click();
    expect(document.activeElement).toBe(element().querySelector('main'));
  });

  it.each([
    ['live', ''],
    ['reconnecting', 'sync Reconnecting to the room. Values may be a little old.'],
    ['offline', 'cloud_off No connection to the room. What you see was true when the connection was lost.'],
  ] as const)('when the connection is %s says "%s" politely', async (connection, words) => {
    fixture.componentInstance.connection.set(connection);
    await fixture.whenStable();
    const status = element().querySelector('[role=status]');
    expect(status?.textContent?.replace(/\s+/g, ' ').trim()).toBe(words);
  });

  it('offers further places, other rooms, the account and the way out in its menu', async () => {
    const more = await menu();
    await more.open();
    const items = await more.getItems();
    const texts = await Promise.all(items.map((item) => item.getText()));
    ['Sowing', 'Seed', 'Cellar', 'Lamps-off view', 'Your account', 'Sign out'].forEach((words) =>
      expect(texts.some((text) => text.includes(words))).toBe(true),
    );
  });

  it('passes on a chosen room and a wish to sign out, and changes the view itself', async () => {
    await (await menu()).clickItem({ text: /Cellar/ });
    expect(fixture.componentInstance.chosen).toEqual({ id: '2', name: 'Cellar' });
    await (await menu()).clickItem({ text: /Lamps-off view/ });
    expect(TestBed.inject(ThemeChoice).shown()).toBe('lamps-off');
    await (await menu()).clickItem({ text: /Sign out/ });
    expect(fixture.componentInstance.signedOut).toBe(1);
  });

  afterEach(() => localStorage.clear());
});
