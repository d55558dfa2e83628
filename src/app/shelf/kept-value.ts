import { linkedSignal, type Resource, type Signal } from '@angular/core';

/**
 * What a resource fetched, kept while it is fetched anew for the same thing, so that a page doesn't go blank.
 *
 * @param resource - Where it comes from.
 * @param subject - What it is about; for another subject nothing is kept.
 * @returns Null until the first value arrives.
 */
export function keptValue<T>(resource: Resource<T | undefined>, subject: () => unknown): Signal<T | null> {
  return linkedSignal<{ value: T | undefined; subject: unknown }, T | null>({
    source: () => ({ value: resource.hasValue() ? resource.value() : undefined, subject: subject() }),
    computation: ({ value, subject: now }, previous) => {
      if (value !== undefined) return value;
      return previous !== undefined && previous.source.subject === now ? previous.value : null;
    },
  });
}
