import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatSnackBar } from '@angular/material/snack-bar';
import type { Task } from '@shared/contracts/care';
import type { Role } from '@shared/contracts/people';
import type { Shelf } from '@shared/contracts/rooms';
import { of, Subject } from 'rxjs';
import { PlanChanges } from './plan-changes';
import { account, membership } from './testing/account-builder';
import { shelfAdvice } from './testing/advice-builder';
import { inventedId, task } from './testing/board-builder';
import { providePlayedServer, signedInAs } from './testing/signed-in';

const base = `/api/v1/rooms/${membership().roomId}`;
const shelfPath = `${base}/shelves/${inventedId(1)}`;
const switchLamps = task({ kind: 'switchLamps', shelfId: inventedId(1), title: 'Switch A3 lamps on' });
const dark = { switchesOn: null, switchesOff: null };

function shelf(changes: Partial<Shelf> = {}): Shelf {
  return {
    id: inventedId(1),
    rackId: inventedId(300),
    label: 'A3',
    position: 1,
    widthCm: null,
    depthCm: null,
    leafOffsetC: 0,
    lamps: [],
    lampHours: dark,
    heatMat: { watts: 20, isOn: true },
    ...changes,
  };
}

describe('a ticked task that switched something on a shelf', () => {
  let server: HttpTestingController;
  let undo: Subject<void>;
  const open = jest.fn(() => ({ onAction: () => undo }));
  const said = (): string | undefined => (open.mock.lastCall as unknown as [string] | undefined)?.[0];

  function setUp(role: Role = 'grower'): void {
    undo = new Subject();
    open.mockClear();
    TestBed.configureTestingModule({
      providers: [...providePlayedServer(), { provide: MatSnackBar, useValue: { open } }],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
  }
  function ticked(done: Task, ask = jest.fn(() => of(false))): jest.Mock {
    TestBed.inject(PlanChanges).sayTicked(done, ask).subscribe();
    return ask;
  }
  function answer(advice = shelfAdvice(), here = shelf()): void {
    const rack = { id: inventedId(300), name: 'Rack A', note: '', position: 1, shelves: [here] };
    server.expectOne(`${base}/racks`).flush([rack]);
    server.expectOne(`${shelfPath}/advice`).flush(advice);
  }
  const lampsOn = shelfAdvice({
    lamps: { state: 'on', hours: 12, reason: 'Leek is up.', change: 'switchOn' },
  });
  afterEach(() => server.verify());

  it('offers the hours that advice comes to, plans them, and takes them back', () => {
    setUp();
    const ask = ticked(
      switchLamps,
      jest.fn(() => of(true)),
    );
    answer(lampsOn);

    expect(ask).toHaveBeenCalledWith(
      expect.objectContaining({
        title: 'Plan the lamps of A3 06:00–18:00?',
        text: expect.stringContaining('planned dark all day so far') as string,
      }),
    );
    const planned = server.expectOne(`${shelfPath}/lamp-hours`);
    expect(planned.request.body).toEqual({ switchesOn: '06:00', switchesOff: '18:00' });
    planned.flush(shelf());
    expect(said()).toBe('A3 lamps are planned 06:00–18:00');

    undo.next();

    expect(server.expectOne(`${shelfPath}/lamp-hours`).request.body).toEqual(dark);
  });

  it('offers to note the heat mat as it is now', () => {
    setUp();
    ticked(
      task({ kind: 'switchHeatMat', shelfId: inventedId(1) }),
      jest.fn(() => of(true)),
    );
    answer(
      shelfAdvice({ heatMat: { state: 'off', reason: 'Nothing waits to germinate.', change: 'switchOff' } }),
    );

    expect(server.expectOne(`${shelfPath}/heat-mat`).request.body).toEqual({ isOn: false });
  });

  it('leaves the plan when the person does, and gives the tick back', () => {
    setUp();
    const wantedBack = jest.fn();
    TestBed.inject(PlanChanges)
      .sayTicked(switchLamps, () => of(false))
      .subscribe(wantedBack);
    answer(lampsOn);
    expect(said()).toBe('Ticked: Switch A3 lamps on');

    undo.next();

    expect(wantedBack).toHaveBeenCalledTimes(1);
  });

  it('says who may change the plan to a helper, who is not asked', () => {
    setUp('helper');
    const ask = ticked(switchLamps);
    answer(lampsOn);
    server.expectOne(`${base}/members`).flush([
      { personId: inventedId(1), name: 'Maren Oxley', role: 'keeper' },
      { personId: inventedId(2), name: 'Idris Vane', role: 'grower' },
      { personId: inventedId(3), name: 'Tamsin Roe', role: 'helper' },
    ]);

    expect(ask).not.toHaveBeenCalled();
    expect(said()).toBe(
      'Ticked: Switch A3 lamps on. A3 lamps are still planned dark all day; Maren Oxley or Idris Vane can change that.',
    );
  });

  it.each([
    ['as planned', shelfAdvice()],
    ['for so long that no figure says', shelfAdvice({ lamps: { ...lampsOn.lamps, hours: null } })],
  ])('%s is only ticked', (_case, advice) => {
    setUp();
    const ask = ticked(switchLamps);
    answer(advice);

    expect(ask).not.toHaveBeenCalled();
    expect(said()).toBe('Ticked: Switch A3 lamps on');
  });

  it('is ticked all the same when nothing answers', () => {
    setUp();
    ticked(switchLamps);
    server.expectOne(`${base}/racks`).flush(null, { status: 503, statusText: 'x' });
    server.expectOne(`${shelfPath}/advice`);

    expect(said()).toBe('Ticked: Switch A3 lamps on');
  });

  it('asks nothing about other care', () => {
    setUp();
    ticked(task());

    expect(said()).toBe('Ticked: Feed strawberries');
  });
});
