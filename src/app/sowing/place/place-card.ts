import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import type { FrostDates } from '@shared/contracts/sowing';
import { formatShortDay } from '@shared/format/room-time';
import type { FrostSeason } from '@shared/growing/frost-date';
import { frostMeaning } from '@shared/growing/frost-words';
import { Notices } from '../../core/notices';
import { FrostDialog, type FrostSubject } from '../frost/frost-dialog';
import { SowingData } from '../sowing-data';
import { PlaceDialog, type PlaceSubject } from './place-dialog';
import { placeText } from './place-words';

/** Where the room is and when frost ends and begins there: what every window is counted from. */
@Component({
  selector: 'app-place-card',
  templateUrl: './place-card.html',
  styleUrl: '../sowing-card.scss',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlaceCard {
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  protected readonly data = inject(SowingData);

  protected readonly frost = computed(() => this.data.calendar()?.frost ?? null);
  protected readonly place = computed(() => {
    const room = this.data.room();
    return room === null || room.latitudeDeg === null ? null : placeText(room.latitudeDeg, room.longitudeDeg);
  });
  protected readonly dates = computed(() => {
    const frost = this.frost();
    if (frost === null) return [];
    return [
      this.date('Last frost', frost.lastSpring, 'spring'),
      this.date('First frost', frost.firstAutumn, 'autumn'),
    ];
  });

  protected changeFrost(): void {
    const frost = this.frost();
    if (frost === null) return;
    const data: FrostSubject = { frost, save: (entry) => this.data.setFrost(entry) };
    this.dialog
      .open<FrostDialog, FrostSubject, boolean>(FrostDialog, { data, maxWidth: '560px' })
      .afterClosed()
      .subscribe((isSaved) => {
        if (isSaved === true) this.notices.say('Frost dates saved; the windows follow them');
      });
  }

  protected changePlace(): void {
    const room = this.data.room();
    if (room === null) return;
    const data: PlaceSubject = { room, save: (place) => this.data.setPlace(place) };
    this.dialog
      .open<PlaceDialog, PlaceSubject, boolean>(PlaceDialog, { data, maxWidth: '480px' })
      .afterClosed()
      .subscribe((isSaved) => {
        if (isSaved === true) this.notices.say('Place saved; the length of the day follows it');
      });
  }

  private date(name: string, date: FrostDates['lastSpring'], season: FrostSeason) {
    return {
      name,
      // Any leap year does: only day and month are said.
      on: date === null ? null : formatShortDay(`2024-${date.on}T00:00:00Z`, 'UTC').replace(/^\w+ /, ''),
      meaning: date === null ? '' : frostMeaning(date.wording, season),
    };
  }
}
