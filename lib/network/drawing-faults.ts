import { portsOf, type ChosenValve, type Drawing, type Equipment, type Place } from './drawing';

/** Something wrong with a drawing. An `error` keeps it from being solved; a `warning` does not. */
export interface Fault {
  code: string;
  severity: 'error' | 'warning';
  message: string;
  place: Place;
}

export const kindNames: Record<Equipment['kind'], string> = {
  pump: 'Pump',
  source: 'Source',
  terminalUnit: 'Terminal unit',
  balancingValve: 'Balancing valve',
  controlValve: 'Control valve',
  checkValve: 'Check valve',
  isolatingValve: 'Isolating valve',
  strainer: 'Strainer',
  tee: 'Tee',
  expansionVessel: 'Expansion vessel',
};

/** What a drawing lacks before it can be solved, and what a designer should look at; in the order of the drawing. */
export function faultsOf(drawing: Drawing): Fault[] {
  const faults: Fault[] = [];
  if (drawing.equipment.length === 0) return faults;
  faults.push(...repeatedTags(drawing), ...openEnds(drawing));
  for (const piece of drawing.equipment) faults.push(...missingData(piece));
  for (const pipe of drawing.pipes) {
    const lacking = [pipe.lengthM === null && 'length', pipe.boreMm === null && 'size', pipe.roughnessMm === null && 'roughness'].filter(
      (what): what is string => Boolean(what),
    );
    if (lacking.length) {
      faults.push({
        code: 'pipe-data',
        severity: 'error',
        message: `A pipe has no ${lacking.join(' and no ')}.`,
        place: { kind: 'pipe', id: pipe.id },
      });
    }
  }
  if (!drawing.equipment.some((piece) => piece.kind === 'pump')) {
    const place: Place = { kind: 'equipment', id: drawing.equipment[0]!.id };
    faults.push({ code: 'no-pump', severity: 'warning', message: 'The loop has no pump: nothing will flow.', place });
  }
  return faults;
}

const nameOf = (piece: Equipment) => piece.tag || kindNames[piece.kind].toLowerCase();
const at = (piece: Equipment): Place => ({ kind: 'equipment', id: piece.id });

function repeatedTags(drawing: Drawing): Fault[] {
  const seen = new Set<string>();
  return drawing.equipment.flatMap((piece) => {
    if (!piece.tag || !seen.has(piece.tag)) {
      seen.add(piece.tag);
      return [];
    }
    return [
      {
        code: 'tag-repeated',
        severity: 'error' as const,
        message: `The tag ${piece.tag} stands on more than one piece.`,
        place: at(piece),
      },
    ];
  });
}

/** Ends with no pipe, and pipes whose piece is gone. A tee may leave sides free but joins at least two pipes. */
function openEnds(drawing: Drawing): Fault[] {
  const byId = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const joined = new Map<string, number>();
  const faults: Fault[] = [];
  for (const pipe of drawing.pipes) {
    for (const end of [pipe.from, pipe.to]) {
      const piece = byId.get(end.equipmentId);
      if (!piece || !portsOf(piece.kind).includes(end.port)) {
        faults.push({ code: 'pipe-end', severity: 'error', message: 'A pipe ends in nothing.', place: { kind: 'pipe', id: pipe.id } });
        continue;
      }
      const key = piece.kind === 'tee' ? piece.id : `${piece.id}.${end.port}`;
      joined.set(key, (joined.get(key) ?? 0) + 1);
    }
    if (pipe.from.equipmentId === pipe.to.equipmentId && byId.get(pipe.from.equipmentId)?.kind === 'tee') {
      faults.push({
        code: 'pipe-to-itself',
        severity: 'error',
        message: 'A pipe joins a tee to itself.',
        place: { kind: 'pipe', id: pipe.id },
      });
    }
  }
  for (const piece of drawing.equipment) {
    if (piece.kind === 'tee') {
      if ((joined.get(piece.id) ?? 0) < 2) {
        faults.push({
          code: 'dead-leg',
          severity: 'warning',
          message: `${nameOf(piece)} joins fewer than two pipes: a dead leg.`,
          place: at(piece),
        });
      }
      continue;
    }
    for (const port of portsOf(piece.kind)) {
      if (joined.has(`${piece.id}.${port}`)) continue;
      const which = piece.kind === 'expansionVessel' ? 'is not connected' : `has no pipe at its ${port === 'in' ? 'inlet' : 'outlet'}`;
      faults.push({ code: 'open-end', severity: 'error', message: `${nameOf(piece)} ${which}.`, place: at(piece) });
    }
  }
  return faults;
}

