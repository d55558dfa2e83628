import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { endpoint, roomParams } from '@shared/contracts/endpoint';
import * as z from 'zod';
import { ApiClient, apiPath, newIdempotencyKey, type UploadStep } from './api-client';
import { ApiFailure } from './api-failure';

const roomId = '0b6f6c0e-0000-4000-8000-000000000001';
const readNote = endpoint({
  name: 'readNote',
  method: 'get',
  path: '/rooms/:roomId/notes/:key',
  access: 'viewer',
  summary: 'A note',
  params: roomParams.extend({ key: z.string() }),
  query: z.object({ from: z.string().optional(), quantity: z.array(z.string()).optional() }),
  reply: z.object({ text: z.string() }),
});
const writeNote = endpoint({
  name: 'writeNote',
  method: 'post',
  path: '/notes',
  access: 'helper',
  summary: 'Write a note',
  body: z.strictObject({ text: z.string() }),
});

describe('the API client', () => {
  let api: ApiClient;
  let server: HttpTestingController;

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    api = TestBed.inject(ApiClient);
    server = TestBed.inject(HttpTestingController);
  });
  afterEach(() => server.verify());

  function failureOf(status: number, body: object | null = null, headers = {}): ApiFailure {
    let failure: unknown;
    api
      .call(writeNote, { body: { text: 'dry' } })
      .subscribe({ error: (error: unknown) => (failure = error) });
    server.expectOne('/api/v1/notes').flush(body, { status, statusText: 'x', headers });
    expect(failure).toBeInstanceOf(ApiFailure);
    return failure as ApiFailure;
  }

  it('fills the path, leaves out what the query lacks and repeats what it has several of', () => {
    let text = '';
    api
      .call(readNote, {
        params: { roomId, key: 'a/b' },
        query: { from: undefined, quantity: ['air', 'root'] },
      })
      .subscribe((note) => (text = note.text));
    server.expectOne(`/api/v1/rooms/${roomId}/notes/a%2Fb?quantity=air&quantity=root`).flush({ text: 'dry' });
    expect(text).toBe('dry');
  });

  it('proves with writes, and only with writes, that they come from this page', () => {
    api.useCsrfToken('t1');
    api.call(writeNote, { body: { text: 'dry' }, idempotencyKey: 'k1' }).subscribe();
    const write = server.expectOne('/api/v1/notes');
    expect(write.request.headers.get('X-CSRF-Token')).toBe('t1');
    expect(write.request.headers.get('Idempotency-Key')).toBe('k1');
    expect(write.request.body).toEqual({ text: 'dry' });
    write.flush(null, { status: 204, statusText: 'No Content' });

    api.call(readNote, { params: { roomId, key: 'a' } }).subscribe();
    const read = server.expectOne(`/api/v1/rooms/${roomId}/notes/a`);
    expect(read.request.headers.has('X-CSRF-Token')).toBe(false);
    read.flush({ text: '' });
  });

  it('refuses a reply that is not what the contract says', () => {
    let failure: unknown;
    api
      .call(readNote, { params: { roomId, key: 'a' } })
      .subscribe({ error: (error: unknown) => (failure = error) });
    server.expectOne(`/api/v1/rooms/${roomId}/notes/a`).flush({ text: 7 });
    expect(failure).toBeInstanceOf(ApiFailure);
    expect((failure as ApiFailure).kind).toBe('server');
  });

  it.each([
    [400, 'invalid'],
    [401, 'signedOut'],
    [403, 'forbidden'],
    [404, 'notFound'],
    [409, 'conflict'],
    [422, 'invalid'],
    [429, 'tooMany'],
    [500, 'server'],
    [503, 'offline'],
  ])('with status %d fails as %s', (status, kind) => {
    expect(failureOf(status).kind).toBe(kind);
  });

  it('keeps the problem, its field errors and the time to wait', () => {
    const problem = {
      type: 'about:blank',
      title: 'Not saved',
      status: 422,
      code: 'INVALID',
      errors: [{ path: 'text', message: 'is too long' }],
    };
    const failure = failureOf(422, problem, { 'Retry-After': '40' });
    expect(failure.code).toBe('INVALID');
    expect(failure.fieldError('text')).toBe('is too long');
    expect(failure.fieldError('at')).toBeNull();
    expect(failure.retryAfterS).toBe(40);
  });

  it('without a connection fails as offline', () => {
    let failure: unknown;
    api.call(writeNote, { body: { text: '' } }).subscribe({ error: (error: unknown) => (failure = error) });
    server.expectOne('/api/v1/notes').error(new ProgressEvent('error'));
    expect((failure as ApiFailure).kind).toBe('offline');
  });

  it('tells when the server says that nobody is signed in', () => {
    let times = 0;
    api.signedOut.subscribe(() => (times += 1));
    failureOf(403);
    expect(times).toBe(0);
    failureOf(401);
    expect(times).toBe(1);
  });

  it('says how far an upload has come, then its reply', () => {
    const upload = { ...writeNote, reply: z.object({ id: z.string() }), status: 201 as const };
    const steps: UploadStep<{ id: string }>[] = [];
    api.upload(upload, { form: new FormData() }).subscribe((step) => steps.push(step));
    const request = server.expectOne('/api/v1/notes');
    request.event({ type: 1, loaded: 50, total: 200 });
    request.flush({ id: 'f1' }, { status: 201, statusText: 'Created' });
    expect(steps).toEqual([
      { type: 'sending', sentBytes: 50, totalBytes: 200 },
      { type: 'answered', reply: { id: 'f1' } },
    ]);
  });
});

describe('the path of an endpoint', () => {
  it('without one of its parameters is a mistake of ours', () => {
    expect(() => apiPath('/rooms/:roomId', {})).toThrow('No roomId');
  });
});

describe('idempotency keys', () => {
  it('are 128 bits in hexadecimal and differ', () => {
    expect(newIdempotencyKey()).toMatch(/^[0-9a-f]{32}$/);
    expect(newIdempotencyKey()).not.toBe(newIdempotencyKey());
  });
});
