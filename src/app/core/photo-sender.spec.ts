import { TestBed } from '@angular/core/testing';
import type { Photo } from '@shared/contracts/photos';
import { Subject } from 'rxjs';
import type { UploadStep } from './api-client';
import { ApiFailure } from './api-failure';
import { photoRefusal, PhotoSender } from './photo-sender';
import { inventedId } from './testing/board-builder';

const picture = (size = 3): File => new File(['x'.repeat(size)], 'leeks.jpg', { type: 'image/jpeg' });
const kept: Photo = {
  id: inventedId(70),
  at: '2026-12-01T14:20:00Z',
  caption: '',
  width: 1600,
  height: 1200,
  personId: inventedId(170),
  personName: 'Maren Oxley',
};

describe('a photo', () => {
  it.each([
    ['of 40 MB', { size: 40_000_000 }, 'has 40.0 MB; a photo may have 20 MB'],
    ['that is a page', { type: 'text/html' }, 'is no JPEG, PNG or WebP picture'],
    ['without content', { size: 0 }, 'is empty'],
  ])('%s is refused before it is sent', (_, changes, words) => {
    const refusal = photoRefusal({ name: 'leeks.jpg', size: 4_000_000, type: 'image/jpeg', ...changes });
    expect(refusal).toContain(`leeks.jpg ${words}`);
  });

  it('of 20 MB is taken', () => {
    expect(photoRefusal({ name: 'leeks.jpg', size: 20_000_000, type: 'image/jpeg' })).toBeNull();
  });

  it('tells how far it has come, then arrives', () => {
    TestBed.configureTestingModule({ providers: [PhotoSender] });
    const sender = TestBed.inject(PhotoSender);
    const steps = new Subject<UploadStep<Photo>>();
    const arrived: Photo[] = [];
    sender.send(
      picture(),
      () => steps,
      (photo) => arrived.push(photo),
    );
    expect(sender.sending()).toEqual({ name: 'leeks.jpg', percent: null });
    steps.next({ type: 'sending', sentBytes: 1, totalBytes: 4 });
    expect(sender.sending()?.percent).toBe(25);
    steps.next({ type: 'answered', reply: kept });
    steps.complete();
    expect(arrived).toEqual([kept]);
    expect(sender.sending()).toBeNull();
    expect(sender.problem()).toBeNull();
  });

  it('that the server refuses leaves its reason', () => {
    TestBed.configureTestingModule({ providers: [PhotoSender] });
    const sender = TestBed.inject(PhotoSender);
    const steps = new Subject<UploadStep<Photo>>();
    sender.send(
      picture(),
      () => steps,
      () => undefined,
    );
    steps.error(
      new ApiFailure('invalid', {
        problem: { type: '', title: 'x', status: 415, code: 'NO_PICTURE', detail: 'It is not a picture.' },
      }),
    );
    expect(sender.problem()).toBe('leeks.jpg: It is not a picture.');
    expect(sender.sending()).toBeNull();
  });
});
