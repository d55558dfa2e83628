import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { weekdayNames } from '@shared/care/timing-words';
import { addAbsence, removeAbsence, type Absence } from '@shared/contracts/care-rota';
import { ApiClient, newIdempotencyKey } from '../../../core/api-client';
import { Notices } from '../../../core/notices';
import { Session } from '../../../core/session';
import { RotaData } from '../rota-data';
import { dayTitle } from '../week/week-words';
import { AbsenceDialog } from './absence-dialog';
import { WeekDialog } from './week-dialog';

const list = new Intl.ListFormat('en-GB');

/** The usual week, and who is away. */
@Component({
  selector: 'app-duty-card',
  template: `
    @if (data.rota(); as rota) {
      <h2>The usual week</h2>
      @if (rota.isKept) {
        <table>
          <tbody>
            @for (line of week(); track line.name) {
              <tr>
                <th scope="row">{{ line.name }}</th>
                <td>{{ line.words }}</td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <p>Nobody is on duty on any day, so care that is for whoever is on duty is anybody’s.</p>
      }
      @if (mayPlan()) {
        <div class="actions">
          <button matButton="outlined" type="button" (click)="changeWeek()">Change the usual week</button>
        </div>
      }
      <h2 class="second">Away</h2>
      <ul>
        @for (line of absences(); track line.absence.id) {
          <li>
            <div>
              <b>{{ line.absence.personName }}</b>
              <p>{{ line.words }}</p>
            </div>
            @if (line.mayRemove) {
              <button matButton type="button" (click)="remove(line.absence)">
                Take back<span class="read-out-only">, {{ line.absence.personName }} {{ line.words }}</span>
              </button>
            }
          </li>
        } @empty {
          <li><p>Nobody in this week.</p></li>
        }
      </ul>
      @if (mayBeAway()) {
        <div class="actions">
          <button matButton="outlined" type="button" (click)="add()">
            {{ mayPlan() ? 'Note an absence' : 'I’m away' }}
          </button>
        </div>
      }
    }
  `,
  styleUrl: '../rota-card.scss',
  styles: `
    .second {
      margin-top: 18px;
    }
  `,
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DutyCard {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  protected readonly data = inject(RotaData);

  protected readonly mayPlan = computed(() => this.session.may('keeper'));
  protected readonly mayBeAway = computed(() => this.session.may('helper'));
  protected readonly week = computed(() =>
    (this.data.rota()?.week ?? []).map(({ weekday, isClosed, onDuty }) => {
      const names = list.format(onDuty.map(({ name }) => name));
      return {
        name: weekdayNames[weekday - 1] ?? '',
        words: isClosed ? 'Closed' : names === '' ? 'Nobody' : names,
      };
    }),
  );
  protected readonly absences = computed(() =>
    (this.data.rota()?.absences ?? []).map((absence) => ({
      absence,
      words: awayWords(absence),
      mayRemove: this.mayPlan() || absence.personId === this.session.account()?.id,
    })),
  );

  protected changeWeek(): void {
    const rota = this.data.rota();
    if (rota === null) return;
    this.dialog
      .open<WeekDialog, WeekDialog['week'], true>(WeekDialog, {
        data: rota.week,
        width: '560px',
        maxWidth: '96vw',
      })
      .afterClosed()
      .subscribe((isSet) => {
        if (isSet !== true) return;
        this.data.refresh();
        this.notices.say('The usual week is set; open tasks follow it');
      });
  }

  protected add(): void {
    this.dialog
      .open<AbsenceDialog, string, Absence>(AbsenceDialog, {
        data: this.data.today(),
        width: '460px',
        maxWidth: '96vw',
      })
      .afterClosed()
      .subscribe((absence) => {
        if (absence === undefined) return;
        this.data.refresh();
        this.notices
          .sayUndoable(`${absence.personName} is away ${awayWords(absence)}`)
          .subscribe(() => this.removeQuietly(absence));
      });
  }

  protected remove(absence: Absence): void {
    this.send(absence, () =>
      this.notices.sayUndoable(`${absence.personName} is not away any more`).subscribe(() => {
        const { personId, from, to, note } = absence;
        this.api
          .call(addAbsence, {
            params: { roomId: this.session.roomId() ?? '' },
            body: { personId, from, to, note },
            idempotencyKey: newIdempotencyKey(),
          })
          .subscribe({
            next: () => this.data.refresh(),
            error: (error: unknown) => this.notices.sayFailure(error),
          });
      }),
    );
  }

  private removeQuietly(absence: Absence): void {
    this.send(absence, () => this.notices.say('Taken back'));
  }

  private send({ id }: Absence, done: () => void): void {
    const params = { roomId: this.session.roomId() ?? '', absenceId: id };
    this.api.call(removeAbsence, { params }).subscribe({
      next: () => {
        this.data.refresh();
        done();
      },
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }
}

/** "Thu 3 Dec to Sun 6 Dec, at my sister’s" */
function awayWords({ from, to, note }: Absence): string {
  const days = from === to ? `on ${dayTitle(from)}` : `${dayTitle(from)} to ${dayTitle(to)}`;
  return note === '' ? days : `${days}, ${note}`;
}
