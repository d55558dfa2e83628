import { ApplicationRef, inject, InjectionToken } from '@angular/core';
import { Socket } from 'ngx-socket-io';

/**
 * The socket of namespace `/live`. Made here instead of with the application, so that socket.io is loaded only with
 * the first page that is live.
 */
export const liveSocket = new InjectionToken<Socket>('socket of /live', {
  providedIn: 'root',
  factory: () =>
    new Socket(
      { url: '/live', options: { autoConnect: false, reconnectionDelayMax: 10_000 } },
      inject(ApplicationRef),
    ),
});