/** Figures that the law of a piece needs and that are not there yet. */
function missingData(piece: Equipment): Fault[] {
  const lacks = (what: string): Fault => ({
    code: 'missing-data',
    severity: 'error',
    message: `${nameOf(piece)} has no ${what}.`,
    place: at(piece),
  });
  const fault = (code: string, message: string, severity: Fault['severity'] = 'error'): Fault => ({
    code,
    severity,
    message,
    place: at(piece),
  });
  switch (piece.kind) {
    case 'pump':
      return piece.curve.length < 3
        ? [fault('pump-curve', `${nameOf(piece)} needs at least three points on its curve.`)]
        : pumpCurveFaults(piece.curve, fault, nameOf(piece));
    case 'source':
      return [piece.designFlowLs === null && lacks('design flow'), piece.designDropKpa === null && lacks('drop at design flow')].filter(
        (f) => f !== false,
      );
    case 'terminalUnit':
      return [
        piece.designFlowLs === null && lacks('design flow'),
        piece.coilDropKpa === null && lacks('coil drop'),
        piece.controlValve && piece.controlValve.kvs === null && lacks('Kvs of its control valve'),
        piece.balancingValve && valveFault(piece.balancingValve, nameOf(piece), fault),
        !piece.balancingValve &&
          fault('no-balancing-valve', `${nameOf(piece)} has no balancing valve: its flow can be neither set nor measured.`, 'warning'),
      ].filter((f) => Boolean(f)) as Fault[];
    case 'balancingValve':
      return [valveFault(piece.valve, nameOf(piece), fault)].filter((f) => f !== null);
    case 'controlValve':
      return piece.kvs === null ? [lacks('Kvs')] : [];
    case 'checkValve':
    case 'isolatingValve':
    case 'strainer':
      return piece.kv === null ? [lacks('Kv')] : [];
    case 'tee':
    case 'expansionVessel':
      return [];
  }
}

type MakeFault = (code: string, message: string, severity?: Fault['severity']) => Fault;

function pumpCurveFaults(curve: { flowLs: number; headM: number }[], fault: MakeFault, name: string): Fault[] {
  const unsorted = curve.some((point, i) => i > 0 && point.flowLs <= curve[i - 1]!.flowLs);
  const rising = curve.some((point, i) => i > 0 && point.headM > curve[i - 1]!.headM);
  return [
    ...(unsorted ? [fault('pump-curve', `The curve of ${name} must go from low to high flow, each flow once.`)] : []),
    ...(rising ? [fault('pump-curve', `The head of ${name} must not rise with flow.`)] : []),
  ];
}

function valveFault(valve: ChosenValve, name: string, fault: MakeFault): Fault | null {
  if (valve.kvTable.length < 2) return fault('valve-table', `${name} has no table of settings and Kv: choose a valve.`);
  const first = valve.kvTable[0]!.setting;
  const last = valve.kvTable.at(-1)!.setting;
  if (valve.settingTurns !== null && (valve.settingTurns < first || valve.settingTurns > last)) {
    return fault('valve-setting', `${name} stands at ${valve.settingTurns}, outside its table (${first} to ${last}).`);
  }
  return null;
}
