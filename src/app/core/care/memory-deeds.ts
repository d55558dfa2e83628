import type { CareDeed, DeedStore, KeptDeed } from './care-deed';

/** Deeds that last as long as the page, for a browser that keeps nothing. */
export class MemoryDeeds implements DeedStore {
  private deeds: readonly KeptDeed[] = [];
  private last = 0;

  of(personId: string): Promise<readonly KeptDeed[]> {
    return Promise.resolve(this.deeds.filter((deed) => deed.personId === personId));
  }

  add(deed: CareDeed): Promise<KeptDeed> {
    const kept = { ...deed, order: (this.last += 1) };
    this.deeds = [...this.deeds, kept];
    return Promise.resolve(kept);
  }

  change(deed: KeptDeed): Promise<void> {
    this.deeds = this.deeds.map((one) => (one.order === deed.order ? deed : one));
    return Promise.resolve();
  }

  remove(order: number): Promise<void> {
    this.deeds = this.deeds.filter((deed) => deed.order !== order);
    return Promise.resolve();
  }
}
