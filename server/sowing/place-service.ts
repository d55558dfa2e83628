import type { DayLengthYear, FrostDates } from '@shared/contracts/sowing';
import { dayLengthsOfYear, longestDay } from '@shared/growing/day-length';
import { frostRiskAt } from '@shared/growing/frost-date';
import { frostConventions, frostMeaning } from '@shared/growing/frost-words';
import { bulbingFromHours, onionClassesFor, type OnionClass } from '@shared/growing/onion-class';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Transactions, Tx } from '../database/transactions';
import type { RoomsService } from '../rooms/rooms-service';
import type { SowingStore, StoredFrost } from './sowing-store';

/** What a room's place means for what grows there: its frosts and the length of its days. */
export class PlaceService {
  constructor(
    private readonly transactions: Transactions,
    private readonly sowing: SowingStore,
    private readonly rooms: Pick<RoomsService, 'room'>,
    private readonly changes: RoomChanges,
  ) {}

  /** The frost dates of a room, and what they mean. */
  async frostDates(roomId: string, tx: Tx = this.transactions.plain): Promise<FrostDates> {
    return frostView(await this.sowing.frost(tx, roomId));
  }

  /** Sets the frost dates of a room. */
  setFrostDates(by: RoomAuthor, frost: StoredFrost): Promise<FrostDates> {
    return this.changes.make(by, async (tx) => {
      await this.sowing.setFrost(tx, by.roomId, frost);
      return {
        result: frostView(frost),
        action: 'frost-dates.set',
        subjectId: by.roomId,
        detail: { ...frost },
      };
    });
  }

  /** Day length through a year at the room's place; empty until it has one. */
  async dayLength(roomId: string, year: number): Promise<DayLengthYear> {
    const { latitudeDeg } = await this.rooms.room(roomId);
    const bulbing = (Object.entries(bulbingFromHours) as [OnionClass, number][]).map(
      ([onion, fromHours]) => ({
        onion,
        fromHours,
      }),
    );
    if (latitudeDeg === null) {
      return { latitudeDeg, year, days: [], longest: null, shortest: null, onionClasses: [], bulbing };
    }
    const days = dayLengthsOfYear(latitudeDeg, year);
    return {
      latitudeDeg,
      year,
      days,
      longest: longestDay(latitudeDeg, year),
      shortest: days.reduce((shortest, one) => (one.hours < shortest.hours ? one : shortest)),
      onionClasses: onionClassesFor(latitudeDeg),
      bulbing,
    };
  }
}

function frostView({ lastSpring, firstAutumn, note }: StoredFrost): FrostDates {
  const explanation = [
    lastSpring && `Last frost: ${frostMeaning(lastSpring.wording, 'spring')}`,
    firstAutumn && `First frost: ${frostMeaning(firstAutumn.wording, 'autumn')}`,
    frostConventions,
  ];
  return {
    lastSpring,
    firstAutumn,
    note,
    lastSpringRisk: lastSpring && frostRiskAt(lastSpring.wording, 'spring'),
    firstAutumnRisk: firstAutumn && frostRiskAt(firstAutumn.wording, 'autumn'),
    explanation: explanation.filter((sentence) => sentence !== null),
  };
}
