import { careDays, type CareDays } from '@shared/contracts/care';
import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { CareDeed, DeedStore, KeptDeed } from './care-deed';

interface PhoneSchema extends DBSchema {
  /** By person and room. */
  days: { key: [string, string]; value: CareDays };
  deeds: { key: number; value: CareDeed & { order?: number }; indexes: { person: string } };
}

const schemaVersion = 1;

/** What this phone keeps of care, in the browser's own database. */
export class PhoneDatabase implements DeedStore {
  private constructor(private readonly database: IDBPDatabase<PhoneSchema>) {}

  /** Opens it. Fails where the browser keeps nothing. */
  static async open(): Promise<PhoneDatabase> {
    return new PhoneDatabase(
      await openDB<PhoneSchema>('lampmeadow', schemaVersion, {
        upgrade: (database) => {
          database.createObjectStore('days');
          database
            .createObjectStore('deeds', { keyPath: 'order', autoIncrement: true })
            .createIndex('person', 'personId');
        },
        // Another tab with a newer version must not wait for this one.
        blocking: (_now, _wanted, event) => (event.target as IDBDatabase).close(),
      }),
    );
  }

  /** The days as they were last fetched; null for never, and where an older version kept them otherwise. */
  async daysOf(personId: string, roomId: string): Promise<CareDays | null> {
    return careDays.safeParse(await this.database.get('days', [personId, roomId])).data ?? null;
  }

  /** Keeps a person's days of a room. */
  async keepDays(personId: string, days: CareDays): Promise<void> {
    await this.database.put('days', days, [personId, days.roomId]);
  }

  /** Forgets all days, as when somebody signs out of a phone that others use. Deeds stay: they are not sent yet. */
  async forgetDays(): Promise<void> {
    await this.database.clear('days');
  }

  async of(personId: string): Promise<readonly KeptDeed[]> {
    return (await this.database.getAllFromIndex('deeds', 'person', personId)) as KeptDeed[];
  }

  async add(deed: CareDeed): Promise<KeptDeed> {
    return { ...deed, order: await this.database.add('deeds', deed) };
  }

  async change(deed: KeptDeed): Promise<void> {
    const change = this.database.transaction('deeds', 'readwrite');
    if ((await change.store.getKey(deed.order)) !== undefined) await change.store.put(deed);
    await change.done;
  }

  async remove(order: number): Promise<void> {
    await this.database.delete('deeds', order);
  }
}
