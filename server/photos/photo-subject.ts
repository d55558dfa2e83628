/** What a photo shows; one taken at a task of a planting shows both. */
export type PhotoSubject =
  | { readonly plantingId: string }
  | { readonly lotId: string }
  | { readonly taskId: string; readonly plantingId: string | null };
