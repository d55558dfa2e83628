import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { failureText } from '../core/failure-text';
import { Session } from '../core/session';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { NoteLine } from '../ui/note-line/note-line';
import { ProblemText } from '../ui/states/problem-text';
import { BringInResult } from './bring-in/bring-in-result';
import { FileProgress } from './bring-in/file-progress';
import { CheckResult } from './check-file/check-result';
import { FileSteps } from './file-steps';
import { endingWords, sizeWords } from './file-words';
import { fileStep } from './file-step';
import { LoggerFileData } from './logger-file-data';
import { MatchColumns } from './match-columns/match-columns';

/** A logger file on its way in: matching, checking and bringing in, each where the file stands now. */
@Component({
  selector: 'app-logger-file-page',
  templateUrl: './logger-file-page.html',
  styleUrl: './logger-file-page.scss',
  imports: [
    BringInResult,
    CheckResult,
    ErrorState,
    FileProgress,
    FileSteps,
    LoadingLines,
    MatButton,
    MatchColumns,
    NoteLine,
    ProblemText,
    RouterLink,
  ],
  providers: [LoggerFileData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoggerFilePage {
  /** From the path. */
  readonly fileId = input.required<string>();

  protected readonly data = inject(LoggerFileData);
  private readonly session = inject(Session);

  /** Whether the person went back to the columns of a file that was checked. */
  private readonly isMatchingAgain = signal(false);
  protected readonly file = this.data.file;
  protected readonly mayBringIn = computed(() => this.session.may('grower'));
  protected readonly size = computed(() => sizeWords(this.file()?.byteSize ?? 0));
  protected readonly step = computed(() => {
    const file = this.file();
    return file === null ? null : fileStep(file, this.isMatchingAgain());
  });
  protected readonly stepNumber = computed(() => {
    const step = this.step();
    const numbers = {
      refused: 1,
      match: 2,
      check: 3,
      checking: 3,
      bringingIn: 4,
      done: 5,
      takingOut: 5,
    } as const;
    return step === null ? 1 : numbers[step];
  });
  protected readonly failure = computed(() => {
    const error = this.data.resource.error();
    return error === undefined ? null : failureText(error);
  });
  /** Why the last attempt ended, where it is the person's turn again. */
  protected readonly ending = computed(() => {
    const file = this.file();
    if (file === null) return null;
    const words = endingWords(file);
    const isFailure = file.failure !== null;
    return words === null
      ? null
      : ({ words, tone: isFailure ? 'ember' : 'lamp', icon: isFailure ? 'error' : 'info' } as const);
  });

  constructor() {
    effect(() => this.data.fileId.set(this.fileId()));
    effect(() => {
      // A file that is read again has left its columns behind.
      if (this.file()?.status === 'checking') this.isMatchingAgain.set(false);
    });
  }

  protected matchAgain(): void {
    this.isMatchingAgain.set(true);
  }

  protected check(): void {
    this.isMatchingAgain.set(false);
    this.data.check();
  }
}
