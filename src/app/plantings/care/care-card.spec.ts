import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { CareKind } from '@shared/care/care-kind';
import type { ReadyMadeRoutineView, Routine } from '@shared/contracts/care-routines';
import type { Role } from '@shared/contracts/people';
import type { PlantingStage } from '@shared/growing/planting-stage';
import { Notices } from '../../core/notices';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { PlantingData } from '../planting/planting-data';
import { plantingDetail } from '../testing/planting-builder';
import { CareCard } from './care-card';

const room = `/api/v1/rooms/${membership().roomId}`;
let planting = plantingDetail();

function usual(id: string, title: string, kind: CareKind = 'trim'): ReadyMadeRoutineView {
  return {
    id,
    kind,
    title,
    detail: '',
    timing: { how: 'afterDoing', everyDays: 10 },
    season: null,
    windowDays: 3,
    steps: [],
    amount: 'Back to 10 cm',
    minutes: 10,
  };
}

const trimming: Routine = {
  ...usual('x', 'Trim the tops'),
  id: inventedId(810),
  timing: { how: 'afterDoing', everyDays: 10, startsOn: '2026-12-01' },
  place: { at: 'planting', plantingId: planting.id },
  placeLabel: 'Leek Winter Piper',
  who: { how: 'onDuty' },
  skipsClosedDays: false,
  nextDueOn: '2026-12-04',
};

const offered = [
  usual('trim-alliums', 'Trim the tops'),
  usual('look-for-pests', 'Look under the leaves', 'inspect'),
];

describe('the care of a planting', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<CareCard>;
  const notices = { say: jest.fn(), sayFailure: jest.fn() };
  const card = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector: string): string =>
    (card().querySelector(selector)?.textContent ?? '').replace(/\s+/g, ' ').trim();

  async function open(
    isOffered: boolean,
    routines: Routine[] = [],
    role: Role = 'grower',
    stage: PlantingStage = 'growingOn',
  ): Promise<void> {
    planting = plantingDetail({ stage });
    TestBed.configureTestingModule({
      providers: [providePlayedServer(), PlantingData, { provide: Notices, useValue: notices }],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    TestBed.inject(PlantingData).plantingId.set(planting.id);
    fixture = TestBed.createComponent(CareCard);
    fixture.componentRef.setInput('isOffered', isOffered);
    await answer(routines);
  }

  async function answer(routines: Routine[]): Promise<void> {
    const replies: Record<string, unknown> = {
      [`${room}/plantings/${planting.id}`]: planting,
      [`${room}/plantings/${planting.id}/germination`]: null,
      [`${room}/routines`]: routines,
      [`${room}/ready-made-routines`]: offered,
    };
    for (let turn = 0; turn < 6; turn += 1) {
      fixture.detectChanges();
      await Promise.resolve();
      for (const [url, reply] of Object.entries(replies)) {
        server
          .match((request) => request.method === 'GET' && request.url === url)
          .forEach((request) => request.flush(reply as object));
      }
    }
  }

  it('says what falls due when', async () => {
    await open(false, [trimming]);
    expect(text('li b')).toBe('Trim the tops');
    expect(text('li small')).toBe('10 days after the last time');
    expect(text('li > span')).toBe('Fri 4 Dec');
    expect(card().querySelector('form')).toBeNull();
  });

  it('that has just started is offered all that is usual, and gets what stays ticked', async () => {
    await open(true);
    expect(text('h3')).toBe('Usual care for leek');
    const boxes = [...card().querySelectorAll<HTMLInputElement>('mat-checkbox input')];
    expect(boxes.map(({ checked }) => checked)).toEqual([true, true]);
    boxes[1]?.click();
    card().querySelector('form')?.dispatchEvent(new Event('submit'));
    const request = server.expectOne({ method: 'POST', url: `${room}/plantings/${planting.id}/routines` });
    expect(request.request.body).toEqual({ readyMadeIds: ['trim-alliums'], who: { how: 'onDuty' } });
    expect(request.request.headers.has('Idempotency-Key')).toBe(true);
    request.flush([trimming], { status: 201, statusText: 'x' });
    await answer([trimming]);
    expect(notices.say).toHaveBeenCalledWith('One routine added');
    expect(text('li b')).toBe('Trim the tops');
  });

  it('is offered what seed needs now; the rest waits until it has grown', async () => {
    await open(true, [], 'grower', 'sown');
    const boxes = [...card().querySelectorAll<HTMLInputElement>('mat-checkbox input')];
    expect(boxes.map(({ checked }) => checked)).toEqual([false, true]);
    expect(text('form p')).toContain('The rest can be added when they have grown.');
  });

  it('offers only what is not kept yet', async () => {
    await open(true, [trimming]);
    expect([...card().querySelectorAll('mat-checkbox')].map((box) => box.textContent?.trim())).toEqual([
      expect.stringContaining('Look under the leaves'),
    ]);
  });

  it('says that nothing is chosen, and sends nothing', async () => {
    await open(true, [trimming]);
    card().querySelector<HTMLInputElement>('mat-checkbox input')?.click();
    card().querySelector('form')?.dispatchEvent(new Event('submit'));
    await answer([trimming]);
    server.expectNone({ method: 'POST', url: `${room}/plantings/${planting.id}/routines` });
    expect(text('[role=alert]')).toContain('Choose some of it first.');
  });

  it('offers nothing to a helper', async () => {
    await open(true, [], 'helper');
    expect(card().querySelector('form')).toBeNull();
    expect(text('.actions')).toBe('Its care so far');
  });
});
