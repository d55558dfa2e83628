import * as fc from 'fast-check';
import { inventedId } from '../testing/board-builder';
import { keptDeed } from '../testing/care-builder';
import type { CareDeed, KeptDeed, Trouble } from './care-deed';
import { deliverInOrder, mostFailures, type Delivery } from './deliver-in-order';
import { MemoryDeeds } from './memory-deeds';

const person = keptDeed(1, { kind: 'reopen', taskId: inventedId(1) }).personId;
const trouble: Trouble = { isConflict: true, text: 'Seen to.', byName: 'Jo', at: null, outcome: 'done' };
const taken: Delivery = { is: 'taken' };

function tick(number: number): CareDeed {
  const { order: _order, ...deed } = keptDeed(number, {
    kind: 'close',
    taskId: inventedId(number),
    completion: { outcome: 'done' },
  });
  return deed;
}

async function storeOf(...deeds: CareDeed[]): Promise<MemoryDeeds> {
  const store = new MemoryDeeds();
  for (const deed of deeds) await store.add(deed);
  return store;
}

/** A server that does what a key asks for once, and a line to it that breaks. */
class PlayedServer {
  readonly done: string[] = [];
  private readonly known = new Set<string>();

  receive({ key }: KeptDeed): void {
    if (this.known.has(key)) return;
    this.known.add(key);
    this.done.push(key);
  }
}

type Fate = 'arrives' | 'lost' | 'answer lost' | 'server fails' | 'phone dies' | 'phone dies after';

describe('deeds that wait', () => {
  it('reach the server once each and in order, whatever is lost on the way and however often the phone starts anew', async () => {
    const fates = fc.constantFrom<Fate>(
      'arrives',
      'lost',
      'answer lost',
      'server fails',
      'phone dies',
      'phone dies after',
    );
    await fc.assert(
      fc.asyncProperty(
        fc.integer({ min: 1, max: 8 }),
        fc.array(fates, { maxLength: 40 }),
        fc.array(fc.nat(6), { maxLength: 8 }),
        async (count, given, joins) => {
          const deeds = Array.from({ length: count }, (_, index) => tick(index + 1));
          const store = new MemoryDeeds();
          const server = new PlayedServer();
          const ahead = [...given];
          const late = [...deeds];
          const failures = new Map<string, number>();
          const send = async (deed: KeptDeed): Promise<Delivery> => {
            let fate = ahead.shift() ?? 'arrives';
            // A server that fails at one deed for ever is another test.
            const failed = (failures.get(deed.key) ?? 0) + 1;
            if (fate === 'server fails' && failed >= mostFailures) fate = 'arrives';
            else if (fate === 'server fails') failures.set(deed.key, failed);
            if (fate === 'phone dies') throw new Error(fate);
            if (fate === 'lost') return { is: 'unanswered', retryAfterS: null };
            if (fate === 'server fails') return { is: 'failed', trouble };
            server.receive(deed);
            if (fate === 'phone dies after') throw new Error(fate);
            return fate === 'answer lost' ? { is: 'unanswered', retryAfterS: null } : taken;
          };
          for (;;) {
            // More is ticked between any two tries.
            for (const joining of late.splice(0, 1 + (joins.shift() ?? 0))) await store.add(joining);
            const round = await deliverInOrder(store, person, send).catch(() => null);
            if (round?.isThrough === true && late.length === 0) break;
          }
          expect(server.done).toEqual(deeds.map(({ key }) => key));
          expect(await store.of(person)).toEqual([]);
        },
      ),
    );
  });

  it('stop at the first that nobody answers, and say when to come back', async () => {
    const store = await storeOf(tick(1), tick(2));
    const round = await deliverInOrder(store, person, () =>
      Promise.resolve({ is: 'unanswered', retryAfterS: 30 }),
    );
    expect(round).toEqual({ isThrough: false, retryAfterS: 30 });
    expect(await store.of(person)).toMatchObject([{ isTried: true }, { isTried: false }]);
  });

  it('go on past one that is refused, which is kept with its trouble', async () => {
    const store = await storeOf(tick(1), tick(2));
    const sent: string[] = [];
    await deliverInOrder(store, person, (deed) => {
      sent.push(deed.key);
      return Promise.resolve(sent.length === 1 ? { is: 'refused', trouble } : taken);
    });
    expect(sent).toHaveLength(2);
    expect(await store.of(person)).toMatchObject([{ key: tick(1).key, trouble }]);
  });

  it('never open a task again that somebody else did: a refused tick goes with its taking back', async () => {
    const { order: _order, ...back } = keptDeed(2, { kind: 'reopen', taskId: inventedId(1) });
    const store = await storeOf(tick(1), back);
    const sent: string[] = [];
    await deliverInOrder(store, person, ({ kind }) => {
      sent.push(kind);
      return Promise.resolve({ is: 'refused', trouble });
    });
    expect(sent).toEqual(['close']);
    expect(await store.of(person)).toEqual([]);
  });

  it('are set aside once the server failed at them often, and hold up no others', async () => {
    const store = await storeOf(tick(1), tick(2));
    const done: string[] = [];
    const send = ({ key }: KeptDeed): Promise<Delivery> => {
      if (key === tick(1).key) return Promise.resolve({ is: 'failed', trouble });
      done.push(key);
      return Promise.resolve(taken);
    };
    for (let round = 1; round < mostFailures; round += 1) await deliverInOrder(store, person, send);
    expect(done).toEqual([]);
    await deliverInOrder(store, person, send);
    expect(done).toEqual([tick(2).key]);
    expect(await store.of(person)).toMatchObject([{ key: tick(1).key, trouble }]);
  });

  it('of another person stay where they are', async () => {
    const store = await storeOf(tick(1));
    const round = await deliverInOrder(store, inventedId(99), () => Promise.reject(new Error('sent')));
    expect(round.isThrough).toBe(true);
    expect(await store.of(person)).toHaveLength(1);
  });
});
