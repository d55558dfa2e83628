import { account } from '../testing/account-builder';
import { boardAt, inventedId, task } from '../testing/board-builder';
import { keptDeed } from '../testing/care-builder';
import { withWaiting } from './with-waiting';

const doer = account();
const close = keptDeed(1, {
  kind: 'close',
  taskId: task().id,
  completion: { outcome: 'notNeeded', note: 'still wet', millilitres: 0.5 },
});

describe('tasks with what waits laid over them', () => {
  it('look as the person left them', () => {
    const [shown] = withWaiting([task()], [close], doer);
    expect(shown).toMatchObject({
      isWaiting: true,
      waitingPhotos: 0,
      task: {
        outcome: 'notNeeded',
        note: 'still wet',
        millilitres: 0.5,
        grams: null,
        doneAt: boardAt,
        doneByName: doer.name,
      },
    });
  });

  it('are open again when the tick was taken back', () => {
    const back = keptDeed(2, { kind: 'reopen', taskId: task().id });
    expect(withWaiting([task()], [close, back], doer)[0]).toEqual({
      task: task(),
      isWaiting: true,
      waitingPhotos: 0,
    });
  });

  it('count the photos that wait, and leave other tasks as they are', () => {
    const photo = keptDeed(1, {
      kind: 'photo',
      taskId: task().id,
      file: new Blob(['x']),
      fileName: 'leaf.jpg',
    });
    const other = task({ id: inventedId(801) });
    const [first, second] = withWaiting([task(), other], [photo, photo], doer);
    expect(first).toEqual({ task: task(), isWaiting: true, waitingPhotos: 2 });
    expect(second).toEqual({ task: other, isWaiting: false, waitingPhotos: 0 });
  });
});
