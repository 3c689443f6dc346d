import type { ReportContent, ReportReading, ReportStation } from '@/lib/api/reports';
import { defaultTolerances } from '@/lib/api/tolerances';

const designFlowLs = 0.2;

/** An entry at a terminal of 0.2 L/s; `flowLs` decides how it stands. */
export function entry(id: string, stationId: string, flowLs: number, given: Partial<ReportReading> = {}): ReportReading {
  const percentOfDesign = (100 * flowLs) / designFlowLs;
  return {
    id,
    stationId,
    tag: stationId,
    roundId: 'round-1',
    roundNumber: 1,
    revisionNumber: 2,
    method: 'valve-drop',
    settingTurns: 2.5,
    dropKpa: 7.4,
    heatKw: null,
    supplyC: null,
    returnC: null,
    pumpSpeed: null,
    kv: 1.2,
    flowLs,
    percentOfDesign,
    uncertaintyPercent: 4.1,
    verdict: percentOfDesign < 90 ? 'low' : percentOfDesign > 110 ? 'high' : 'within',
    entered: [{ quantity: 'drop', text: '74', unit: 'mbar' }],
    instrumentId: 'meter-1',
    instrumentName: 'Differential pressure meter',
    isInstrumentOverdue: false,
    isInstrumentOutOfRange: false,
    takenBy: 'Tobin Ashgrove',
    takenAt: '2026-03-02T09:30:00.000Z',
    recordedAt: '2026-03-02T09:31:00.000Z',
    note: '',
    correctsReadingId: null,
    isCorrected: false,
    ...given,
  };
}

export const station = (tag: string, given: Partial<ReportStation> = {}): ReportStation => ({
  id: tag,
  elementId: tag,
  kind: 'terminal',
  tag,
  storey: 'Level 1',
  room: '1.04',
  walkingOrder: 1,
  designFlowLs,
  valveName: 'Test valve',
  kvTable: [
    { setting: 1, kv: 0.5 },
    { setting: 4, kv: 2.5 },
  ],
  settingTurns: 2.5,
  expectedDropKpa: 7.9,
  rank: 'all',
  coilDropKpa: null,
  pumpCurve: null,
  pumpSpeed: null,
  reading: null,
  ...given,
});

/** A report with these stations and entries, one pump P-1 and the balance that set each terminal's valve. */
export function reportContent(stations: ReportStation[], readings: ReportReading[]): ReportContent {
  const fluid = { densityKgM3: 999.8, viscosityMPaS: 1.35, specificHeatKJKgK: 4.19 };
  return {
    organization: 'Quillfeather Estates',
    project: { name: 'Tamarind Quay Library', client: 'Quillfeather Estates', building: 'Library' },
    loop: { name: 'CHW-1', service: 'chilled' },
    revision: {
      number: 2,
      note: 'Second issue',
      issuedBy: 'Mara Ellin',
      issuedAt: '2026-02-20T08:00:00.000Z',
      changes: ['FC-2 changed: design flow'],
    },
    fluid: {
      medium: 'water',
      massFraction: 0,
      supplyC: 6,
      returnC: 12,
      densityKgM3: fluid.densityKgM3,
      viscosityMPaS: fluid.viscosityMPaS,
    },
    tolerances: defaultTolerances,
    stations: [
      station('P-1', {
        kind: 'pump',
        designFlowLs: 0.6,
        valveName: '',
        kvTable: null,
        settingTurns: null,
        expectedDropKpa: null,
        room: '',
      }),
      ...stations,
    ],
    rounds: [
      {
        id: 'round-1',
        number: 1,
        purpose: 'As found',
        openChecksReason: '',
        revisionNumber: 2,
        startedBy: 'Tobin Ashgrove',
        startedAt: '2026-03-02T09:00:00.000Z',
      },
    ],
    instruments: [
      {
        id: 'meter-1',
        name: 'Differential pressure meter',
        kind: 'differential-pressure',
        serial: 'DP-02',
        rangeLow: 0,
        rangeHigh: 200,
        accuracyPercent: 1,
        accuracyAbsolute: 0.1,
        calibratedOn: '2025-03-14',
        calibrationDueOn: '2026-03-14',
      },
    ],
    readings,
    balance: {
      converged: true,
      indexTerminal: null,
      pumps: [{ id: 'P-1', flowLs: 0.6, requiredHeadM: 7.25, speed: 0.87, shaftKw: null }],
      valves: stations.map(({ elementId }) => ({
        id: `${elementId}:balancing`,
        flowLs: designFlowLs,
        dropKpa: 7.9,
        kv: 1.3,
        setting: 2.5,
        state: 'throttled',
        wantedKv: 1.31,
      })),
      terminals: stations.map(({ elementId }) => ({
        id: `${elementId}:coil`,
        designFlowLs,
        flowLs: designFlowLs,
        percentOfDesign: 100,
        circuitDropKpa: 40,
        authority: 0.4,
      })),
      solution: {
        converged: true,
        method: 'simultaneous',
        iterations: 7,
        residuals: { continuityLs: 1e-12, loopPa: 1e-6 },
        fluid,
        links: [],
        nodes: [],
        pumps: [],
        warnings: [],
      },
      warnings: [],
    },
  };
}
