import { asApiFailure, type ApiFailure, type ApiFailureKind } from './api-failure';

const sentences: Readonly<Record<Exclude<ApiFailureKind, 'tooMany' | 'invalid' | 'conflict'>, string>> = {
  offline: 'The server can’t be reached. Nothing was lost; check the connection and try again.',
  signedOut: 'Your session has ended. Sign in again and repeat the last step.',
  forbidden: 'Your role in this room doesn’t allow that. A keeper of the room can change your role.',
  notFound: 'It is no longer there, or you are not a member of its room.',
  server: 'The server could not finish this. Nothing was changed; try again in a moment.',
};

/**
 * What happened and what to do, for a person.
 *
 * @param error - What a call threw.
 */
export function failureText(error: unknown): string {
  const failure = asApiFailure(error);
  if (failure.kind === 'tooMany') return `Too many tries. Wait ${waitText(failure)}, then try again.`;
  if (failure.kind === 'invalid' || failure.kind === 'conflict') return ownWords(failure);
  return sentences[failure.kind];
}

/** How long to wait: "40 seconds", "15 minutes"; rounded up, so that nobody comes back too early. */
function waitText({ retryAfterS }: ApiFailure): string {
  if (retryAfterS === null) return 'a few minutes';
  if (retryAfterS === 1) return '1 second';
  if (retryAfterS < 60) return `${retryAfterS} seconds`;
  const minutes = Math.ceil(retryAfterS / 60);
  return minutes === 1 ? '1 minute' : `${minutes} minutes`;
}

/** The server knows best what is wrong with what was sent. */
function ownWords({ problem }: ApiFailure): string {
  return problem?.detail ?? problem?.title ?? 'That could not be saved as it is. Check what you entered.';
}
