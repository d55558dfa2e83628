/** Daily light integrals by arithmetic, 0.0036 × PPFD × hours: [PPFD µmol m⁻² s⁻¹, hours, mol m⁻² d⁻¹]. */
export const constantLight = [
  [100, 12, 4.32],
  [100, 16, 5.76],
  [150, 14, 7.56],
  [200, 16, 11.52],
  [250, 16, 14.4],
  [300, 18, 19.44],
  [500, 12, 21.6],
] as const;

/**
 * Thimijan & Heins (1983) as reproduced by a maker of quantum sensors (lux per µmol and its rounded inverse) and, in
 * foot-candles, by a bionet posting: [kind, µmol per lux, foot-candles per µmol or null].
 */
export const publishedFactors = [
  ['sunlight', 0.0185, 5.01],
  ['fluorescent', 0.0135, 6.87],
  ['highPressureSodium', 0.0122, 7.62],
  ['highPressureSodiumDoubleEnded', 0.013, null],
  ['metalHalide', 0.0141, 6.6],
  ['ceramicMetalHalide4200K', 0.0154, null],
  ['ceramicMetalHalide3100K', 0.017, null],
] as const;
