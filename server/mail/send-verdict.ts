/** What a failure to send means: nothing about the mail, a later try, or never. */
export interface SendVerdict {
  readonly kind: 'outage' | 'delayed' | 'refused';
  readonly reason: string;
}

/** Waiting times between tries; after the last one it is that long again. */
const RETRY_AFTER_MS = [10_000, 60_000, 300_000, 900_000, 3_600_000] as const;
/** After this many tries, a week or so of hours, a mail is given up. */
const MOST_ATTEMPTS = 180;
/** Set by nodemailer or the system where no conversation about a mail came about. */
const outageCodes = new Set(['EAUTH', 'EDNS', 'ETLS', 'ECONNREFUSED']);
const outageCalls = new Set(['connect', 'getaddrinfo']);

/**
 * How long to wait before the next try.
 *
 * @param attempts - Failures so far, 0 or more.
 * @returns Ten seconds at first, up to an hour [ms].
 */
export function retryAfterMs(attempts: number): number {
  return RETRY_AFTER_MS[Math.min(attempts, RETRY_AFTER_MS.length - 1)] ?? 3_600_000;
}

/**
 * Judges why a mail was not taken.
 *
 * @param error - As the transport threw it.
 * @param attempts - Failures of this mail before.
 * @returns An outage when the mail server was not reached or knows us not; refused for its 5xx or after a week.
 */
export function judgeSendError(error: unknown, attempts: number): SendVerdict {
  const { message, responseCode, code, syscall } = (error ?? {}) as {
    message?: string;
    responseCode?: number;
    code?: string;
    syscall?: string;
  };
  const reason = message ?? String(error);
  if (outageCalls.has(syscall ?? '') || outageCodes.has(code ?? '')) return { kind: 'outage', reason };
  const isPermanent = responseCode !== undefined && responseCode >= 500;
  return { kind: isPermanent || attempts + 1 >= MOST_ATTEMPTS ? 'refused' : 'delayed', reason };
}
