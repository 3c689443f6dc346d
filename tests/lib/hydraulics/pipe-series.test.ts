import { describe, expect, it } from 'vitest';
import { pipeSeries, type PipeSeriesId } from '@/lib/hydraulics/pipe-series';

const bores = (id: PipeSeriesId) => pipeSeries[id].sizes.map((size) => size.boreMm);
const ids = Object.keys(pipeSeries) as PipeSeriesId[];

// Bores of ASME B36.10M as tabulated in the open fluids library 1.0.22 (DN15 to DN400).
const SCH40 = [15.76, 20.96, 26.64, 35.08, 40.94, 52.48, 62.68, 77.92, 102.26, 128.2, 154.08, 202.74, 254.46, 303.18, 333.34, 381.0];
const SCH80 = [13.84, 18.88, 24.3, 32.5, 38.14, 49.22, 58.98, 73.66, 97.18, 122.24, 146.36, 193.7, 242.82, 288.84, 317.5, 363.52];
// EN 10255 (BS 1387 walls), DN8 to DN150.
const MEDIUM = [8.9, 12.6, 16.1, 21.7, 27.3, 36.0, 41.9, 53.1, 68.9, 80.9, 105.3, 129.7, 155.1];
const HEAVY = [7.7, 11.4, 14.9, 20.5, 25.7, 34.4, 40.3, 51.3, 67.1, 78.9, 103.5, 128.9, 154.3];
// EN 1057 table X.
const EN_1057 = [10.8, 13.6, 20.2, 26.2, 32.6, 39.6, 51.6, 64.3, 73.1, 105.0, 130.0, 155.0, 213.0];
// ASTM B88 charts, 1/2 to 6 in; PEX SDR 9 (ASTM F876).
const B88_K = [13.39, 18.92, 25.27, 31.62, 37.62, 49.76, 61.85, 73.84, 97.97, 122.05, 145.82];
const B88_L = [13.84, 19.94, 26.03, 32.13, 38.23, 50.42, 62.61, 74.8, 99.19, 123.82, 148.46];
const B88_M = [14.45, 20.6, 26.8, 32.79, 38.79, 51.03, 63.37, 75.72, 99.95, 124.64, 149.38];
const PEX = [12.35, 17.29, 22.23, 27.16, 32.1, 41.98];

describe('pipe series', () => {
  it.each([
    ['steel-asme-sch40', SCH40],
    ['steel-asme-sch80', SCH80],
    ['steel-en10255-medium', MEDIUM],
    ['steel-en10255-heavy', HEAVY],
    ['copper-en1057', EN_1057],
  ] as const)('%s has exactly the bores of its standard', (id, expected) => {
    expect(bores(id)).toEqual(expected);
  });

  it.each([
    ['copper-b88-k', B88_K],
    ['copper-b88-l', B88_L],
    ['copper-b88-m', B88_M],
    ['pex-sdr9', PEX],
  ] as const)('%s has the charted bores to a hundredth of a millimetre', (id, expected) => {
    expect(bores(id)).toHaveLength(expected.length);
    bores(id).forEach((bore, i) => expect(Math.abs(bore - expected[i])).toBeLessThan(0.0101));
  });

  it.each(ids)('%s rises in bore, has walls, and a source for its roughness', (id) => {
    const { sizes, roughnessMm, ...words } = pipeSeries[id];
    sizes.forEach((size, i) => {
      expect(size.boreMm).toBeCloseTo(size.outsideMm - 2 * size.wallMm, 3);
      if (i > 0) expect(size.boreMm).toBeGreaterThan(sizes[i - 1].boreMm);
    });
    expect(new Set(sizes.map((size) => size.nominal)).size).toBe(sizes.length);
    expect(roughnessMm).toBe(id.startsWith('steel') ? 0.045 : 0.0015);
    for (const text of Object.values(words)) expect(text).toMatch(/\w{3}/);
  });

  it('names sizes as the trade does', () => {
    expect(pipeSeries['steel-en10255-medium'].sizes[7]).toEqual({ nominal: 'DN50', outsideMm: 60.3, wallMm: 3.6, boreMm: 53.1 });
    expect(pipeSeries['copper-en1057'].sizes[2].nominal).toBe('22 mm');
    expect(pipeSeries['copper-b88-l'].sizes[3].nominal).toBe('1-1/4 in');
    expect(pipeSeries['copper-b88-m'].name).toContain('type M');
    expect(pipeSeries['pex-sdr9'].sizes.at(-1)).toMatchObject({ nominal: '2 in' });
  });
});
