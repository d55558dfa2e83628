import type { HttpTestingController } from '@angular/common/http/testing';
import type { ComponentFixture } from '@angular/core/testing';
import { membership } from '../../core/testing/account-builder';

/** Where everything of the invented room is asked for. */
export const roomAddress = `/api/v1/rooms/${membership().roomId}`;

/**
 * Answers whatever a page fetches of the invented room, until it asks no more.
 *
 * @param answers - Replies by the end of the path, such as `routines`.
 */
export async function answerAll(
  server: HttpTestingController,
  fixture: ComponentFixture<unknown>,
  answers: Readonly<Record<string, unknown>>,
): Promise<void> {
  for (let turn = 0; turn < 8; turn += 1) {
    fixture.detectChanges();
    await Promise.resolve();
    for (const [path, reply] of Object.entries(answers)) {
      server
        .match(({ method, url }) => method === 'GET' && url === `${roomAddress}/${path}`)
        .filter(({ cancelled }) => !cancelled)
        .forEach((request) => request.flush(reply as object));
    }
  }
  await fixture.whenStable();
}

/** Two who may do care: a keeper, who is signed in, and a helper. */
export const members = [
  { personId: '0b6f6c0e-0000-4000-8000-0000000000aa', name: 'Maren Oxley', role: 'keeper' },
  { personId: '0b6f6c0e-0000-4000-8000-0000000000ab', name: 'Jo Ashdown', role: 'helper' },
] as const;
