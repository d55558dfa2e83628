import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { MatCheckbox } from '@angular/material/checkbox';
import { changeMailChoice, type Membership } from '@shared/contracts/people';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';

type MailChoice = Pick<Membership, 'mailAlertOpened' | 'mailAlertCleared'>;

/** Which mails each room sends to the person. */
@Component({
  selector: 'app-account-mails',
  template: `
    <h2>Mails</h2>
    <p>
      A room writes to you about a shelf that stays out of its wanted range. It never writes about the past.
    </p>
    @for (room of memberships(); track room.roomId) {
      <div role="group" [attr.aria-label]="room.roomName">
        <h3>{{ room.roomName }}</h3>
        <mat-checkbox
          [checked]="room.mailAlertOpened"
          (change)="choose(room, { mailAlertOpened: $event.checked })"
        >
          When something needs a look
        </mat-checkbox>
        <mat-checkbox
          [checked]="room.mailAlertCleared"
          (change)="choose(room, { mailAlertCleared: $event.checked })"
        >
          When it is over
        </mat-checkbox>
      </div>
    } @empty {
      <p>You are not a member of a room yet. A keeper can add you.</p>
    }
  `,
  styleUrl: '../setting.scss',
  imports: [MatCheckbox],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountMails {
  readonly memberships = input.required<readonly Membership[]>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);

  protected choose(room: Membership, choice: Partial<MailChoice>): void {
    this.session.takeOver({ ...room, ...choice });
    this.api.call(changeMailChoice, { params: { roomId: room.roomId }, body: choice }).subscribe({
      next: (changed) => this.session.takeOver(changed),
      error: (error: unknown) => {
        this.session.takeOver(room);
        this.notices.sayFailure(error);
      },
    });
  }
}
