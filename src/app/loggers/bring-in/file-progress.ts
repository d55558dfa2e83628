import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatProgressBar } from '@angular/material/progress-bar';
import { sizeWords } from '../file-words';

/** How far the server has come with a file. */
@Component({
  selector: 'app-file-progress',
  template: `
    <section>
      <p>{{ doing() }}</p>
      <mat-progress-bar
        aria-label="Progress"
        [mode]="percent() === null ? 'indeterminate' : 'determinate'"
        [value]="percent() ?? 0"
      />
      <p class="read" role="status">{{ words() }}</p>
      @if (mayCancel()) {
        <button matButton="outlined" type="button" [disabled]="isStopping()" (click)="cancelChosen.emit()">
          Stop
        </button>
      }
    </section>
  `,
  styles: `
    section {
      display: grid;
      gap: 12px;
      max-width: 640px;
      padding: 20px;
      border: 1px solid var(--rule);
      border-radius: var(--corner);
      background: var(--sheet);
    }

    p {
      margin: 0;
    }

    .read {
      color: var(--ink-2);
    }

    button {
      justify-self: start;
      min-height: var(--target);
    }
  `,
  imports: [MatButton, MatProgressBar],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileProgress {
  /** What is being done, in a sentence. */
  readonly doing = input.required<string>();
  /** Bytes done of bytes in all; null before the first is told. */
  readonly progress = input.required<{ readonly done: number; readonly total: number } | null>();
  readonly mayCancel = input.required<boolean>();
  /** Whether somebody has said that it should stop. */
  readonly isStopping = input(false);
  readonly cancelChosen = output();

  protected readonly percent = computed(() => {
    const progress = this.progress();
    if (progress === null || progress.total === 0) return null;
    return Math.floor((100 * progress.done) / progress.total);
  });
  protected readonly words = computed(() => {
    if (this.isStopping()) return 'Stopping. Nothing is stored.';
    const [progress, percent] = [this.progress(), this.percent()];
    if (progress === null || percent === null) return 'About to begin';
    return `${percent} % of ${sizeWords(progress.total)}`;
  });
}
