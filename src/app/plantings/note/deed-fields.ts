import { FormControl, FormGroup, Validators, type ValidatorFn } from '@angular/forms';
import type { Planting } from '@shared/contracts/plantings';
import type { LossReason, SettableStage } from '@shared/growing/planting-event';
import { typedInstant } from '../../core/room-instant';
import type { Deed, DeedKind } from './deed';

/** The fields of a deed; which of them are asked is the deed's. */
export type DeedForm = ReturnType<typeof deedForm>;

const most = 100_000;
const wholeNumber = Validators.pattern(/^\d+$/);
const written = Validators.pattern(/\S/);

const needsCount: readonly DeedKind[] = ['prickedOut', 'lost', 'split'];
const needsContainer: readonly DeedKind[] = ['prickedOut', 'pottedOn'];

/**
 * The fields of one deed, begun with what is likely.
 *
 * @param kind - Which deed.
 * @param planting - To which planting.
 */
export function deedForm(kind: DeedKind, planting: Pick<Planting, 'count' | 'shelfId' | 'stage'>) {
  const when = (isAsked: boolean, ...validators: ValidatorFn[]): ValidatorFn[] => (isAsked ? validators : []);
  // Of a harvest there may be more pieces than plants; of anything else no more than stand there.
  const mostCount = kind === 'harvested' ? most : Math.max(1, planting.count);
  const [asksShelf, asksOther] = [kind === 'moved', kind === 'merged'];
  return new FormGroup(
    {
      count: new FormControl<number | null>(kind === 'prickedOut' ? planting.count : null, {
        validators: [
          ...when(needsCount.includes(kind), Validators.required),
          Validators.min(1),
          Validators.max(mostCount),
          wholeNumber,
        ],
      }),
      grams: new FormControl<number | null>(null, {
        validators: [Validators.min(0.1), Validators.max(1_000_000)],
      }),
      container: new FormControl('', {
        nonNullable: true,
        validators: when(needsContainer.includes(kind), Validators.required, written),
      }),
      /** The id of a shelf; empty for none. */
      shelfId: new FormControl<string | null>(asksShelf ? null : (planting.shelfId ?? ''), {
        validators: when(asksShelf, (control) => (control.value === null ? { required: true } : null)),
      }),
      stage: new FormControl<SettableStage>(planting.stage === 'growingOn' ? 'fruiting' : 'growingOn', {
        nonNullable: true,
      }),
      lossReason: new FormControl<LossReason>('unknown', { nonNullable: true }),
      otherId: new FormControl<string | null>(null, { validators: when(asksOther, Validators.required) }),
      note: new FormControl('', {
        nonNullable: true,
        validators: when(kind === 'noted', Validators.required, written),
      }),
      at: new FormControl('', { nonNullable: true }),
    },
    {
      validators: when(kind === 'harvested', (form) => {
        const { grams, count } = form.value as { grams: number | null; count: number | null };
        return grams === null && count === null ? { nothing: true } : null;
      }),
    },
  );
}

/**
 * What is sent of a deed. Only for valid fields.
 *
 * @param zone - IANA name of the room's time zone.
 */
export function deedOf(kind: DeedKind, form: DeedForm, zone: string): Deed {
  const { count, grams, container, shelfId, stage, lossReason, otherId, note, at } = form.getRawValue();
  const noted = { note: note.trim(), at: typedInstant(at, zone) };
  const place = shelfId === '' ? null : shelfId;
  const many = count ?? 0;
  switch (kind) {
    case 'harvested':
      return { via: 'observation', body: { kind, ...noted, grams, count } };
    case 'noted':
      return { via: 'observation', body: { kind, ...noted } };
    case 'prickedOut':
      return { via: 'step', body: { kind, ...noted, count: many, container: container.trim() } };
    case 'pottedOn':
      return { via: 'step', body: { kind, ...noted, container: container.trim() } };
    case 'moved':
      return { via: 'step', body: { kind, ...noted, shelfId: place } };
    case 'staged':
      return { via: 'step', body: { kind, ...noted, stage } };
    case 'hardened':
      return { via: 'step', body: { kind: 'staged', ...noted, stage: 'hardeningOff' } };
    case 'plantedOut':
      return { via: 'step', body: { kind, ...noted, count } };
    case 'lost':
      return { via: 'step', body: { kind, ...noted, count: many, lossReason } };
    case 'ended':
      return { via: 'step', body: { kind, ...noted } };
    case 'split': {
      const into = container.trim();
      const body = { ...noted, count: many, shelfId: place, ...(into === '' ? {} : { container: into }) };
      return { via: 'split', body };
    }
    case 'merged':
      return { via: 'merge', body: { ...noted, otherId: otherId ?? '' } };
  }
}
