import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { Notices } from '../core/notices';
import { Session } from '../core/session';
import { AccountCalendar } from './account-calendar/account-calendar';
import { AccountMails } from './account-mails/account-mails';
import { AccountName } from './account-name/account-name';
import { AccountPassword } from './account-password/account-password';
import { AccountView } from './account-view/account-view';

/** A person's own settings. */
@Component({
  selector: 'app-account',
  template: `
    @if (account(); as account) {
      <header>
        <h1 tabindex="-1">Your account</h1>
        <p>Signed in as {{ account.email }}</p>
      </header>
      <app-account-name [name]="account.name" />
      <app-account-view [account]="account" />
      <app-account-mails [memberships]="account.memberships" [refused]="account.mailRefused" />
      <app-account-calendar />
      <app-account-password [email]="account.email" />
      <button matButton="outlined" class="leave" type="button" (click)="signOut()">
        <mat-icon aria-hidden="true">logout</mat-icon>Sign out
      </button>
    }
  `,
  styleUrl: './account.scss',
  imports: [AccountCalendar, AccountMails, AccountName, AccountPassword, AccountView, MatButton, MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPage {
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);
  protected readonly account = this.session.account;

  protected signOut(): void {
    this.session.signOut().subscribe({ error: (error: unknown) => this.notices.sayFailure(error) });
  }
}
