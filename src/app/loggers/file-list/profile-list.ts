import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import {
  listFileProfiles,
  removeFileProfile,
  renameFileProfile,
  type FileProfile,
} from '@shared/contracts/logger-file-profiles';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';

/** The layouts that the room knows by name. Nothing is shown while there is none. */
@Component({
  selector: 'app-profile-list',
  templateUrl: './profile-list.html',
  styleUrl: './profile-list.scss',
  imports: [MatButton, MatFormFieldModule, MatIcon, MatIconButton, MatInput],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProfileList {
  readonly mayChange = input.required<boolean>();

  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  private readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listFileProfiles, { params }),
  });
  protected readonly profiles = computed(() =>
    (this.resource.hasValue() ? this.resource.value().profiles : []).map((profile) => ({
      profile,
      used: this.format.when(profile.usedAt),
    })),
  );
  /** The one whose name is being changed; null while none is. */
  protected readonly renamedId = signal<string | null>(null);

  protected rename(profile: FileProfile, typed: string): void {
    const name = typed.trim();
    this.renamedId.set(null);
    if (name === '' || name === profile.name) return;
    this.api.call(renameFileProfile, { params: this.target(profile), body: { name } }).subscribe({
      next: () => this.resource.reload(),
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  protected forget(profile: FileProfile): void {
    this.asking
      .ask({
        title: `Forget “${profile.name}”?`,
        text: 'Files that were read by it stay as they are. The next file of this layout is matched by hand.',
        confirm: 'Forget it',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removeFileProfile, { params: this.target(profile) })),
      )
      .subscribe({
        next: () => this.resource.reload(),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private target({ id }: FileProfile): { roomId: string; profileId: string } {
    return { roomId: this.session.roomId() ?? '', profileId: id };
  }
}
