import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { LoggerFileDetail } from '@shared/contracts/logger-files';
import { LoggerFileData } from '../logger-file-data';

/** How files of this layout were read before, and keeping how this one is read. */
@Component({
  selector: 'app-file-profiles',
  template: `
    <h2>Files like this one</h2>
    @if (file().profiles.length > 0) {
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Read it as</mat-label>
        <mat-select [value]="file().profileId" [disabled]="!mayMatch()" (valueChange)="use($event)">
          @for (profile of file().profiles; track profile.id) {
            <mat-option [value]="profile.id">{{ profile.name }}</mat-option>
          }
        </mat-select>
      </mat-form-field>
    }
    @if (mayMatch()) {
      <p>Keep these choices for the next file of the same layout. Scripts bring files in by that name.</p>
      <form (submit)="$event.preventDefault(); keep(name.value)" novalidate>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Name for these choices</mat-label>
          <input matInput #name maxlength="80" />
        </mat-form-field>
        <button matButton="outlined" type="submit" [disabled]="data.isBusy()">Keep</button>
      </form>
      @if (missesName()) {
        <p role="alert">Give them a name first.</p>
      }
    }
  `,
  styles: `
    :host {
      display: block;
      padding: 14px 16px;
      border: 1px solid var(--rule);
      border-radius: var(--corner);
      background: var(--sheet);
    }

    mat-form-field {
      width: 100%;
      margin-top: 10px;
    }

    p {
      margin: 8px 0 0;
      color: var(--ink-2);
      text-wrap: pretty;
    }

    button {
      margin-top: 8px;
      min-height: var(--target);
    }
  `,
  imports: [MatButton, MatFormFieldModule, MatInput, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileProfiles {
  readonly file = input.required<LoggerFileDetail>();
  readonly mayMatch = input.required<boolean>();

  protected readonly data = inject(LoggerFileData);
  protected readonly missesName = signal(false);

  protected use(profileId: string): void {
    this.data.match({ profileId });
  }

  protected keep(typed: string): void {
    const name = typed.trim();
    this.missesName.set(name === '');
    if (name !== '') this.data.match({ saveAs: name });
  }
}
