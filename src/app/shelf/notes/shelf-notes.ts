import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { shelfEventKinds, type ShelfEventKind } from '@shared/care/shelf-event';
import { addShelfEvent } from '@shared/contracts/care';
import { finalize } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { eventLooks, eventText } from '../charts/chart-marks';
import { ShelfData } from '../shelf-data';

const fewEvents = 6;

/** What was done and seen on the shelf in the span, and a place to add to it. */
@Component({
  selector: 'app-shelf-notes',
  templateUrl: './shelf-notes.html',
  styleUrl: './shelf-notes.scss',
  imports: [
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfNotes {
  private readonly api = inject(ApiClient);
  private readonly data = inject(ShelfData);
  private readonly notices = inject(Notices);
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  private readonly allEvents = computed(() =>
    [...(this.data.report()?.events ?? [])].sort((a, b) => Date.parse(b.at) - Date.parse(a.at)),
  );
  protected readonly showsAll = signal(false);
  protected readonly events = computed(() =>
    (this.showsAll() ? this.allEvents() : this.allEvents().slice(0, fewEvents)).map((event) => ({
      id: event.id,
      icon: eventLooks[event.kind].icon,
      text: eventText(event),
      when: this.format.when(event.at),
      who: event.personName,
    })),
  );
  protected readonly hiddenEvents = computed(() => this.allEvents().length - this.events().length);
  protected readonly mayAdd = computed(() => this.session.may('helper'));

  protected readonly kinds = shelfEventKinds.map((kind) => ({ kind, word: eventLooks[kind].word }));
  protected readonly isAdding = signal(false);
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly fields = new FormGroup({
    kind: new FormControl<ShelfEventKind>('observed', { nonNullable: true }),
    text: new FormControl('', { nonNullable: true }),
  });
  /** The same while one note is tried again, so that it is stored once. */
  private idempotencyKey = newIdempotencyKey();

  protected add(): void {
    const params = this.data.params();
    const { kind, text } = this.fields.getRawValue();
    if (params === undefined) return;
    if (text.trim() === '') {
      this.problem.set('Write a few words: how much, how many, what you saw.');
      return;
    }
    this.problem.set(null);
    this.isSaving.set(true);
    this.api
      .call(addShelfEvent, {
        params,
        body: { kind, text: text.trim() },
        idempotencyKey: this.idempotencyKey,
      })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.close(),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }

  private close(): void {
    this.idempotencyKey = newIdempotencyKey();
    this.fields.reset();
    this.isAdding.set(false);
    this.data.refresh();
    this.notices.say('Noted');
  }
}
