import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import type { FileQuestion } from '@shared/contracts/logger-files';
import { createLocalTime } from '@shared/logger-files/local-time';
import { ReaderFormat } from '../../core/reader-format';
import { ProblemText } from '../../ui/states/problem-text';

/** What a person answered. */
export interface FileAnswer {
  readonly code: string;
  readonly column: number | null;
  /** One of the question's options; for a start, an instant in ISO 8601. */
  readonly value: string;
}

/** The question that is answered by a time and not by an option. */
const startQuestion = 'ELAPSED_NEEDS_START';

/** What only the person can know about a file, with what speaks for each answer. */
@Component({
  selector: 'app-file-questions',
  template: `
    @for (question of questions(); track question.code + question.column) {
      <section>
        <h2>{{ question.text }}</h2>
        @if (question.code === startCode) {
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>The first reading was taken at</mat-label>
            <input matInput #start type="datetime-local" step="1" [disabled]="!mayAnswer()" />
            <mat-hint>By the clock of the room.</mat-hint>
          </mat-form-field>
          <button
            matButton="outlined"
            type="button"
            [disabled]="!mayAnswer()"
            (click)="answerStart(start.value)"
          >
            Use this start
          </button>
          <app-problem-text [message]="problem()" />
          @if (question.answer) {
            <p>Taken for now: {{ format.when(question.answer) }}.</p>
          }
        } @else if (!isLong()) {
          <mat-radio-group
            [attr.aria-label]="question.text"
            [disabled]="!mayAnswer()"
            (change)="answered.emit({ code: question.code, column: question.column, value: $event.value })"
          >
            @for (option of question.options; track option.value) {
              <mat-radio-button [value]="option.value">
                {{ option.label }}
                @if (option.value === question.answer) {
                  <span class="assumed">(taken for now)</span>
                }
              </mat-radio-button>
            }
          </mat-radio-group>
        }
      </section>
    }
  `,
  styles: `
    section {
      margin-bottom: 14px;
      padding: 14px 16px;
      border-radius: var(--corner);
      background: var(--lamp-tint);
    }

    h2 {
      margin-bottom: 8px;
      font: 600 0.9375rem/1.45 var(--text-font);
      letter-spacing: 0;
      text-wrap: pretty;
    }

    mat-radio-group {
      display: flex;
      flex-wrap: wrap;
      column-gap: 18px;
    }

    p,
    .assumed {
      margin: 6px 0 0;
      color: var(--ink-2);
    }

    button {
      margin-left: 10px;
      min-height: var(--target);
    }
  `,
  imports: [MatButton, MatFormFieldModule, MatInput, MatRadioModule, ProblemText],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileQuestions {
  readonly questions = input.required<readonly FileQuestion[]>();
  /** IANA name of the room's time zone. */
  readonly zone = input.required<string>();
  readonly mayAnswer = input.required<boolean>();
  /** Whether units are chosen at the series themselves. */
  readonly isLong = input.required<boolean>();
  readonly answered = output<FileAnswer>();

  protected readonly format = inject(ReaderFormat);
  protected readonly startCode = startQuestion;
  protected readonly problem = signal<string | null>(null);

  /** @param typed - A time of the room's clock: "2026-11-01T08:30". */
  protected answerStart(typed: string): void {
    const wallMs = Date.parse(`${typed}Z`);
    const time = createLocalTime(this.zone());
    const isReal = !Number.isNaN(wallMs) && time.resolve(wallMs) > 0;
    this.problem.set(isReal ? null : 'Give the day and time at which the logger was started.');
    if (!isReal) return;
    const value = new Date(time.earlier).toISOString();
    this.answered.emit({ code: startQuestion, column: null, value });
  }
}
