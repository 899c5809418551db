declare module "psychrolib" {
  const psychrolib: {
    SI: number;
    SetUnitSystem(system: number): void;
    GetHumRatioFromRelHum(celsius: number, humidity: number, pa: number): number;
    GetMoistAirDensity(celsius: number, ratio: number, pa: number): number;
    GetStandardAtmPressure(metres: number): number;
  };
  export default psychrolib;
}
