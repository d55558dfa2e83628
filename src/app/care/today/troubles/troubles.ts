import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { Task } from '@shared/contracts/care';
import type { KeptDeed } from '../../../core/care/care-deed';
import { amountWords, outcomeWord } from '../../../core/care/task-words';
import { ReaderFormat } from '../../../core/reader-format';
import { enteredWords } from './trouble-words';

/** What the server did not take: that somebody else had done it, or why not; with what the person entered. */
@Component({
  selector: 'app-troubles',
  templateUrl: './troubles.html',
  styleUrl: './troubles.scss',
  imports: [MatButton, MatIcon],
  host: { role: 'status' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Troubles {
  readonly troubled = input.required<readonly KeptDeed[]>();
  /** Tasks as the server has them, for what somebody else noted. */
  readonly tasks = input.required<readonly Task[]>();

  readonly dismissed = output<KeptDeed>();
  readonly sentAgain = output<KeptDeed>();

  private readonly format = inject(ReaderFormat);

  protected readonly items = computed(() =>
    this.troubled().map((deed) => ({
      deed,
      title: deed.title,
      isConflict: deed.trouble?.isConflict ?? false,
      what: this.whatHappened(deed),
      theirs: this.theirs(deed),
      entered: enteredWords(deed),
      enteredAt: this.format.when(deed.at),
    })),
  );

  /** "Jo Ashdown had done this already, at 08:12." */
  private whatHappened({ trouble }: KeptDeed): string {
    if (trouble === null) return '';
    const { isConflict, byName, at, outcome, text } = trouble;
    if (!isConflict || byName === null) return text;
    const when = at === null ? '' : `, ${this.format.when(at)}`;
    return outcome === 'done' || outcome === null
      ? `${byName} had done this already${when}. Thank you all the same.`
      : `${byName} had noted already${when}: ${outcomeWord(outcome).toLowerCase()}.`;
  }

  /** What the other person noted: "400 ml · a bit dry". */
  private theirs(deed: KeptDeed): string | null {
    if (deed.kind !== 'close' || deed.trouble?.isConflict !== true) return null;
    const task = this.tasks().find(({ id }) => id === deed.taskId);
    if (task === undefined || task.outcome === null) return null;
    const words = [amountWords(task), task.note].filter((part) => part !== '').join(' · ');
    return words === '' ? null : words;
  }
}
