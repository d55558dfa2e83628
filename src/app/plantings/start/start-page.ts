import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { getCrop } from '@shared/contracts/crops';
import { startPlanting } from '@shared/contracts/plantings';
import { listSeedLots, type SeedLot } from '@shared/contracts/seed';
import { formatNumber } from '@shared/format/numbers';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { Notices } from '../../core/notices';
import { RoomClock } from '../../core/room-clock';
import { RoomCrops } from '../../core/room-crops';
import { fieldTime } from '../../core/room-instant';
import { RoomShelves } from '../../core/room-shelves';
import { Session } from '../../core/session';
import { CautionLine } from '../../ui/caution-line/caution-line';
import { CropPicker } from '../../ui/crop-picker/crop-picker';
import { NoteLine } from '../../ui/note-line/note-line';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { ProblemText } from '../../ui/states/problem-text';
import { WhenField } from '../../ui/when-field/when-field';
import { plantingTitle, stageNames } from '../words/planting-facts';
import { depthAdvice, needsGrams, startedPlanting, startForm, type StartKind } from './start-fields';

const usualContainers = ['Flat', 'Cell flat', '7 cm pot', '9 cm pot', '13 cm pot'];

/** Writes down what was sown, or plants that came from elsewhere. */
@Component({
  selector: 'app-start-page',
  templateUrl: './start-page.html',
  styleUrl: './start-page.scss',
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
    NoteLine,
    ProblemText,
    ReactiveFormsModule,
    RouterLink,
    WhenField,
  ],
  providers: [FormSaving, RoomCrops, RoomShelves],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StartPage {
  /** From the address: what to begin with. */
  readonly lot = input<string>();
  readonly crop = input<string>();
  readonly shelf = input<string>();

  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly crops = inject(RoomCrops);
  protected readonly places = inject(RoomShelves);
  // One for the whole page: sending again after a lost answer sows nothing twice.
  private readonly idempotencyKey = newIdempotencyKey();

  protected readonly form = startForm();
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);
  protected readonly kinds = [
    { how: 'sown', word: 'Sow seed' },
    { how: 'broughtIn', word: 'Bring plants in' },
  ] as const;
  protected readonly arrivals = (['seedling', 'growingOn', 'fruiting', 'resting'] as const).map((stage) => ({
    stage,
    word: stageNames[stage],
  }));

  private readonly lotResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listSeedLots, { params, query: {} }),
  });
  protected readonly lots = computed(() =>
    (this.lotResource.hasValue() ? this.lotResource.value() : []).map((lot) => ({
      lot,
      words: lotWords(lot),
    })),
  );

  private readonly controls = this.form.controls;
  protected readonly how = toSignal(this.controls.how.valueChanges, { initialValue: 'sown' as StartKind });
  private readonly lotId = toSignal(this.controls.lotId.valueChanges, { initialValue: null });
  private readonly cropId = toSignal(this.controls.cropId.valueChanges, { initialValue: null });
  private readonly count = toSignal(this.controls.count.valueChanges, { initialValue: null });
  private readonly shelfId = toSignal(this.controls.shelfId.valueChanges, { initialValue: null });
  private readonly typedVariety = toSignal(this.controls.variety.valueChanges, { initialValue: '' });

  protected readonly chosenLot = computed(
    () => this.lots().find(({ lot }) => lot.id === this.lotId())?.lot ?? null,
  );
  protected readonly needsGrams = computed(() => needsGrams(this.chosenLot()));
  private readonly cropResource = rxResource({
    params: () => {
      const [roomId, cropId] = [this.session.roomId(), this.cropId()];
      return roomId === null || cropId === null ? undefined : { roomId, cropId };
    },
    stream: ({ params }) => this.api.call(getCrop, { params }),
  });
  protected readonly chosenCrop = computed(() =>
    this.cropResource.hasValue() ? this.cropResource.value() : null,
  );
  protected readonly depth = computed(() => {
    const crop = this.chosenCrop();
    return crop === null ? null : depthAdvice(crop.seed);
  });
  protected readonly varieties = computed(() => this.crops.varietiesOf(this.cropId(), this.typedVariety()));
  protected readonly containers = computed(() => {
    const usual = this.chosenCrop()?.usualPot?.value;
    return usual === undefined ? usualContainers : [usual, ...usualContainers];
  });
  /** How many of the seeds may come up. */
  protected readonly expected = computed(() => {
    const [expectation, count] = [this.chosenLot()?.expectation ?? null, this.count()];
    if (expectation === null || count === null || count < 1) return null;
    const share = (percent: number): string => formatNumber((count * percent) / 100, 0);
    return `About ${share(expectation.percent)} should come up (${expectation.source}: ${formatNumber(expectation.percent, 0)} %).`;
  });
  protected readonly hasHeatMat = computed(
    () =>
      this.places.shelves().find(({ id }) => id === this.shelfId())?.heatMat !== null &&
      this.shelfId() !== null,
  );
  protected readonly toxicity = computed(() => {
    const figure = this.chosenCrop()?.toxicToPets ?? null;
    return figure?.value === 'toxic' ? `Harms cats or dogs that eat of it (${figure.source}).` : null;
  });
  protected readonly now = computed(() => fieldTime(this.clock.calmNow(), this.session.timeZone()));

  constructor() {
    effect(() => {
      const [lotId, cropId, shelfId] = [this.lot(), this.crop(), this.shelf()];
      untracked(() =>
        this.form.patchValue({
          ...(lotId === undefined ? {} : { lotId }),
          ...(cropId === undefined ? {} : { cropId }),
          ...(shelfId === undefined ? {} : { shelfId }),
        }),
      );
    });
    effect(() => {
      const lot = this.chosenLot();
      if (lot !== null)
        untracked(() => this.form.patchValue({ cropId: lot.cropId, variety: lot.variety ?? '' }));
    });
    effect(() => {
      const depth = this.depth();
      untracked(() => this.suggestDepth(depth?.depthMm ?? null));
    });
    this.controls.how.valueChanges.pipe(takeUntilDestroyed()).subscribe((how) => {
      if (how === 'broughtIn') this.form.patchValue({ lotId: null });
    });
  }

  protected save(): void {
    const [roomId, body] = [this.session.roomId(), startedPlanting(this.form, this.session.timeZone())];
    if (this.saving.isSaving() || roomId === null) return;
    if (this.form.invalid || body === null) {
      this.form.markAllAsTouched();
      this.saving.problem.set('Some fields need another look; they say what.');
      return;
    }
    this.saving.send(
      this.form,
      this.api.call(startPlanting, { params: { roomId }, body, idempotencyKey: this.idempotencyKey }),
      (planting) => {
        this.notices.say(`${plantingTitle(planting)} written down`);
        void this.router.navigate(['/plantings', planting.id], {
          queryParams: { care: 'usual' },
          replaceUrl: true,
        });
      },
    );
  }

  /** What somebody typed stays; only an untouched field follows the crop. */
  private suggestDepth(depthMm: number | null): void {
    if (this.controls.depthMm.pristine) this.controls.depthMm.setValue(depthMm);
  }
}

function lotWords({ cropName, variety, packedYear, seedsLeft, left, age }: SeedLot): string {
  const amount =
    seedsLeft === null ? `${formatNumber(left, 2)} g left` : `${formatNumber(seedsLeft, 0)} left`;
  return [
    [cropName, variety].filter((part) => part !== null).join(' '),
    packedYear === null ? null : `packed ${packedYear}`,
    amount,
    age.useFirst ? 'use first' : null,
  ]
    .filter((part) => part !== null)
    .join(' · ');
}
