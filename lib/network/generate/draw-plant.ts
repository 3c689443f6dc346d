import type { Storey } from '../drawing';
import { chooseBalancingValve } from './balancing-valve-choice';
import { columnsOf, type Cell, type CellJoint } from './elk-columns';
import { genericPump } from './generic-pump';
import type { LoopChoices } from './loop-choices';
import { MAIN_RETURN, MAIN_SUPPLY } from './measures';
import { kvForMostDrop } from './preferred-kv';
import { longer, turned, type Run, type Sheet, type Spot } from './sheet';

/** Between the pieces of the plant room. */
const BETWEEN_M = 1;
/** What line pieces may cost at design flow; common practice, no source. */
const mostDropKpa = { isolatingValve: 1, strainer: 5, checkValve: 3 };
/** Gauge pressure kept at the highest point, and what the vessel holds beyond it; domain facts 5.7: static head plus 0.3 bar. */
const LEAST_TOP_KPA = 30;
const KPA_PER_M = 9.81;
/** How far the vessel hangs above the main. */
const VESSEL_ABOVE = 70;
/** Before its duty is found the pump gives whatever the loop asks for. */
const UNKNOWN_DUTY_HEAD_M = 1000;

export interface Plant {
  supply: Run;
  back: Run;
  /** Its right end. */
  width: number;
}

/** Pieces from left to right: water passes the lower line from right to left, turns up at the corner and passes the upper one. */
const upper = ['pump', 'check valve', 'delivery valve', 'source'] as const;
const lower = ['strainer', 'suction valve', 'vessel', 'main valve'] as const;
type Place = (typeof upper)[number] | (typeof lower)[number];
const widthOf = (place: Place) => (place === 'source' || place === 'main valve' ? 80 : 60);

/**
 * The plant room: the return main comes in from the right through the main valve, past the vessel's connection, through an isolating valve and the strainer to the
 * pump, and leaves through check valve, isolating valve and source. `flowLs` is all that the loop carries, `heightM` that of its highest storey above the plant
 * room. The vessel holds the pressure where the pump draws.
 */
export async function drawPlant(sheet: Sheet, storey: Storey, flowLs: number, heightM: number, choices: LoopChoices): Promise<Plant> {
  const { options, service, valves } = choices;
  const { x, turn, width } = await placesOf(options.hasMainValve);
  const spot = (right: number, below: number): Spot => ({ storeyId: storey.id, x: right, y: storey.top + below });
  const placed = (place: Place, prefix: string, wished?: string) =>
    (upper as readonly Place[]).includes(place)
      ? sheet.placed(spot(x(place), MAIN_SUPPLY), sheet.tag(prefix, wished))
      : sheet.placed(spot(x(place), MAIN_RETURN), sheet.tag(prefix, wished), 180);
  const kv = (kind: keyof typeof mostDropKpa) => kvForMostDrop(flowLs, mostDropKpa[kind], valves.densityKgM3);
  const isolating = { kind: 'isolatingValve' as const, kv: kv('isolatingValve'), isClosed: false };

  const source = sheet.add({
    ...placed('source', service === 'chilled' ? 'CH' : 'BO'),
    kind: 'source',
    sourceKind: service === 'chilled' ? 'chiller' : 'boiler',
    designFlowLs: flowLs,
    designDropKpa: options.sourceDropKpa,
  });
  const delivery = sheet.add({ ...placed('delivery valve', 'IV'), ...isolating });
  const check = sheet.add({ ...placed('check valve', 'NR'), kind: 'checkValve', kv: kv('checkValve') });
  const pump = sheet.add({
    ...placed('pump', 'P'),
    kind: 'pump',
    ...genericPump(flowLs, UNKNOWN_DUTY_HEAD_M),
    speed: 1,
    hasNonReturn: true,
  });
  const strainer = sheet.add({ ...placed('strainer', 'ST'), kind: 'strainer', kv: kv('strainer') });
  const suction = sheet.add({ ...placed('suction valve', 'IV'), ...isolating });
  const vesselTee = sheet.tee(spot(x('vessel'), MAIN_RETURN));
  const vessel = sheet.add({
    ...sheet.placed(spot(x('vessel'), MAIN_RETURN - VESSEL_ABOVE), sheet.tag('EV')),
    kind: 'expansionVessel',
    gaugePressureKpa: Math.ceil((heightM * KPA_PER_M + LEAST_TOP_KPA) / 10) * 10,
  });

  // All before the source is return water: the pump stands in the return.
  const into = (piece: string) => sheet.begin(piece, 'in', 'return');
  sheet.join(longer(into(source), BETWEEN_M), delivery, 'out');
  sheet.join(longer(into(delivery), BETWEEN_M), check, 'out');
  sheet.join(longer(into(check), BETWEEN_M), pump, 'out');
  const suctionLine = turned(turned(into(pump), spot(turn, MAIN_SUPPLY)), spot(turn, MAIN_RETURN));
  sheet.join(longer(suctionLine, 2 * BETWEEN_M), strainer, 'out');
  sheet.join(longer(into(strainer), BETWEEN_M), suction, 'out');
  sheet.join(longer(into(suction), BETWEEN_M, 'tee-run'), vesselTee, 'w');
  sheet.join(longer(sheet.begin(vesselTee, 'n', 'return'), BETWEEN_M), vessel, 'in');
  let back = sheet.begin(vesselTee, 'e', 'return');
  if (options.hasMainValve) {
    const valve = chooseBalancingValve(flowLs, valves);
    const id = sheet.add({ ...placed('main valve', 'BV', 'BV-M'), kind: 'balancingValve', valve });
    sheet.join(longer(back, BETWEEN_M), id, 'out');
    back = into(id);
  }
  return { supply: sheet.begin(source, 'out', 'supply'), back, width };
}

/** The middle of each piece from the left edge of the sheet, where the suction line turns up, and where the risers begin. */
async function placesOf(hasMainValve: boolean) {
  const ends = { supply: MAIN_SUPPLY, return: MAIN_RETURN };
  const cells: Cell[] = [
    { id: 'corner', width: 20, height: MAIN_RETURN, lines: ends },
    { id: 'risers', width: 20, height: MAIN_RETURN, lines: ends },
  ];
  const joints: CellJoint[] = [];
  const along = (places: readonly Place[], line: 'supply' | 'return') => {
    let before: string = 'corner';
    for (const place of places) {
      cells.push({ id: place, width: widthOf(place), height: 40, lines: { [line]: 20 } });
      joints.push([before, line, place, line]);
      before = place;
    }
    joints.push([before, line, 'risers', line]);
  };
  along(upper, 'supply');
  along(
    lower.filter((place) => place !== 'main valve' || hasMainValve),
    'return',
  );
  const corners = await columnsOf(cells, joints);
  const left = (id: string) => corners.get(id)!.x;
  return { x: (place: Place) => left(place) + widthOf(place) / 2, turn: left('corner'), width: left('risers') };
}
