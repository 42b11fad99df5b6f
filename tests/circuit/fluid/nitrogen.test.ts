/** Nitrogen charges as a real gas, against figures computed from the reference equation by an independent script. */
import { massAt, realCurve, realOilAt, realPrechargeAt, realYield, temperatureAt } from '@oilway/circuit';
import { expect, test } from 'vitest';

const gauge = (bar: number) => bar * 1e5 + 101325;
const near = (value: number, expected: number, share: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(share);

// 10 L, precharge 90 bar, between 100 and 200 bar at 20 degC: 4.260 L slowly; 2.189 L quickly, the gas ends at -33 degC.
test('what a charge gives, slowly and quickly', () => {
  const slowly = realOilAt(0.01, gauge(90), gauge(200), 293.15) - realOilAt(0.01, gauge(90), gauge(100), 293.15);
  near(slowly * 1e3, 4.26, 1e-3);
  const quickly = realYield(0.01, gauge(90), gauge(200), gauge(100), 293.15);
  near(quickly.oil * 1e3, 2.189, 1e-3);
  expect(quickly.temperature - 273.15).toBeCloseTo(-33.4, 1);
});

// 90 bar at 20 degC read at 50 degC: 101.27 bar (ideal 99.3).
test('precharge over temperature', () => {
  near((realPrechargeAt(gauge(90), 293.15, 323.15) - 101325) / 1e5, 101.27, 1e-4);
});

test('a curve passes through its point; quickly it is steeper than slowly', () => {
  const point = { volume: 0.005, pressure: gauge(200), temperature: 293.15 };
  const at = (n: number, volume: number): number => {
    const { volumes, pressures } = realCurve(point, 0.01, n);
    const i = volumes.findIndex((v) => v <= volume);
    const share = Math.log(volume / (volumes[i - 1] ?? 1)) / Math.log((volumes[i] ?? 1) / (volumes[i - 1] ?? 1));
    return (pressures[i - 1] ?? 0) * ((pressures[i] ?? 0) / (pressures[i - 1] ?? 1)) ** share;
  };
  for (const n of [1, 1.2, 1.4]) near(at(n, 0.005), point.pressure, 1e-3);
  expect(at(1.4, 0.008)).toBeLessThan(at(1.2, 0.008));
  expect(at(1.2, 0.008)).toBeLessThan(at(1, 0.008));
  near(temperatureAt(massAt(point), point.volume, point.pressure), 293.15, 1e-9);
});
