import fc from 'fast-check';

import { handedOver, handOverRefusal } from './hand-over';

const offer = { offeredById: 'ada', toPersonId: null };

describe('handing a task over', () => {
  it.each([
    ['to anybody', ['ada'], offer, 'ben', null],
    ['to the one it is for', ['ada'], { ...offer, toPersonId: 'ben' }, 'ben', null],
    ['to somebody it is not for', ['ada'], { ...offer, toPersonId: 'ben' }, 'cleo', 'notForThem'],
    ['to who holds it already', ['ada', 'ben'], offer, 'ben', 'holdsIt'],
    ['to oneself', ['ada'], offer, 'ada', 'holdsIt'],
    ['once it is somebody else’s', ['cleo'], offer, 'ben', 'notHeld'],
  ])('%s', (_, holders, made, taker, refusal) => {
    expect(handOverRefusal(holders, made, taker)).toBe(refusal);
  });

  it('never loses or doubles a task, whatever is offered, taken and withdrawn', () => {
    const people = ['ada', 'ben', 'cleo', 'dov'];
    const person = fc.constantFrom(...people);
    const start = fc.array(fc.uniqueArray(person, { minLength: 1, maxLength: 2 }), {
      minLength: 1,
      maxLength: 5,
    });
    const deed = fc.record({
      how: fc.constantFrom('offer', 'take', 'withdraw'),
      task: fc.nat(4),
      by: person,
      to: fc.option(person),
    });
    fc.assert(
      fc.property(start, fc.array(deed, { maxLength: 60 }), (first, deeds) => {
        const held = first.map((holders) => [...holders]);
        const offers = new Map<number, { offeredById: string; toPersonId: string | null }>();
        for (const { how, task, by, to } of deeds) {
          const holders = held[task];
          const open = offers.get(task);
          if (holders === undefined) continue;
          if (how === 'offer' && open === undefined && holders.includes(by)) {
            offers.set(task, { offeredById: by, toPersonId: to });
          } else if (how === 'withdraw') {
            offers.delete(task);
          } else if (how === 'take' && open !== undefined && handOverRefusal(holders, open, by) === null) {
            held[task] = handedOver(holders, open.offeredById, by);
            offers.delete(task);
          }
          expect(held.map((now) => now.length)).toEqual(first.map((then) => then.length));
          expect(held.every((now) => new Set(now).size === now.length)).toBe(true);
        }
      }),
    );
  });
});
