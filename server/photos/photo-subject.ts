/** What a photo shows. */
export type PhotoSubject = { readonly plantingId: string } | { readonly lotId: string };
