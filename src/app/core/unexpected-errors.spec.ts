import { ErrorHandler } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { ApiFailure } from './api-failure';
import { Notices } from './notices';
import { UnexpectedErrors } from './unexpected-errors';

describe('an error that nobody caught', () => {
  it.each([
    [new ApiFailure('offline'), 'offline'],
    [new TypeError('x is undefined'), 'invalid'],
  ])('%s goes to the console, and to the person as a sentence', async (error, kind) => {
    const logged = jest.spyOn(console, 'error').mockImplementation(() => undefined);
    const said = new Promise<unknown>((resolve) =>
      TestBed.configureTestingModule({
        providers: [
          { provide: ErrorHandler, useClass: UnexpectedErrors },
          { provide: Notices, useValue: { sayFailure: resolve } },
        ],
      }),
    );
    TestBed.inject(ErrorHandler).handleError(error);
    expect((await said) as ApiFailure).toHaveProperty('kind', kind);
    expect(logged).toHaveBeenCalledWith(error);
    logged.mockRestore();
  });
});
