/** One size of a series; every length in mm, bore = outside diameter less two walls. */
export type PipeSize = { nominal: string; outsideMm: number; wallMm: number; boreMm: number };

/** A standard's sizes in rising order of bore, with the absolute roughness to assume for new pipe and where each comes from. */
export type PipeSeries = { name: string; source: string; roughnessMm: number; roughnessSource: string; sizes: readonly PipeSize[] };

export type PipeSeriesId =
  | 'steel-asme-sch40'
  | 'steel-asme-sch80'
  | 'steel-en10255-medium'
  | 'steel-en10255-heavy'
  | 'copper-en1057'
  | 'copper-b88-k'
  | 'copper-b88-l'
  | 'copper-b88-m'
  | 'pex-sdr9';

const INCH_MM = 25.4;

/** Commercial steel, Moody's chart; some tables round it to 0.046. */
const STEEL = { roughnessMm: 0.045, roughnessSource: 'commercial steel, customary value of the Moody chart' };
const DRAWN = { roughnessMm: 0.0015, roughnessSource: 'drawn copper, brass and plastic, Technical Paper 410 (TP-410)' };

const ASME = 'ASME B36.10M';
const EN_10255 = 'EN 10255 outside diameters with the walls of BS 1387';
const EN_1057 = 'EN 1057, commonly stocked walls (the former table X)';
const B88 = 'ASTM B88 outside diameters and walls';
const F876 = 'ASTM F876, copper tube sizes, wall = outside diameter / 9';

/** Rounds away the binary dust of OD - 2t; no table states more than a thousandth of a millimetre. */
function size(nominal: string, outsideMm: number, wallMm: number): PipeSize {
  return { nominal, outsideMm, wallMm, boreMm: Math.round((outsideMm - 2 * wallMm) * 1000) / 1000 };
}

/** Outside diameter and wall of one size, mm. */
type Row = readonly [dn: string, outsideMm: number, wallMm: number];

const SCH40: Row[] = [
  ['15', 21.3, 2.77],
  ['20', 26.7, 2.87],
  ['25', 33.4, 3.38],
  ['32', 42.2, 3.56],
  ['40', 48.3, 3.68],
  ['50', 60.3, 3.91],
  ['65', 73.0, 5.16],
  ['80', 88.9, 5.49],
  ['100', 114.3, 6.02],
  ['125', 141.3, 6.55],
  ['150', 168.3, 7.11],
  ['200', 219.1, 8.18],
  ['250', 273.0, 9.27],
  ['300', 323.8, 10.31],
  ['350', 355.6, 11.13],
  ['400', 406.4, 12.7],
];
const SCH80_WALLS = [3.73, 3.91, 4.55, 4.85, 5.08, 5.54, 7.01, 7.62, 8.56, 9.53, 10.97, 12.7, 15.09, 17.48, 19.05, 21.44];

const MEDIUM: Row[] = [
  ['8', 13.5, 2.3],
  ['10', 17.2, 2.3],
  ['15', 21.3, 2.6],
  ['20', 26.9, 2.6],
  ['25', 33.7, 3.2],
  ['32', 42.4, 3.2],
  ['40', 48.3, 3.2],
  ['50', 60.3, 3.6],
  ['65', 76.1, 3.6],
  ['80', 88.9, 4.0],
  ['100', 114.3, 4.5],
  ['125', 139.7, 5.0],
  ['150', 165.1, 5.0],
];
const HEAVY_WALLS = [2.9, 2.9, 3.2, 3.2, 4.0, 4.0, 4.0, 4.5, 4.5, 5.0, 5.4, 5.4, 5.4];

const EN_COPPER = [
  [12, 0.6],
  [15, 0.7],
  [22, 0.9],
  [28, 0.9],
  [35, 1.2],
  [42, 1.2],
  [54, 1.2],
  [66.7, 1.2],
  [76.1, 1.5],
  [108, 1.5],
  [133, 1.5],
  [159, 2.0],
  [219, 3.0],
];

/** Inch tube: its outside diameter is the nominal size plus 1/8 in. */
const INCH_SIZES: [string, number][] = [
  ['1/2', 0.5],
  ['3/4', 0.75],
  ['1', 1],
  ['1-1/4', 1.25],
  ['1-1/2', 1.5],
  ['2', 2],
  ['2-1/2', 2.5],
  ['3', 3],
  ['4', 4],
  ['5', 5],
  ['6', 6],
];
const B88_WALLS_INCH = {
  k: [0.049, 0.065, 0.065, 0.065, 0.072, 0.083, 0.095, 0.109, 0.134, 0.16, 0.192],
  l: [0.04, 0.045, 0.05, 0.055, 0.06, 0.07, 0.08, 0.09, 0.11, 0.125, 0.14],
  m: [0.028, 0.032, 0.035, 0.042, 0.049, 0.058, 0.065, 0.072, 0.095, 0.109, 0.122],
};

const steel = (rows: Row[], walls?: number[]) => rows.map(([dn, outside, wall], i) => size(`DN${dn}`, outside, walls ? walls[i] : wall));

function copperB88(type: keyof typeof B88_WALLS_INCH): PipeSeries {
  const sizes = INCH_SIZES.map(([nominal, inch], i) => size(`${nominal} in`, (inch + 0.125) * INCH_MM, B88_WALLS_INCH[type][i] * INCH_MM));
  return { name: `Copper, ASTM B88 type ${type.toUpperCase()}`, source: B88, ...DRAWN, sizes };
}

function pexSdr9(): PipeSize[] {
  return INCH_SIZES.slice(0, 6).map(([nominal, inch]) => size(`${nominal} in`, (inch + 0.125) * INCH_MM, ((inch + 0.125) * INCH_MM) / 9));
}

/**
 * The pipe series a network document may name. Bores are computed from outside diameter and wall, because published
 * bore charts disagree with one another. Check values: tests/lib/hydraulics/pipe-series.test.ts.
 */
export const pipeSeries: Record<PipeSeriesId, PipeSeries> = {
  'steel-asme-sch40': { name: 'Steel, ASME schedule 40', source: ASME, ...STEEL, sizes: steel(SCH40) },
  'steel-asme-sch80': { name: 'Steel, ASME schedule 80', source: ASME, ...STEEL, sizes: steel(SCH40, SCH80_WALLS) },
  'steel-en10255-medium': { name: 'Steel, EN 10255 medium', source: EN_10255, ...STEEL, sizes: steel(MEDIUM) },
  'steel-en10255-heavy': { name: 'Steel, EN 10255 heavy', source: EN_10255, ...STEEL, sizes: steel(MEDIUM, HEAVY_WALLS) },
  'copper-en1057': {
    name: 'Copper, EN 1057',
    source: EN_1057,
    ...DRAWN,
    sizes: EN_COPPER.map(([outside, wall]) => size(`${outside} mm`, outside, wall)),
  },
  'copper-b88-k': copperB88('k'),
  'copper-b88-l': copperB88('l'),
  'copper-b88-m': copperB88('m'),
  'pex-sdr9': { name: 'PEX, SDR 9', source: F876, ...DRAWN, sizes: pexSdr9() },
};
