import { HttpClient, HttpEventType, HttpHeaders, HttpParams, type HttpEvent } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Endpoint } from '@shared/contracts/endpoint';
import { catchError, filter, map, Subject, throwError, type Observable, type OperatorFunction } from 'rxjs';
import type * as z from 'zod';
import { asApiFailure } from './api-failure';

/** Where every endpoint's path begins. */
export const apiBase = '/api/v1';

/** Calls are the network's alone: a service worker in between would hide how far an upload has come. */
const pastServiceWorker = { 'ngsw-bypass': 'true' };

/** A part of a call, which may be left out where the endpoint expects nothing there. */
type Part<Name extends string, Schema extends z.ZodType> =
  Record<string, never> extends z.input<Schema>
    ? { readonly [K in Name]?: z.input<Schema> }
    : { readonly [K in Name]: z.input<Schema> };

/** What a call is given, as the endpoint describes it. */
export type CallInput<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType> = Part<'params', P> &
  Part<'query', Q> &
  Part<'body', B> & {
    /** Makes a repeat of the same write harmless; see {@link newIdempotencyKey}. */
    readonly idempotencyKey?: string;
  };

type Given<Input> = Record<string, never> extends Input ? [input?: Input] : [input: Input];

/** How far an upload has come, or its answer. */
export type UploadStep<Reply> =
  | { readonly type: 'sending'; readonly sentBytes: number; readonly totalBytes: number | null }
  | { readonly type: 'answered'; readonly reply: Reply };

/** Calls the API by its contracts. Everything that arrives is parsed, and every failure is an {@link ApiFailure}. */
@Injectable({ providedIn: 'root' })
export class ApiClient {
  private readonly http = inject(HttpClient);
  private readonly refused = new Subject<void>();
  private csrfToken: string | null = null;

  /** Emits whenever the server says that nobody is signed in. */
  readonly signedOut = this.refused.asObservable();

  /** Sets what proves that a write comes from this page; null without a session. */
  useCsrfToken(token: string | null): void {
    this.csrfToken = token;
  }

  /**
   * Calls an endpoint once it is subscribed to.
   *
   * @param endpoint - From `shared/contracts`.
   * @param given - Parameters, query and body, as far as the endpoint expects them.
   * @returns The parsed reply. Fails with {@link ApiFailure} only.
   */
  call<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType>(
    endpoint: Endpoint<P, Q, B, R>,
    ...[given]: Given<CallInput<P, Q, B>>
  ): Observable<z.output<R>> {
    const input: LooseInput = given ?? {};
    return this.http
      .request<unknown>(endpoint.method.toUpperCase(), apiPath(endpoint.path, input.params), {
        params: queryParams(input.query),
        body: input.body,
        headers: this.headers(endpoint.method, input.idempotencyKey),
      })
      .pipe(
        map((reply) => parseReply(endpoint, reply)),
        this.failing(),
      );
  }

  /**
   * Uploads a form and says how far it has come.
   *
   * @param endpoint - One that takes `multipart/form-data`.
   * @param given - Parameters of the path, query and the form.
   */
  upload<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType>(
    endpoint: Endpoint<P, Q, B, R>,
    given: Part<'params', P> &
      Part<'query', Q> & { readonly form: FormData; readonly idempotencyKey?: string },
  ): Observable<UploadStep<z.output<R>>> {
    const { params, query, form, idempotencyKey }: LooseInput & { form: FormData } = given;
    return this.http
      .request<unknown>(endpoint.method.toUpperCase(), apiPath(endpoint.path, params), {
        params: queryParams(query),
        body: form,
        headers: this.headers(endpoint.method, idempotencyKey),
        observe: 'events',
        reportProgress: true,
      })
      .pipe(
        map((event) => uploadStep(endpoint, event)),
        filter((step) => step !== null),
        this.failing(),
      );
  }

  private headers(method: string, idempotencyKey?: string): HttpHeaders {
    let headers = new HttpHeaders(pastServiceWorker);
    if (method !== 'get' && this.csrfToken !== null) headers = headers.set('X-CSRF-Token', this.csrfToken);
    return idempotencyKey === undefined ? headers : headers.set('Idempotency-Key', idempotencyKey);
  }

  private failing<T>(): OperatorFunction<T, T> {
    return catchError((error: unknown) => {
      const failure = asApiFailure(error);
      if (failure.kind === 'signedOut') this.refused.next();
      return throwError(() => failure);
    });
  }
}

/** The typed input with its types forgotten: inside, every part is just names and values. */
interface LooseInput {
  readonly params?: unknown;
  readonly query?: unknown;
  readonly body?: unknown;
  readonly idempotencyKey?: string;
}

/**
 * The address of an endpoint, for a call or a link.
 *
 * @param path - As in the contract, with `:name` for parameters.
 * @param params - The parameters by name.
 * @throws Error when a parameter is missing: a mistake of ours, not of the person.
 */
export function apiPath(path: string, params: unknown = {}): string {
  const byName = new Map(Object.entries(params as object));
  const filled = path.replace(/:(\w+)/g, (_, name: string) => {
    if (!byName.has(name)) throw new Error(`No ${name} for ${path}`);
    return encodeURIComponent(String(byName.get(name)));
  });
  return apiBase + filled;
}

/** A fresh key for a write that a phone may have to repeat. */
export function newIdempotencyKey(): string {
  // randomUUID is missing on plain HTTP in a home network; getRandomValues is not.
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

function queryParams(query: unknown = {}): HttpParams {
  const given = Object.entries(query as object).filter(([, value]) => value !== undefined && value !== null);
  return new HttpParams({
    fromObject: Object.fromEntries(given.map(([name, value]) => [name, sent(value)])),
  });
}

function sent(value: unknown): string | string[] {
  return Array.isArray(value) ? value.map(String) : String(value);
}

/** An answer without content arrives as null, where the contract says that there is nothing. */
function parseReply<R extends z.ZodType>({ reply }: { readonly reply: R }, arrived: unknown): z.output<R> {
  return reply.parse(arrived ?? undefined);
}

function uploadStep<R extends z.ZodType>(
  endpoint: { readonly reply: R },
  event: HttpEvent<unknown>,
): UploadStep<z.output<R>> | null {
  if (event.type === HttpEventType.UploadProgress)
    return { type: 'sending', sentBytes: event.loaded, totalBytes: event.total ?? null };
  if (event.type === HttpEventType.Response)
    return { type: 'answered', reply: parseReply(endpoint, event.body) };
  return null;
}
