/** Where one series of a file goes: to a sensor of the room, or to one that is made for it. */
export type SeriesMatch =
  { readonly sensorId: string } | { readonly newSensor: { readonly shelfId: string | null } };

/** Where the series of a file go, by their keys; a series that is left out is not brought in. */
export type SeriesMatches = Readonly<Record<string, SeriesMatch>>;
