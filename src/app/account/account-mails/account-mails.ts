import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import type { MailRefusal } from '@shared/contracts/mail';
import type { Membership } from '@shared/contracts/people';
import { formatDayAndTime } from '@shared/format/room-time';
import { Session } from '../../core/session';
import { RoomEscalation } from '../room-escalation/room-escalation';
import { RoomMails } from '../room-mails/room-mails';

/** Which mails each room sends to the person, and whether they arrive. */
@Component({
  selector: 'app-account-mails',
  template: `
    <h2>Mails</h2>
    <p>
      A room writes to you about a shelf that stays out of its wanted range. It never writes about the past.
    </p>
    @if (refused(); as refusal) {
      <p class="refused" role="status">
        <strong>Mail to you is refused since {{ when(refusal.since) }}.</strong>
        The mail server says: “{{ refusal.reason }}”. Ask a keeper to check your address; the next mail that
        is taken ends this notice.
      </p>
    }
    @for (room of memberships(); track room.roomId) {
      <app-room-mails [room]="room" />
      @if (room.role === 'keeper') {
        <app-room-escalation [roomId]="room.roomId" />
      }
    } @empty {
      <p>You are not a member of a room yet. A keeper can add you.</p>
    }
  `,
  styleUrl: '../setting.scss',
  styles: `
    .refused {
      padding: 12px 14px;
      border-left: 4px solid var(--ember);
      background: var(--ember-tint);
      color: var(--ink);
    }
  `,
  imports: [RoomEscalation, RoomMails],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountMails {
  readonly memberships = input.required<readonly Membership[]>();
  readonly refused = input.required<MailRefusal | null>();

  private readonly session = inject(Session);

  protected when(at: string): string {
    return formatDayAndTime(at, this.session.timeZone());
  }
}
