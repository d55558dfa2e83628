import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { addSeedLot, changeSeedLot, type SeedLot } from '@shared/contracts/seed';
import type { Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { readStored, store } from '../../core/device-storage';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomCrops } from '../../core/room-crops';
import { Session } from '../../core/session';
import { CautionLine } from '../../ui/caution-line/caution-line';
import { CropPicker } from '../../ui/crop-picker/crop-picker';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { ProblemText } from '../../ui/states/problem-text';
import { LotData } from '../lot/lot-data';
import { lotTitle } from '../seed-words';
import { fillLotForm, lotChange, lotForm, newLot } from './lot-fields';

const currencyKey = 'lampmeadow.currency';

/** Writes a new packet of seed down, or changes what is written of one. */
@Component({
  selector: 'app-lot-form-page',
  templateUrl: './lot-form-page.html',
  styleUrl: './lot-form-page.scss',
  imports: [
    CautionLine,
    CropPicker,
    ErrorState,
    LoadingLines,
    MatAutocompleteModule,
    MatButton,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
    RouterLink,
  ],
  providers: [FormSaving, LotData, RoomCrops],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LotFormPage {
  /** From the path: the lot that is changed; none for a new one. */
  readonly lotId = input<string>();

  private readonly api = inject(ApiClient);
  private readonly data = inject(LotData);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly crops = inject(RoomCrops);

  protected readonly year = Number(inject(ReaderFormat).today().slice(0, 4));
  protected readonly form = lotForm(this.year);
  private readonly cropId = toSignal(this.form.controls.cropId.valueChanges, { initialValue: null });
  private readonly variety = toSignal(this.form.controls.variety.valueChanges, { initialValue: '' });
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);

  protected readonly isNew = computed(() => this.lotId() === undefined);
  protected readonly title = computed(() => {
    const lot = this.data.lot();
    return this.isNew() ? 'Add a packet of seed' : lot === null ? 'Seed' : `Change ${lotTitle(lot)}`;
  });
  protected readonly isReady = computed(
    () => this.crops.all() !== null && (this.isNew() || this.data.lot() !== null),
  );
  protected readonly failure = computed(() => this.crops.failure() ?? this.data.failure());
  protected readonly varieties = computed(() => this.crops.varietiesOf(this.cropId(), this.variety()));

  constructor() {
    this.form.controls.currency.setValue(readStored(currencyKey) ?? '');
    effect(() => this.data.lotId.set(this.lotId() ?? null));
    effect(() => {
      const lot = this.data.lot();
      if (lot !== null) untracked(() => fillLotForm(this.form, lot));
    });
  }

  protected retry(): void {
    this.crops.resource.reload();
    this.data.resource.reload();
  }

  protected save(): void {
    if (this.form.invalid || this.saving.isSaving()) {
      this.form.markAllAsTouched();
      this.saving.problem.set(this.form.invalid ? 'Some fields need another look; they say what.' : null);
      return;
    }
    const call = this.call();
    if (call === null) return;
    this.saving.send(this.form, call, (lot) => this.leave(lot));
  }

  private call(): Observable<SeedLot> | null {
    const [params, body, roomId] = [this.data.params(), newLot(this.form), this.session.roomId()];
    if (params !== undefined) return this.api.call(changeSeedLot, { params, body: lotChange(this.form) });
    return body === null || roomId === null ? null : this.api.call(addSeedLot, { params: { roomId }, body });
  }

  private leave(lot: SeedLot): void {
    if (lot.currency !== null) store(currencyKey, lot.currency);
    this.notices.say(this.isNew() ? `${lotTitle(lot)} added` : `${lotTitle(lot)} changed`);
    void this.router.navigate(['/seed', lot.id], { replaceUrl: true });
  }
}
