import { inject, Injectable, Injector, type ErrorHandler } from '@angular/core';
import { ApiFailure } from './api-failure';

/** Takes what nobody caught: the console gets all of it, the person a sentence. */
@Injectable()
export class UnexpectedErrors implements ErrorHandler {
  private readonly injector = inject(Injector);

  handleError(error: unknown): void {
    console.error(error);
    // Loaded late: the notices bring Material's overlay along, which the first page needs for nothing else.
    import('./notices')
      .then(({ Notices }) => this.injector.get(Notices).sayFailure(asFailure(error)))
      .catch((cause: unknown) => console.error(cause));
  }
}

function asFailure(error: unknown): ApiFailure {
  if (error instanceof ApiFailure) return error;
  return new ApiFailure('invalid', {
    cause: error,
    problem: {
      type: 'about:blank',
      title: 'This page has a fault. Nothing was lost; load it again.',
      status: 0,
      code: 'PAGE_FAULT',
    },
  });
}
