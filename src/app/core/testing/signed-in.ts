import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import type { EnvironmentProviders, Provider } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { Account } from '@shared/contracts/people';
import { liveSocket } from '../live-socket';
import { RoomClock } from '../room-clock';
import { Session } from '../session';
import { account } from './account-builder';
import { boardAt } from './board-builder';
import { FakeSocket } from './fake-socket';

/** A played server, a played socket and a router that has every page. */
export function providePlayedServer(socket = new FakeSocket()): (Provider | EnvironmentProviders)[] {
  return [
    provideHttpClient(),
    provideHttpClientTesting(),
    provideRouter([{ path: '**', children: [] }]),
    { provide: liveSocket, useValue: socket },
  ];
}

/** Signs an invented person in, at the instant of every invented board. */
export function signedInAs(person: Account = account()): HttpTestingController {
  localStorage.clear();
  const server = TestBed.inject(HttpTestingController);
  TestBed.inject(Session).load().subscribe();
  server.expectOne('/api/v1/account').flush(person);
  TestBed.inject(RoomClock).setBy(boardAt);
  return server;
}
