import { crop as cropSchema, cropFigures } from '@shared/contracts/crops';
import type { Crop as CropView, CropFigures, CropSummary } from '@shared/contracts/crops';
import type { Crop } from '@shared/growing/crops/crop';
import { cropById, cropByName, cropLibrary } from '@shared/growing/crops/crop-library';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField, notFound } from '../http/request-problem';
import type { CropsStore, StoredCrop } from './crops-store';
import type { VarietiesStore } from './varieties-store';

/** What {@link CropsService} works with. */
export interface CropsParts {
  readonly transactions: Transactions;
  readonly crops: CropsStore;
  readonly varieties: VarietiesStore;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** Crops of the library and those that a room made its own. */
export class CropsService {
  constructor(private readonly parts: CropsParts) {}

  /** All crops that a room may sow, by name. */
  async list(roomId: string): Promise<CropSummary[]> {
    const { transactions, crops, varieties } = this.parts;
    const tx = transactions.plain;
    const own = (await crops.ofRoom(tx, roomId)).map(viewOfOwn);
    const named = await varieties.ofRoom(tx, roomId);
    return [...own, ...cropLibrary.map(viewOfLibrary)]
      .map((view) => summaryOf(view, namesOf(named, view.id)))
      .sort((one, other) => one.name.localeCompare(other.name, 'en'));
  }

  /** One crop with its figures; 404 when neither the library nor the room has it. */
  async view(roomId: string, cropId: string): Promise<CropView> {
    const library = cropById(cropId);
    return library === null
      ? viewOfOwn(await this.own(this.parts.transactions.plain, roomId, cropId))
      : viewOfLibrary(library);
  }

  /**
   * A crop as the domain computes with it.
   *
   * @param tx - To read with.
   * @param roomId - Of which room.
   * @param cropId - Of the library or of the room, retired ones too.
   * @returns The crop; null when there is none.
   */
  async crop(tx: Tx, roomId: string, cropId: string): Promise<Crop | null> {
    const library = cropById(cropId);
    if (library !== null) return library;
    const own = await this.parts.crops.byId(tx, roomId, cropId);
    return own === null ? null : domainCrop(own);
  }

  /**
   * A crop to sow.
   *
   * @param tx - Of the change.
   * @param roomId - In which room.
   * @param cropId - As a request names it, in `path`.
   * @param path - Of the field.
   * @throws {@link RequestProblem} 422 when neither the library nor the room has it.
   */
  async cropToGrow(tx: Tx, roomId: string, cropId: string, path = 'body.cropId'): Promise<Crop> {
    const crop = await this.crop(tx, roomId, cropId);
    if (crop === null) throw invalidField(path, 'is no crop of the library or of this room');
    return crop;
  }

  /** Makes a crop the room's own under another name. */
  copy(by: RoomAuthor, { copyOf, name }: { copyOf: string; name: string }): Promise<CropView> {
    const { changes, crops } = this.parts;
    return changes.make(by, async (tx) => {
      const original = await this.cropToGrow(tx, by.roomId, copyOf, 'body.copyOf');
      await this.requireFreeName(tx, by.roomId, name, null);
      const { id: originalId, ...figures } = original;
      const copiedFrom = cropById(originalId)?.id ?? (await this.own(tx, by.roomId, originalId)).copiedFrom;
      const copy = { copiedFrom, figures: cropFigures.parse({ ...figures, name }) };
      const id = await crops.add(tx, by.roomId, copy);
      return {
        result: viewOfOwn({ ...copy, id }),
        action: 'crop.copy',
        subjectId: id,
        detail: { copyOf, name },
      };
    });
  }

  /** Changes the figures of a crop of the room; 409 for one of the library. */
  change(by: RoomAuthor, cropId: string, figures: CropFigures): Promise<CropView> {
    const { changes, crops } = this.parts;
    return changes.make(by, async (tx) => {
      const own = await this.ownToChange(tx, by.roomId, cropId);
      await this.requireFreeName(tx, by.roomId, figures.name, own.id);
      await crops.change(tx, own.id, figures);
      const result = viewOfOwn({ ...own, figures });
      return { result, action: 'crop.change', subjectId: own.id, detail: { figures } };
    });
  }

  /** Takes a crop of the room off its list; 409 for one of the library. */
  retire(by: RoomAuthor, cropId: string): Promise<void> {
    const { changes, crops, now } = this.parts;
    return changes.make(by, async (tx) => {
      const { id, figures } = await this.ownToChange(tx, by.roomId, cropId);
      await crops.retire(tx, id, now());
      return { result: undefined, action: 'crop.retire', subjectId: id, detail: { name: figures.name } };
    });
  }

  private async own(tx: Tx, roomId: string, cropId: string): Promise<StoredCrop> {
    const own = await this.parts.crops.byId(tx, roomId, cropId);
    if (own === null) throw notFound('crop');
    return own;
  }

  private async ownToChange(tx: Tx, roomId: string, cropId: string): Promise<StoredCrop> {
    if (cropById(cropId) !== null) {
      throw conflict('LIBRARY_CROP', 'A crop of the library stays as it is. Copy it, and change the copy.');
    }
    return this.own(tx, roomId, cropId);
  }

  private async requireFreeName(tx: Tx, roomId: string, name: string, except: string | null): Promise<void> {
    const own = await this.parts.crops.ofRoom(tx, roomId);
    const isTaken = own.some(
      ({ id, figures }) => id !== except && figures.name.toLowerCase() === name.toLowerCase(),
    );
    if (isTaken || cropByName(name) !== null) throw invalidField('body.name', 'is the name of another crop');
  }
}

function domainCrop({ id, figures }: StoredCrop): Crop {
  return { ...cropFigures.parse(figures), id };
}

function viewOfOwn(own: StoredCrop): CropView {
  return cropSchema.parse({ ...domainCrop(own), isOwn: true, copiedFrom: own.copiedFrom });
}

function viewOfLibrary(crop: Crop): CropView {
  return cropSchema.parse({ ...crop, isOwn: false, copiedFrom: null });
}

function namesOf(varieties: readonly { cropId: string; name: string }[], cropId: string): string[] {
  return varieties.filter((variety) => variety.cropId === cropId).map(({ name }) => name);
}

function summaryOf(view: CropView, varieties: string[]): CropSummary {
  const { id, name, botanicalName, group, habit, eaten, isOwn, copiedFrom, seed, sowing } = view;
  const hasSowingTimes =
    sowing.sowBeforeFrostWeeks.length > 0 ||
    (sowing.plantingOutWeeks !== null && sowing.weeksToTransplant.length > 0);
  return {
    id,
    name,
    botanicalName,
    group,
    habit,
    eaten,
    isOwn,
    copiedFrom,
    hasSeed: seed !== null,
    hasSowingTimes,
    varieties,
  };
}
