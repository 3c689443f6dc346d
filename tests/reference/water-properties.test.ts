import { expect, it } from 'vitest';
import { waterProperties } from '@/lib/hydraulics/water';
import { askPython, hasPythonLibrary } from './python-libraries';

const SCRIPT = `
from iapws import IAPWS97
out = []
for t, p in rows:
    w = IAPWS97(T=t + 273.15, P=p / 1000)
    out.append([w.rho, w.mu * 1e3, w.cp, IAPWS97(T=t + 273.15, x=0).P * 1e3, w.k])
print(json.dumps(out))
`;

it('water agrees with python3-iapws at every half degree from 0.5 to 120 °C and from 200 to 1600 kPa', ({ skip }) => {
  skip(!hasPythonLibrary('iapws'), 'needs python3-iapws');
  const rows = [200, 300, 1600].flatMap((kpa) => Array.from({ length: 240 }, (_, i) => [0.5 + i / 2, kpa]));
  const theirs = askPython<number[][]>(SCRIPT, rows);
  rows.forEach(([temperatureC, kpa], i) => {
    const { densityKgM3, viscosityMPaS, specificHeatKJKgK, vapourPressureKpa, conductivityWMK } = waterProperties(temperatureC, kpa);
    [densityKgM3, viscosityMPaS, specificHeatKJKgK, vapourPressureKpa, conductivityWMK].forEach((ours, j) =>
      expect(Math.abs(ours / theirs[i][j] - 1)).toBeLessThan(1e-9),
    );
  });
});
