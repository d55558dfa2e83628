import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

const steps = ['Choose file', 'Match columns', 'Check', 'Bring in'] as const;

/** The four steps of bringing in a file, and which of them it stands at. */
@Component({
  selector: 'app-file-steps',
  template: `
    <ol aria-label="Steps">
      @for (step of states(); track step.number) {
        <li [class]="step.state" [attr.aria-current]="step.state === 'now' ? 'step' : null">
          <b aria-hidden="true">{{ step.state === 'done' ? '✓' : step.number }}</b>
          <span>{{ step.name }}</span>
          @if (step.state === 'done') {
            <span class="read-out-only">, done</span>
          }
        </li>
      }
    </ol>
  `,
  styleUrl: './file-steps.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileSteps {
  /** From 1 to 4; 5 when all are done. */
  readonly step = input.required<number>();

  protected readonly states = computed(() =>
    steps.map((name, index) => {
      const number = index + 1;
      if (number < this.step()) return { name, number, state: 'done' };
      return { name, number, state: number === this.step() ? 'now' : 'ahead' };
    }),
  );
}
