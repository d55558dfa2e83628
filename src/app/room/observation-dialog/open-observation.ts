import type { Injector } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { ShelfEvent } from '@shared/contracts/care';
import type { Observable } from 'rxjs';
import { ObservationDialog, type ObservationPlace } from './observation-dialog';

/**
 * Asks what was seen or done. Dialogs and forms come with this file, so that Room can be drawn without them.
 *
 * @param injector - Of the screen.
 * @param place - Where an observation can be noted.
 * @returns What was noted, undefined when the dialog was left.
 */
export function openObservation(
  injector: Injector,
  place: ObservationPlace,
): Observable<ShelfEvent | undefined> {
  return injector
    .get(MatDialog)
    .open<ObservationDialog, ObservationPlace, ShelfEvent>(ObservationDialog, {
      data: place,
      width: '480px',
      maxWidth: 'calc(100vw - 24px)',
    })
    .afterClosed();
}
