/**
 * FAO-56 worked examples (Allen et al. 1998, Irrigation and Drainage Paper 56), as quoted page by page in the tests of the
 * open PyETo library: saturation vapour pressure [°C, kPa, decimals printed].
 */
export const fao56SaturationExamples = [
  ['Example 3, p. 69, maximum', 24.5, 3.075, 3],
  ['Example 3, p. 69, minimum', 15, 1.705, 3],
  ['Example 4, p. 70, wet bulb', 19.5, 2.267, 3],
  ['Example 5, p. 72, minimum', 18, 2.064, 3],
  ['Example 5, p. 72, maximum', 25, 3.168, 3],
  ['Example 20, p. 121, dew point', 14.8, 1.68, 2],
] as const;

/** FAO-56 Annex 2 Table 2.3, 1 to 40 °C [kPa]. Recomputed from eq. 11 to three decimals; the print was not at hand. */
export const fao56Table23KPa = [
  0.657, 0.706, 0.758, 0.813, 0.872, 0.935, 1.002, 1.073, 1.148, 1.228, 1.313, 1.403, 1.498, 1.599, 1.705,
  1.818, 1.938, 2.064, 2.197, 2.338, 2.487, 2.644, 2.809, 2.984, 3.168, 3.361, 3.565, 3.78, 4.006, 4.243,
  4.493, 4.755, 5.03, 5.319, 5.623, 5.941, 6.275, 6.625, 6.991, 7.376,
] as const;

/** ASHRAE Fundamentals 2017 ch. 1 Table 3, as quoted in the tests of psychrolib [°C, kPa]. */
export const ashraeSaturation = [
  [5, 0.8726],
  [25, 3.1697],
  [50, 12.3513],
] as const;

/**
 * Spread of published saturation formulas [°C, lowest kPa, highest kPa], each evaluated at that temperature: WMO (Magnus),
 * Bolton 1980, Buck 1981 and 1996, Alduchov & Eskridge 1996, the IAPWS-95 auxiliary equation, and ASHRAE 2017.
 */
export const saturationFormulaSpread = [
  [0, 0.61094, 0.61121],
  [5, 0.87156, 0.87253],
  [10, 1.22602, 1.22811],
  [15, 1.70167, 1.70568],
  [20, 2.3326, 2.33919],
  [25, 3.16006, 3.16982],
  [30, 4.23372, 4.24692],
  [35, 5.61284, 5.63116],
  [40, 7.36746, 7.3949],
  [50, 12.34516, 12.40241],
] as const;

/**
 * State points: [°C, % RH, VPD kPa and dew point °C by eq. 11, VPD kPa and dew point °C by ASHRAE, g m⁻³ by ASHRAE]. The
 * ASHRAE columns were computed with psychrolib 1.1.1, the others from FAO-56 eq. 11 outside this code.
 */
export const statePoints = [
  [5, 90, 0.08723, 3.5, 0.08725, 3.498, 6.117],
  [10, 50, 0.61398, 0.071, 0.614, 0.063, 4.699],
  [15, 60, 0.68214, 7.307, 0.68218, 7.307, 7.695],
  [18, 70, 0.6192, 12.451, 0.61929, 12.453, 10.754],
  [20, 50, 1.16914, 9.27, 1.1694, 9.272, 8.644],
  [20, 60, 0.93531, 12.004, 0.93552, 12.007, 10.372],
] as const;

/** Dew points printed to whole degrees in the tests of MetPy, after Bolton 1980 [°C, % RH, °C]. */
export const metpyDewPoints = [
  [30, 30, 11],
  [25, 45, 12],
  [10, 55, 1],
  [20, 80, 16],
  [25, 85, 22],
] as const;

/** Dew points that decide on condensation at common room states, from FAO-56 eq. 11 by hand [°C, % RH, °C]. */
export const roomDewPoints = [
  [22, 65, 15.1],
  [20, 60, 12.0],
  [24, 70, 18.2],
  [18, 85, 15.4],
  [21, 50, 10.2],
] as const;

/** Leaf-to-air deficits of 25 °C and 60 % [leaf offset °C, kPa by FAO-56 eq. 11, kPa by ASHRAE], by hand. */
export const leafDeficits = [
  [0, 1.26711, 1.26769],
  [-2, 0.90877, 0.90891],
  [-3, 0.74326, 0.74322],
] as const;

/** Propagated uncertainties, by hand [°C, % RH, u(T) °C, u(RH) %, u(VPD) kPa]. */
export const deficitUncertainties = [
  [25, 60, 0.3, 3, 0.0977],
  [20, 50, 0.5, 5, 0.1224],
  [22, 70, 0.2, 2, 0.0538],
  [18, 85, 0.3, 3, 0.0622],
] as const;
