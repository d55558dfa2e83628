import type { addTask, taskCompletion } from '@shared/contracts/care';
import type { TaskOutcome } from '@shared/care/task-outcome';
import type * as z from 'zod';

/** What became of a task, as it is sent. */
export type Completion = z.input<typeof taskCompletion>;
/** A task that no routine planned, as it is sent. */
export type NewTask = z.input<typeof addTask.body>;

/** What somebody did about care, still to be told to the server. */
export type CareDeedKind =
  | { readonly kind: 'close'; readonly taskId: string; readonly completion: Completion }
  | { readonly kind: 'reopen'; readonly taskId: string }
  | { readonly kind: 'photo'; readonly taskId: string; readonly file: Blob; readonly fileName: string }
  /** An unplanned task; closed at once where its completion is given. */
  | { readonly kind: 'add'; readonly task: NewTask; readonly completion: Completion | null };

/** Why the server did not take a deed. Trying again unchanged can't help. */
export interface Trouble {
  /** Somebody else had seen to it before. */
  readonly isConflict: boolean;
  /** In a sentence. */
  readonly text: string;
  /** Who was first and when, and what became of it; null where that is not told. */
  readonly byName: string | null;
  readonly at: string | null;
  readonly outcome: TaskOutcome | null;
}

/** A deed with whose it is. It belongs to the person: on a shared phone nobody else sends it. */
export type CareDeed = CareDeedKind & {
  /** Sent along as Idempotency-Key, so that the server does it once however often it is sent. */
  readonly key: string;
  readonly personId: string;
  readonly roomId: string;
  /** What it is about, in words: "Water the basil · A3". */
  readonly title: string;
  /** When it was done, ISO 8601. */
  readonly at: string;
  /** It was sent before, so the server may have it although nobody answered. */
  readonly isTried: boolean;
  /** How often the server could not finish it. */
  readonly failures: number;
  /** Null while it waits to be sent. */
  readonly trouble: Trouble | null;
};

/** A deed that is kept, with its place in the order. */
export type KeptDeed = CareDeed & { readonly order: number };

/** Where deeds are kept until the server has them. */
export interface DeedStore {
  /** A person's deeds, the oldest first. */
  of(personId: string): Promise<readonly KeptDeed[]>;
  add(deed: CareDeed): Promise<KeptDeed>;
  /** Keeps a deed as it is now, at its place; one that is gone stays gone. */
  change(deed: KeptDeed): Promise<void>;
  remove(order: number): Promise<void>;
}
