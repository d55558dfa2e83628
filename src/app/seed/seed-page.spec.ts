import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Role } from '@shared/contracts/people';
import type { SeedLot } from '@shared/contracts/seed';
import { liveSocket } from '../core/live-socket';
import { account, membership } from '../core/testing/account-builder';
import { inventedId } from '../core/testing/board-builder';
import { FakeSocket } from '../core/testing/fake-socket';
import { signedInAs } from '../core/testing/signed-in';
import { SeedPage } from './seed-page';
import { seedLot } from './testing/seed-lot-builder';

const address = `/api/v1/rooms/${membership().roomId}/seed-lots`;
const young = seedLot({
  id: inventedId(601),
  cropName: 'Basil',
  variety: 'Broadleaf',
  age: { years: 0, lifeYears: { low: 5, high: 5 }, sources: [], standing: 'withinLife', useFirst: false },
  expectation: null,
});

describe('the seed page', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;

  async function open(url: string, lots: SeedLot[], role: Role = 'grower'): Promise<HTMLElement> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'seed', component: SeedPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: new FakeSocket() },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(url);
    const request = server.expectOne(({ url: asked }) => asked === address);
    expect(request.request.params.get('finished')).toBe(url.includes('show=all') ? 'with' : 'without');
    request.flush(lots);
    await harness.fixture.whenStable();
    return harness.routeNativeElement as HTMLElement;
  }
  const titles = (page: HTMLElement): (string | undefined)[] =>
    [...page.querySelectorAll('li b')].map((title) => title.textContent?.trim());

  it('keeps the order of the server, with age, badge, what is left and what may come up', async () => {
    const page = await open('/seed', [seedLot(), young]);
    expect(titles(page)).toEqual(['Leek Winter Piper', 'Basil Broadleaf']);
    const [leek, basil] = [...page.querySelectorAll('li')];
    expect(leek?.textContent).toContain('Use first');
    expect(leek?.textContent).toContain('packed 2024: 2 years old, such seed keeps 2 to 3 years');
    expect(leek?.textContent).toContain('40 seeds left');
    expect(leek?.textContent).toContain('80\u00a0% (66 to 90\u00a0%)');
    expect(basil?.textContent).toContain('germination not known');
    expect(basil?.querySelector('.badge')).toBeNull();
  });

  it('finds by crop, variety, source and lot number, from the address', async () => {
    const page = await open('/seed?find=piper%2017', [seedLot(), young]);
    expect(titles(page)).toEqual(['Leek Winter Piper']);
  });

  it('tells no seed at all from none of that name', async () => {
    const none = await open('/seed', []);
    expect(none.textContent).toContain('No seed written down yet');
    expect(none.querySelector('app-empty-state a')?.getAttribute('href')).toBe('/seed/new');
    TestBed.resetTestingModule();
    const other = await open('/seed?find=quince', [seedLot()]);
    expect(other.textContent).toContain('No seed of that name');
  });

  it('asks for what was put aside too when all is to be seen', async () => {
    const page = await open('/seed?show=all', [seedLot({ finishedOn: '2026-11-01' })]);
    expect(page.textContent).toContain('Put aside');
  });

  it('lets a helper look and not add', async () => {
    const page = await open('/seed', [seedLot()], 'helper');
    expect(titles(page)).toHaveLength(1);
    expect(page.textContent).not.toContain('Add a packet');
  });
});
