import type { HttpTestingController, TestRequest } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { account, membership } from '../testing/account-builder';
import { task } from '../testing/board-builder';
import { providePlayedServer, signedInAs } from '../testing/signed-in';
import { CareQueue } from './care-queue';

const url = `/api/v1/rooms/${membership().roomId}/tasks/${task().id}/completion`;
const done = task({ outcome: 'done', doneAt: '2026-12-01T14:20:00Z' });
const closed = {
  type: 'about:blank',
  title: 'Conflict',
  status: 409,
  detail: 'Jo Ashdown has seen to this already. Nothing was changed.',
  code: 'TASK_CLOSED',
  facts: { byName: 'Jo Ashdown', at: '2026-12-01T08:12:00Z', outcome: 'done' },
};

describe('what was done without the server knowing', () => {
  let queue: CareQueue;
  let server: HttpTestingController;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: providePlayedServer() });
    server = signedInAs(account());
    queue = TestBed.inject(CareQueue);
    TestBed.tick();
    await turns();
  });
  afterEach(() => server.verify());

  async function turns(): Promise<void> {
    for (let turn = 0; turn < 5; turn += 1) await new Promise((resolve) => setTimeout(resolve));
  }
  async function ticked(): Promise<TestRequest> {
    await queue.add({ kind: 'close', taskId: task().id, completion: { note: 'dry' } }, 'Feed strawberries');
    await turns();
    return server.expectOne(url);
  }

  it('is told at once, under a key of its own, and forgotten when the server has it', async () => {
    const request = await ticked();
    expect(request.request.headers.get('Idempotency-Key')).toMatch(/^[0-9a-f]{32}$/);
    expect(queue.shown([task()])[0]).toMatchObject({ isWaiting: true, task: { note: 'dry' } });
    request.flush(done);
    await turns();
    expect(queue.waiting()).toEqual([]);
    expect(queue.isHeldUp()).toBe(false);
  });

  it('waits without an answer, and goes out under the same key with the signal', async () => {
    const first = await ticked();
    first.flush(null, { status: 504, statusText: 'Gateway Timeout' });
    await turns();
    expect(queue.isHeldUp()).toBe(true);
    dispatchEvent(new Event('online'));
    await turns();
    const again = server.expectOne(url);
    expect(again.request.headers.get('Idempotency-Key')).toBe(first.request.headers.get('Idempotency-Key'));
    again.flush(done);
    await turns();
    expect(queue.waiting()).toEqual([]);
  });

  it('is kept with who was first when somebody else did it, until the person has seen it', async () => {
    (await ticked()).flush(closed, { status: 409, statusText: 'Conflict' });
    await turns();
    expect(queue.waiting()).toEqual([]);
    const [deed] = queue.troubled();
    expect(deed).toMatchObject({
      completion: { note: 'dry' },
      trouble: { isConflict: true, byName: 'Jo Ashdown', at: '2026-12-01T08:12:00Z', outcome: 'done' },
    });
    if (deed !== undefined) await queue.drop(deed);
    expect(queue.troubled()).toEqual([]);
  });

  it('that was never sent is dropped when it is taken back, else the server is told', async () => {
    const online = jest.spyOn(navigator, 'onLine', 'get').mockReturnValue(false);
    await queue.add({ kind: 'close', taskId: task().id, completion: {} }, 'Feed strawberries');
    await turns();
    await queue.takeBack(task().id, 'Feed strawberries');
    expect(queue.waiting()).toEqual([]);
    online.mockRestore();
    const request = await ticked();
    await queue.takeBack(task().id, 'Feed strawberries');
    request.flush(done);
    await turns();
    const back = server.expectOne(url);
    expect(back.request.method).toBe('DELETE');
    back.flush(task());
    await turns();
    expect(queue.waiting()).toEqual([]);
  });
});
