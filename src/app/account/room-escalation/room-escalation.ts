import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { getEscalation, setEscalation, type Escalation } from '@shared/contracts/mail';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';

/** After how long without acknowledgement a room's keepers are written to; for keepers. */
@Component({
  selector: 'app-room-escalation',
  template: `
    @if (shown(); as escalation) {
      <h4>When nobody acknowledges an alert</h4>
      <p>
        The room’s keepers are written to: those who had no mail about it, else all once more. For everybody
        in this room; only keepers set it.
      </p>
      <div class="times">
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Urgent, after</mat-label>
          <mat-select
            [value]="escalation.goNowMinutes"
            (selectionChange)="set({ goNowMinutes: $event.value })"
          >
            @for (time of times; track time.minutes) {
              <mat-option [value]="time.minutes">{{ time.label }}</mat-option>
            }
          </mat-select>
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Can wait a day, after</mat-label>
          <mat-select
            [value]="escalation.lookTodayMinutes"
            (selectionChange)="set({ lookTodayMinutes: $event.value })"
          >
            @for (time of times; track time.minutes) {
              <mat-option [value]="time.minutes">{{ time.label }}</mat-option>
            }
          </mat-select>
        </mat-form-field>
      </div>
    }
  `,
  styleUrl: '../setting.scss',
  styles: `
    :host {
      margin-top: 14px;
      padding: 14px 0 0;
      border-width: 1px 0 0;
      border-radius: 0;
    }

    h4 {
      margin: 0 0 4px;
    }

    .times {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(200px, 1fr));
      gap: 14px;
    }
  `,
  imports: [MatFormFieldModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoomEscalation {
  readonly roomId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);

  private readonly stored = rxResource({
    params: () => this.roomId(),
    stream: ({ params: roomId }) => this.api.call(getEscalation, { params: { roomId } }),
  });
  private readonly chosen = signal<Escalation | null>(null);

  protected readonly times = [
    { minutes: 15, label: '15 minutes' },
    { minutes: 30, label: '30 minutes' },
    { minutes: 60, label: '1 hour' },
    { minutes: 120, label: '2 hours' },
    { minutes: 240, label: '4 hours' },
    { minutes: 480, label: '8 hours' },
    { minutes: 1_440, label: '1 day' },
    { minutes: null, label: 'Never' },
  ];

  /** Null until the room's times are known; nothing is shown where they can't be read. */
  protected shown(): Escalation | null {
    return this.chosen() ?? (this.stored.hasValue() ? this.stored.value() : null);
  }

  protected set(change: Partial<Escalation>): void {
    const before = this.shown();
    if (before === null) return;
    const body = { ...before, ...change };
    this.chosen.set(body);
    this.api.call(setEscalation, { params: { roomId: this.roomId() }, body }).subscribe({
      error: (error: unknown) => {
        this.chosen.set(before);
        this.notices.sayFailure(error);
      },
    });
  }
}
