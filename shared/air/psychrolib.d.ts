/** The few functions of psychrolib (MIT, no types of its own) that this project calls. SI: degrees Celsius, pascals, shares 0..1. */
declare module 'psychrolib' {
  interface Psychrolib {
    IP: number
    SI: number
    SetUnitSystem(system: number): void
    GetSatVapPres(tempC: number): number
    GetHumRatioFromRelHum(tempC: number, rh: number, pressure: number): number
    GetHumRatioFromTWetBulb(tempC: number, wetBulbC: number, pressure: number): number
    GetSatHumRatio(tempC: number, pressure: number): number
    GetRelHumFromHumRatio(tempC: number, humidityRatio: number, pressure: number): number
    GetRelHumFromTWetBulb(tempC: number, wetBulbC: number, pressure: number): number
    GetTDewPointFromRelHum(tempC: number, rh: number): number
    GetTDewPointFromTWetBulb(tempC: number, wetBulbC: number, pressure: number): number
    GetTWetBulbFromRelHum(tempC: number, rh: number, pressure: number): number
    GetStandardAtmPressure(altitude: number): number
  }
  const psychrolib: Psychrolib
  export default psychrolib
}
