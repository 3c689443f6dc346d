import { v7 as newId } from 'uuid';
import type { DrawingPipe, Equipment, PipeEnd } from '../drawing';
import type { Point } from '../piece-geometry';

/** What a pipe's local losses come from, before its bore says which make of fitting. */
export type PipeFitting = 'elbow' | 'tee-run' | 'tee-branch';

/** A pipe that has begun at one end and is not joined at the other yet. Return pipes are begun where their water arrives. */
export interface Run {
  from: PipeEnd;
  circuit: DrawingPipe['circuit'];
  lengthM: number;
  fittings: PipeFitting[];
  /** Its corners so far, in the order in which it is drawn. */
  bends: Point[];
}

/** A place of the sheet with its storey. */
export interface Spot extends Point {
  storeyId: string;
}

export const longer = (run: Run, lengthM: number, ...fittings: PipeFitting[]): Run => ({
  ...run,
  lengthM: run.lengthM + lengthM,
  fittings: [...run.fittings, ...fittings],
});

/** An elbow at a place of the sheet. */
export const turned = (run: Run, { x, y }: Point): Run => ({ ...longer(run, 0, 'elbow'), bends: [...run.bends, { x, y }] });

/** The pieces and pipes of a loop while it is drawn. */
export class Sheet {
  readonly equipment: Equipment[] = [];
  readonly pipes: DrawingPipe[] = [];
  /** By the pipe's id. */
  readonly fittings = new Map<string, PipeFitting[]>();
  private readonly counts = new Map<string, number>();

  /** `taken` are tags that the schedule gives to its terminals. */
  constructor(private readonly taken: Set<string>) {}

  /** What every piece has. */
  placed({ x, y, storeyId }: Spot, tag: string, rotation: Equipment['rotation'] = 0) {
    return { id: newId(), tag, storeyId, x, y, rotation, isMirrored: false };
  }

  /** A tag that nothing has: the wished one, or the prefix with the next number. */
  tag(prefix: string, wished?: string): string {
    let tag = wished;
    for (let count = this.counts.get(prefix) ?? 0; !tag || this.taken.has(tag);) {
      count += 1;
      this.counts.set(prefix, count);
      tag = `${prefix}-${count}`;
    }
    this.taken.add(tag);
    return tag;
  }

  add(piece: Equipment): string {
    this.equipment.push(piece);
    return piece.id;
  }

  tee(spot: Spot): string {
    return this.add({ ...this.placed(spot, this.tag('T')), kind: 'tee' });
  }

  begin(equipmentId: string, port: PipeEnd['port'], circuit: Run['circuit']): Run {
    return { from: { equipmentId, port }, circuit, lengthM: 0, fittings: [], bends: [] };
  }

  /** Ends a run at a piece: a pipe without a size, which runs the way its water does. */
  join(run: Run, equipmentId: string, port: PipeEnd['port']): void {
    const id = newId();
    const other = { equipmentId, port };
    const [from, to] = run.circuit === 'supply' ? [run.from, other] : [other, run.from];
    this.fittings.set(id, run.fittings);
    this.pipes.push({
      id,
      from,
      to,
      circuit: run.circuit,
      lengthM: run.lengthM,
      series: null,
      nominal: null,
      boreMm: null,
      roughnessMm: null,
      minorK: 0,
      bends: run.circuit === 'supply' ? run.bends : run.bends.toReversed(),
    });
  }
}
