import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { Router, RouterLink } from '@angular/router';
import { uploadLoggerFile } from '@shared/contracts/logger-files';
import { finalize, type Subscription } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { EmptyState } from '../../ui/states/empty-state';
import { ProblemText } from '../../ui/states/problem-text';
import { FileSteps } from '../file-steps';
import { sizeWords } from '../file-words';

/** How far an upload has come. */
interface Sending {
  readonly name: string;
  readonly sentBytes: number;
  /** Null while it is not known. */
  readonly totalBytes: number | null;
}

/** The first step: a file is dropped or chosen, and uploaded. It is looked at only; nothing is stored. */
@Component({
  selector: 'app-choose-file',
  templateUrl: './choose-file.html',
  styleUrl: './choose-file.scss',
  imports: [EmptyState, FileSteps, MatButton, MatIcon, MatProgressBar, ProblemText, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChooseFile {
  private readonly api = inject(ApiClient);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  private upload: Subscription | null = null;

  protected readonly mayBringIn = computed(() => this.session.may('grower'));
  protected readonly isOver = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly sending = signal<Sending | null>(null);
  protected readonly percent = computed(() => {
    const sending = this.sending();
    if (sending === null || sending.totalBytes === null || sending.totalBytes === 0) return null;
    return Math.floor((100 * sending.sentBytes) / sending.totalBytes);
  });
  protected readonly sentWords = computed(() => {
    const [sending, percent] = [this.sending(), this.percent()];
    if (sending === null) return '';
    if (percent === null) return `Sending ${sending.name}`;
    return percent === 100
      ? `${sending.name} has arrived and is being looked at`
      : `Sending ${sending.name}: ${percent} % of ${sizeWords(sending.totalBytes ?? 0)}`;
  });

  protected over(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(true);
  }

  protected drop(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(false);
    const files = event.dataTransfer?.files;
    if (files !== undefined && files.length > 1) {
      this.problem.set('One file at a time, please: each has columns of its own to match.');
      return;
    }
    this.take(files?.[0]);
  }

  protected choose(chooser: HTMLInputElement): void {
    this.take(chooser.files?.[0]);
    // The same file may be chosen again after a failure.
    chooser.value = '';
  }

  protected cancel(): void {
    this.upload?.unsubscribe();
  }

  private take(file: File | undefined): void {
    const roomId = this.session.roomId();
    if (file === undefined || roomId === null || this.sending() !== null) return;
    if (file.size === 0) {
      this.problem.set(
        `${file.name} is empty. Save it again from the logger’s program, then choose it here.`,
      );
      return;
    }
    this.problem.set(null);
    this.sending.set({ name: file.name, sentBytes: 0, totalBytes: file.size });
    const form = new FormData();
    form.append('file', file);
    this.upload = this.api
      .upload(uploadLoggerFile, { params: { roomId }, form })
      .pipe(finalize(() => this.sending.set(null)))
      .subscribe({
        next: (step) => {
          if (step.type === 'answered')
            void this.router.navigate(['/loggers', step.reply.id], { replaceUrl: true });
          else this.sending.set({ name: file.name, ...step });
        },
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
