import { Injectable } from '@angular/core';
import type { CareDays } from '@shared/contracts/care';
import type { CareDeed, DeedStore, KeptDeed } from './care-deed';
import { MemoryDeeds } from './memory-deeds';
import { PhoneDatabase } from './phone-database';

/** What is kept on this phone for care without a signal; in a browser that keeps nothing, for as long as the page lasts. */
@Injectable({ providedIn: 'root' })
export class KeptOnPhone implements DeedStore {
  // Private windows and full phones refuse; care goes on, it only outlives no reload.
  private readonly database = PhoneDatabase.open().catch(() => null);
  private readonly deeds = this.database.then((database): DeedStore => database ?? new MemoryDeeds());

  /** Today's and tomorrow's care as they were last fetched; null for never. */
  async daysOf(personId: string, roomId: string): Promise<CareDays | null> {
    return (await (await this.database)?.daysOf(personId, roomId)) ?? null;
  }

  /** Keeps a person's days of a room. */
  async keepDays(personId: string, days: CareDays): Promise<void> {
    await (await this.database)?.keepDays(personId, days);
  }

  /** Forgets all days; deeds that are not sent yet stay. */
  async forgetDays(): Promise<void> {
    await (await this.database)?.forgetDays();
  }

  async of(personId: string): Promise<readonly KeptDeed[]> {
    return (await this.deeds).of(personId);
  }

  async add(deed: CareDeed): Promise<KeptDeed> {
    return (await this.deeds).add(deed);
  }

  async change(deed: KeptDeed): Promise<void> {
    return (await this.deeds).change(deed);
  }

  async remove(order: number): Promise<void> {
    return (await this.deeds).remove(order);
  }
}
