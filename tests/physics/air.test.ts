import { describe, expect, test } from 'vitest';
import * as air from '@/lib/physics/air';
import * as checks from '../checks/air';

const within = (value: number | null, expected: number, share: number): void => {
  expect(Math.abs((value ?? Number.NaN) - expected)).toBeLessThanOrEqual(Math.abs(expected) * share);
};
const near = (value: number | null, expected: number, by: number): void => {
  expect(Math.abs((value ?? Number.NaN) - expected)).toBeLessThanOrEqual(by);
};

describe('saturated vapour', () => {
  test.each(checks.saturationPressures)('at %d °C has %d Pa by the formulas', (tempC, pa) => {
    within(air.saturationPressure(tempC), pa, 2e-5);
  });
  test.each(checks.saturationTable)('at %d °C has %d Pa by the printed table', (tempC, pa) => {
    within(air.saturationPressure(tempC), pa, 3e-4);
  });
  test.each(checks.saturationHumidity)('at %d °C weighs %d kg/kg', (tempC, kgPerKg) => {
    within(air.humidityRatio(tempC, 1, air.seaLevelPa), kgPerKg, 2e-4);
  });
});

describe('the standard atmosphere', () => {
  test.each([...checks.atmosphereTable, ...checks.atmosphere])('at %d m has %d Pa', (altitudeM, pa) => {
    near(air.pressureAtAltitude(altitudeM), pa, 1);
  });
});

describe('moist air', () => {
  test.each(checks.states)('at $tempC °C and $rh is as the handbook has it', (state) => {
    const w = air.humidityRatio(state.tempC, state.rh, air.seaLevelPa);
    near(w, state.w, 1e-5);
    near(air.dewPoint(state.tempC, state.rh), state.dewC, 0.01);
    near(air.wetBulb(state.tempC, state.rh, air.seaLevelPa), state.wetC, 0.01);
    near(air.enthalpy(state.tempC, w) / 1000, state.kJ, 0.02);
    near(air.moistAirDensity(state.tempC, w, air.seaLevelPa), state.rho, 2e-4);
    near(air.vapourPressureDeficit(state.tempC, state.rh), state.vpdPa, 0.5);
    near(air.relativeHumidity(state.tempC, w, air.seaLevelPa), state.rh, 1e-9);
  });

  test('of dry bulb 40 °C and wet bulb 20 °C is that of the handbook, example 1', () => {
    const { tempC, wetC, w, dewC, rh, kJ } = checks.exampleOne;
    const found = air.humidityRatioFromWetBulb(tempC, wetC, air.seaLevelPa);
    const share = air.relativeHumidity(tempC, found, air.seaLevelPa);
    near(found, w, 1e-4);
    near(share, rh, 0.01);
    near(air.dewPoint(tempC, share), dewC, 0.5);
    near(air.enthalpy(tempC, found) / 1000, kJ, 0.1);
  });

  test.each(checks.wetBulbs)('of %d °C with wet bulb %d °C at %d Pa holds %d kg/kg', (tempC, wetC, pa, w) => {
    within(air.humidityRatioFromWetBulb(tempC, wetC, pa), w, 3e-4);
  });

  test.each(checks.highDensities)('at 2400 m, %d °C and %d weighs %d kg/m³', (tempC, rh, kgPerM3) => {
    const pa = air.pressureAtAltitude(2400);
    near(air.moistAirDensity(tempC, air.humidityRatio(tempC, rh, pa), pa), kgPerM3, 0.001);
  });

  // Public test suite of ASHRAE eq. 26 and 30: 30 °C, 0.02 kg/kg, 95 461 Pa.
  test('at 30 °C with 0.02 kg/kg has the density and enthalpy of the public suite', () => {
    within(air.moistAirDensity(30, 0.02, 95461), 1.08411986348219, 3e-4);
    within(air.enthalpy(30, 0.02), 81316, 3e-4);
  });

  // pws(leaf) − RH·pws(air), recomputed: leaf 22 °C, air 25 °C at 60 %.
  test('draws 743 Pa from a leaf 3 K cooler than itself', () => {
    near(air.leafVapourPressureDeficit(22, 25, 0.6), 743.2, 1);
  });

  test('warmed from 5 to 12 °C without more water goes from saturated to 62 %', () => {
    const w = air.humidityRatio(5, 1, air.seaLevelPa);
    near(air.relativeHumidity(12, w, air.seaLevelPa), 0.6221, 0.001);
  });
});

describe('altitude', () => {
  test('takes a quarter of the heat that a fan carries', () => {
    const cfm90 = 0.042475;
    near(air.heatCapacityFlow(cfm90, 20, air.seaLevelPa), checks.carriedSeaLevelWPerK, 0.1);
    near(air.heatCapacityFlow(cfm90, 20, air.pressureAtAltitude(2400)), checks.carried2400mWPerK, 0.1);
  });
});

describe('mistakes that must not give a figure', () => {
  test('a percentage where a ratio is due is refused', () => {
    expect(() => air.dewPoint(25, 50)).toThrow(RangeError);
    expect(() => air.vapourPressureDeficit(25, 50)).toThrow(RangeError);
  });
  test('air without vapour has no dew point', () => {
    expect(air.dewPoint(20, 0)).toBeNull();
  });
  test('a wet sensor at 103 % counts as saturated', () => {
    expect(air.dewPoint(7, 1.03)).toBe(air.dewPoint(7, 1));
  });
});
