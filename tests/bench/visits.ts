import { designBuilding, layouts } from '../site/building';
import { SeededRandom } from '../site/seeded-random';
import { statedSite, VirtualSite } from '../site/virtual-site';
import { visitAsPredicted } from './predicted-visit';
import { visitProportionally } from './proportional-visit';
import type { Suite } from './run';
import { CountedSite, type VisitRow, visitRow } from './visit-count';

const procedures = { proportional: visitProportionally, predicted: visitAsPredicted };

/** VISITS_SEEDS=3 VISITS_TERMINALS=12,60 makes it a quick look; without them it is the whole of it. */
const seedCount = Number(process.env.VISITS_SEEDS ?? 20);
const sizes = (process.env.VISITS_TERMINALS ?? Object.keys(layouts).join(',')).split(',').map(Number);

/**
 * What each procedure costs and reaches, led by the library alone, in virtual buildings: the same building, faults and meters for both.
 * Within ±5 and ±10 % counts true flows of the terminals without a fault that forbids them.
 */
export async function visitsSuite(): Promise<Suite> {
  const rows: VisitRow[] = [];
  for (const terminals of sizes) {
    for (let seed = 1; seed <= seedCount; seed++) {
      for (const [procedure, visit] of Object.entries(procedures))
        rows.push(visitBuilding(procedure as VisitRow['procedure'], visit, terminals, seed));
      process.stderr.write(`visits: ${terminals} terminals, seed ${seed}\n`);
    }
  }
  const means = sizes.flatMap((terminals) =>
    Object.keys(procedures).map((procedure) => meanOf(rows.filter((row) => row.terminals === terminals && row.procedure === procedure))),
  );
  const overall = Object.keys(procedures).map((procedure) => meanOf(rows.filter((row) => row.procedure === procedure)));
  const worse = rows.filter(
    (row) =>
      row.procedure === 'predicted' &&
      row.within5 <
        rows.find((other) => other.procedure === 'proportional' && other.terminals === row.terminals && other.seed === row.seed)!.within5,
  );
  return {
    suite: 'visits',
    rows: rows.map((row) => ({ ...row })),
    means,
    overall,
    seedsWorseThanProportional: worse.map(({ terminals, seed }) => ({ terminals, seed })),
    site: { ...statedSite },
  };
}

export function visitBuilding(
  procedure: VisitRow['procedure'],
  visit: (typeof procedures)['predicted'],
  terminals: number,
  seed: number,
): VisitRow {
  const random = new SeededRandom(1000 * terminals + seed);
  const document = designBuilding(terminals, random);
  const site = new VirtualSite(document, random);
  const counted = new CountedSite(site);
  const before = process.cpuUsage().user;
  const named = visit(document, counted);
  return visitRow(procedure, document, seed, site, counted, named, (process.cpuUsage().user - before) / 1e6);
}

function meanOf(rows: VisitRow[]) {
  const { procedure, terminals } = rows[0];
  const mean = (of: (row: VisitRow) => number) => Number((rows.reduce((sum, row) => sum + of(row), 0) / rows.length).toFixed(3));
  const isOneSize = rows.every((row) => row.terminals === terminals);
  return {
    procedure,
    terminals: isOneSize ? terminals : 'all',
    readingsPerTerminal: mean((row) => row.readingsPerTerminal),
    readingsPerStation: mean((row) => row.readingsPerStation),
    changesPerValve: mean((row) => row.changesPerValve),
    within5: mean((row) => row.within5),
    within10: mean((row) => row.within10),
    faultsFound: mean((row) => row.faultsFound),
    falseAlarms: mean((row) => row.falseAlarms),
    seconds: mean((row) => row.seconds),
  };
}
