/** McMaster & Wilhelm (1997), Table 1, base 0 °C: [maximum, minimum, method 1, method 2]. */
export const mcmasterWilhelmTable1 = [
  [20, 10, 15, 15],
  [10, 1, 5.5, 5.5],
  [8, -2, 3, 4],
  [6, 0, 3, 3],
  [10, 5, 7.5, 7.5],
  [5, -5, 0, 2.5],
] as const;

/**
 * Zalom et al. (1983), University of California Leaflet 21373, Table 7, in °F with limits 55 and 90 and the horizontal
 * cutoff: [minimum, maximum, next minimum, single sine, double sine].
 */
export const zalomTable7 = [
  [96, 110, 91, 35, 35],
  [91, 105, 96, 35, 35],
  [45, 54, 38, 0, 0],
  [38, 50, 45, 0, 0],
  [60, 80, 75, 15, 18.75],
  [75, 88, 60, 26.5, 22.75],
  [50, 82, 45, 11.85, 11.31],
  [45, 70, 50, 5.31, 5.7],
] as const;

/** Maize "86/50" in °F, worked on pages of US university extension services: [maximum, minimum, degree days]. */
export const maizeExamples = [
  [87, 63, 24.5],
  [90, 65, 25.5],
  [72, 46, 11],
  [63, 42, 6.5],
  [100, 40, 18],
] as const;

/** Methods compared by arithmetic, base 10 °C: [minimum, maximum, average, averageOfFloored, singleSine]. */
export const methodsCompared = [
  [5, 15, 0, 2.5, 5 / Math.PI],
  [8, 22, 5, 6, 5.32564],
] as const;
