import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatRadioModule } from '@angular/material/radio';
import type { Account, TemperatureUnit, Theme } from '@shared/contracts/people';
import { themeOf, viewOf } from '../../core/account-theme';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { ThemeChoice } from '../../ui/theme/theme-choice';

/** How the person reads temperatures, and by which light they read. */
@Component({
  selector: 'app-account-view',
  template: `
    <h2>How things are shown</h2>
    <h3 id="unit-name">Temperatures</h3>
    <mat-radio-group
      aria-labelledby="unit-name"
      [value]="account().temperatureUnit"
      (change)="chooseUnit($event.value)"
    >
      <mat-radio-button value="celsius">°C</mat-radio-button>
      <mat-radio-button value="fahrenheit">°F</mat-radio-button>
    </mat-radio-group>
    <h3 id="view-name">View</h3>
    <mat-radio-group aria-labelledby="view-name" [value]="theme()" (change)="chooseTheme($event.value)">
      <mat-radio-button value="system">As this device has it</mat-radio-button>
      <mat-radio-button value="day">Day</mat-radio-button>
      <mat-radio-button value="lampsOff">Lamps off</mat-radio-button>
    </mat-radio-group>
  `,
  styleUrl: '../setting.scss',
  imports: [MatRadioModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountView {
  readonly account = input.required<Account>();

  private readonly session = inject(Session);
  private readonly notices = inject(Notices);
  private readonly view = inject(ThemeChoice);

  /** What this device shows, which a person may have changed here alone since they signed in. */
  protected readonly theme = computed(() => themeOf(this.view.choice()));

  protected chooseUnit(temperatureUnit: TemperatureUnit): void {
    this.save({ temperatureUnit });
  }

  protected chooseTheme(theme: Theme): void {
    this.view.choose(viewOf(theme));
    this.save({ theme });
  }

  private save(changes: { temperatureUnit: TemperatureUnit } | { theme: Theme }): void {
    this.session.change(changes).subscribe({ error: (error: unknown) => this.notices.sayFailure(error) });
  }
}
