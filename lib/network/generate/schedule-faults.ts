import { isSeriesId } from '../pipe-choice';
import type { GenerateOptions, ScheduledTerminal } from './scheduled-terminal';

/** What keeps a schedule from becoming a loop; the path is that of a request, `terminals.12.tag`. */
export interface ScheduleFault {
  path: string;
  message: string;
}

/** One band of the sheet is the plant room's. */
const MOST_STOREYS = 199;
const MOST_RISERS = 100;
const HIGHEST_M = 2000;

/** All faults of a schedule whose fields are each in order: tags that stand twice, more storeys or risers than a drawing takes. */
export function scheduleFaults(terminals: ScheduledTerminal[], options: GenerateOptions): ScheduleFault[] {
  const firstRow = new Map<string, number>();
  const faults = terminals.flatMap(({ tag }, row): ScheduleFault[] => {
    const first = firstRow.get(tag);
    if (first === undefined) firstRow.set(tag, row);
    return first === undefined ? [] : [{ path: `terminals.${row}.tag`, message: `${tag} stands in row ${first + 1} already.` }];
  });
  for (const [of, most] of [
    ['storey', MOST_STOREYS],
    ['riser', MOST_RISERS],
  ] as const) {
    const seen = new Set<string>();
    const row = terminals.findIndex((terminal) => seen.add(terminal[of]).size > most);
    if (row >= 0) faults.push({ path: `terminals.${row}.${of}`, message: `A loop has up to ${most} ${of}s.` });
  }
  const heightM = new Set(terminals.map(({ storey }) => storey)).size * options.storeyHeightM;
  if (heightM > HIGHEST_M)
    faults.push({ path: 'options.storeyHeightM', message: `These storeys would be ${heightM} m high; a drawing takes ${HIGHEST_M} m.` });
  if (!isSeriesId(options.pipeSeries))
    faults.push({ path: 'options.pipeSeries', message: `There is no pipe series ${options.pipeSeries}.` });
  return faults;
}
