import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { changeMailChoice, type Membership } from '@shared/contracts/people';
import { usualLetterTime, type MailChoice, type Telling } from '@shared/mail/mail-choice';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';

/** Which mails one room sends to the person. Every choice is saved as it is made. */
@Component({
  selector: 'app-room-mails',
  templateUrl: './room-mails.html',
  styleUrl: './room-mails.scss',
  imports: [MatCheckbox, MatFormFieldModule, MatInput, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoomMails {
  readonly room = input.required<Membership>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);

  protected readonly mails = computed(() => this.room().mails);
  protected readonly ways: readonly { readonly value: Telling; readonly label: string }[] = [
    { value: 'atOnce', label: 'By mail at once' },
    { value: 'morningLetter', label: 'In the morning letter' },
    { value: 'never', label: 'Not by mail' },
  ];

  /** Leaving alerts to the letter turns the letter on, for else nobody would tell them. */
  protected tell(urgency: 'lookToday' | 'goNow', telling: Telling): void {
    const letterAt = this.mails().letterAt;
    const needsLetter = telling === 'morningLetter' && letterAt === null;
    this.choose({ [urgency]: telling, ...(needsLetter ? { letterAt: usualLetterTime } : {}) });
  }

  protected setQuiet(isOn: boolean): void {
    this.choose({ quietHours: isOn ? { from: '22:00', to: '07:00' } : null });
  }

  protected setQuietTime(end: 'from' | 'to', time: string): void {
    const quietHours = this.mails().quietHours;
    if (quietHours !== null && time !== '') this.choose({ quietHours: { ...quietHours, [end]: time } });
  }

  /** Without a letter, alerts that were left to it come by mail again. */
  protected setLetter(isOn: boolean): void {
    const { lookToday, goNow } = this.mails();
    const byMail = (telling: Telling): Telling => (telling === 'morningLetter' ? 'atOnce' : telling);
    this.choose(
      isOn
        ? { letterAt: usualLetterTime }
        : { letterAt: null, lookToday: byMail(lookToday), goNow: byMail(goNow) },
    );
  }

  protected setLetterTime(time: string): void {
    if (time !== '') this.choose({ letterAt: time });
  }

  protected choose(choice: Partial<MailChoice>): void {
    const room = this.room();
    this.session.takeOver({ ...room, mails: { ...room.mails, ...choice } });
    this.api.call(changeMailChoice, { params: { roomId: room.roomId }, body: choice }).subscribe({
      next: (changed) => this.session.takeOver(changed),
      error: (error: unknown) => {
        this.session.takeOver(room);
        this.notices.sayFailure(error);
      },
    });
  }
}
