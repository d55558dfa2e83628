import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { addVariety, changeVariety, removeVariety, type Variety } from '@shared/contracts/crops';
import { filter, switchMap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { Asking } from '../../ui/dialogs/asking';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { CropData } from './crop-data';
import { NameDialog, type NameSubject } from './name-dialog';

/** The room's varieties of a crop. */
@Component({
  selector: 'app-varieties-card',
  templateUrl: './varieties-card.html',
  styleUrl: './varieties-card.scss',
  imports: [ErrorState, LoadingLines, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VarietiesCard {
  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  protected readonly data = inject(CropData);

  protected readonly failure = computed(() => {
    const error = this.data.varietyResource.error();
    return error === undefined ? null : failureText(error);
  });

  protected add(): void {
    const params = this.data.params();
    if (params === undefined) return;
    const { roomId, cropId } = params;
    this.ask(
      {
        title: 'Add a variety',
        text: 'As on the packet. Seed and plantings can then be told apart by it.',
        name: '',
        deed: 'Add it',
        save: (name) => this.api.call(addVariety, { params: { roomId }, body: { cropId, name } }),
      },
      'added',
    );
  }

  protected rename({ id, name }: Variety): void {
    const roomId = this.data.params()?.roomId;
    if (roomId === undefined) return;
    this.ask(
      {
        title: `Rename ${name}`,
        text: 'Its seed and plantings in this room get the new name too.',
        name,
        deed: 'Rename it',
        save: (changed) =>
          this.api.call(changeVariety, { params: { roomId, varietyId: id }, body: { name: changed } }),
      },
      'renamed',
    );
  }

  protected remove({ id, name }: Variety): void {
    const roomId = this.data.params()?.roomId;
    if (roomId === undefined) return;
    this.asking
      .ask({
        title: `Remove ${name}?`,
        text: 'It leaves the list. One that seed or plantings name can’t be removed.',
        confirm: 'Remove the variety',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removeVariety, { params: { roomId, varietyId: id } })),
      )
      .subscribe({
        next: () => this.tell(`${name} removed`),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private ask(subject: NameSubject<Variety>, done: string): void {
    const kept: Observable<Variety | undefined> = this.dialog
      .open<NameDialog, NameSubject<Variety>, Variety>(NameDialog, { data: subject, maxWidth: '460px' })
      .afterClosed();
    kept
      .pipe(filter((variety) => variety !== undefined))
      .subscribe(({ name }) => this.tell(`${name} ${done}`));
  }

  private tell(words: string): void {
    this.notices.say(words);
    this.data.varietyResource.reload();
  }
}
