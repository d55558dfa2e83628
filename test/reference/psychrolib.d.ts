/** The part of psychrolib (MIT, after ASHRAE Fundamentals 2017 ch. 1) that serves as a reference. SI: °C, Pa, 0 to 1. */
declare module 'psychrolib' {
  export const SI: number;
  export function SetUnitSystem(unitSystem: number): void;
  export function GetSatVapPres(dryBulbC: number): number;
  export function GetVaporPressureDeficit(
    dryBulbC: number,
    humidityRatio: number,
    pressurePa: number,
  ): number;
  export function GetVapPresFromRelHum(dryBulbC: number, relativeHumidity: number): number;
  export function GetTDewPointFromRelHum(dryBulbC: number, relativeHumidity: number): number;
  export function GetRelHumFromTDewPoint(dryBulbC: number, dewPointC: number): number;
}
