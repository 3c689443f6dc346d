import { metresPerKpa } from '@/lib/hydraulics/links/law';
import { type PreparedNetwork, prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, type Solution } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { documentAt, type LoopReading, type ReadingRound } from '../readings';
import { fittedDocument } from './fitted-document';
import { ReadingScale } from './reading-scale';
import { type LinkAnswers, linkAnswers } from './sensitivities';
import type { Unknown } from './unknowns';

/** One reading with its place: document position of its link, round, and its value on the scale of unit error. */
export interface PlacedReading {
  reading: LoopReading;
  round: number;
  at: number;
  scale: ReadingScale;
  scaled: number;
}

/** The network as unknowns of some value make it, solved for each round. */
interface SolvedRounds {
  networks: PreparedNetwork[];
  solutions: Solution[];
  /** What the meters would show, in the readings' own units and on the scale of unit error. */
  shown: Float64Array;
  scaled: Float64Array;
  closed: boolean;
}

/** From unknowns to what the meters show, with the Jacobian. */
export class ReadingModel {
  readonly placed: PlacedReading[];
  private readonly documents: NetworkDocument[];
  private readonly meterOf: Map<string, number>;
  private readonly lastFlows: (Float64Array | undefined)[];

  constructor(
    document: NetworkDocument,
    rounds: ReadingRound[],
    readonly unknowns: Unknown[],
  ) {
    const positionOf = new Map(document.links.map((link, at) => [link.id, at]));
    this.placed = rounds.flatMap(({ readings }, round) =>
      readings.map((reading) => {
        const at = positionOf.get(reading.link);
        if (at === undefined) throw new RangeError(`a reading names ${reading.link}, which is not in the document`);
        const scale = new ReadingScale(reading);
        return { reading, round, at, scale, scaled: scale.of(reading.value) };
      }),
    );
    this.documents = rounds.map(({ settings }) => documentAt(document, settings));
    this.lastFlows = rounds.map(() => undefined);
    this.meterOf = new Map(unknowns.flatMap((unknown, j) => (unknown.kind === 'meter' ? [[unknown.id, j] as const] : [])));
  }

  solve(values: Float64Array): SolvedRounds {
    const { unknowns, documents, lastFlows } = this;
    const networks = documents.map((document, round) => prepareNetwork(fittedDocument(document, unknowns, values, round)));
    const solutions = networks.map((network, round) => {
      const before = lastFlows[round];
      // Only a network of the same open links can start from earlier flows.
      const startFlows = before?.length === network.from.length ? before : undefined;
      return findFlows(network, { startFlows });
    });
    solutions.forEach((solution, round) => (lastFlows[round] = solution.closed ? solution.state.linkFlow.slice() : undefined));
    const shown = Float64Array.from(this.placed, ({ reading, round, at }) => {
      const i = networks[round].numberOf[at];
      const bias = values[this.meterOf.get(reading.meter)!];
      if (i < 0) return 0;
      if (reading.quantity === 'flowLs') return solutions[round].state.linkFlow[i] * Math.exp(bias);
      const drop = solutions[round].state.linkLoss[i] / metresPerKpa(networks[round].fluid.densityKgM3);
      return drop * this.sense(round, at) * Math.exp(2 * bias);
    });
    const scaled = shown.map((value, m) => this.placed[m].scale.of(value));
    return { networks, solutions, shown, scaled, closed: solutions.every((solution) => solution.closed) };
  }

  /** Change of each scaled reading per unit of each unknown. */
  jacobian({ networks, solutions, shown }: SolvedRounds): Float64Array[] {
    const { unknowns, placed } = this;
    const answers = networks.map((network, round) => {
      const watched = [...new Set(placed.flatMap((each) => (each.round === round ? [each.at] : [])))];
      const found = linkAnswers(network, solutions[round], unknowns, (unknown) => unknown.rounds[round], watched);
      return new Map(watched.map((at, w) => [at, found[w]]));
    });
    return placed.map((each, m) =>
      readingRow(each, shown[m], answers[each.round].get(each.at)!, this.sense(each.round, each.at), this.meterOf),
    );
  }

  /** A pump's drop is read as what it raises. */
  private sense(round: number, at: number): number {
    return this.documents[round].links[at].kind === 'pump' ? -1 : 1;
  }
}

/** Row of one reading: its link's answers, and its meter's bias once for a flow, twice for a drop. */
export function readingRow(
  { reading, scale }: Pick<PlacedReading, 'reading' | 'scale'>,
  shown: number,
  answers: LinkAnswers,
  sense: number,
  meterOf: Map<string, number>,
): Float64Array {
  const isFlow = reading.quantity === 'flowLs';
  const slope = scale.slope(shown);
  const value = isFlow ? answers.flowLs : sense * answers.dropKpa;
  const gain = value === 0 ? 1 : shown / value;
  const source = isFlow ? answers.flowPerUnknown : answers.dropPerUnknown;
  const row = source.map((each) => slope * gain * each * (isFlow ? 1 : sense));
  const meter = meterOf.get(reading.meter);
  if (meter !== undefined) row[meter] = slope * shown * (isFlow ? 1 : 2);
  return row;
}
