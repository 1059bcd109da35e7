/** The part of psychrolib that is used. The package ships no types. Temperatures °C, pressures Pa, ratios. */
declare module 'psychrolib' {
  interface Psychrometrics {
    SI: number;
    SetUnitSystem(system: number): void;
    GetSatVapPres(tDryBulb: number): number;
    GetHumRatioFromRelHum(tDryBulb: number, relHum: number, pressure: number): number;
    GetHumRatioFromTWetBulb(tDryBulb: number, tWetBulb: number, pressure: number): number;
    GetRelHumFromHumRatio(tDryBulb: number, humRatio: number, pressure: number): number;
    GetTDewPointFromRelHum(tDryBulb: number, relHum: number): number;
    GetTWetBulbFromRelHum(tDryBulb: number, relHum: number, pressure: number): number;
    GetMoistAirEnthalpy(tDryBulb: number, humRatio: number): number;
    GetMoistAirDensity(tDryBulb: number, humRatio: number, pressure: number): number;
    GetDryAirDensity(tDryBulb: number, pressure: number): number;
    GetStandardAtmPressure(altitude: number): number;
  }
  const psychrolib: Psychrometrics;
  export default psychrolib;
}
