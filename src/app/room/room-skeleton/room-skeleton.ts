import { ChangeDetectionStrategy, Component } from '@angular/core';

/** Holds the place of two racks while the room is fetched. */
@Component({
  selector: 'app-room-skeleton',
  template: `
    <span class="read-out-only">Loading the room</span>
    @for (rack of [1, 2]; track rack) {
      <div class="frame" aria-hidden="true">
        @for (bay of [1, 2, 3, 4]; track bay) {
          <div class="bay"></div>
        }
      </div>
    }
  `,
  styleUrl: './room-skeleton.scss',
  host: { role: 'status' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoomSkeleton {}
