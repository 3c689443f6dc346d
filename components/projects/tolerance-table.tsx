import { stationKinds, stationRanks, type StationKind, type StationRank, type ToleranceRule } from '@/lib/api/projects';

export const stationKindWords: Record<StationKind, string> = { terminal: 'Terminals', branch: 'Branches', pump: 'Pump' };

/** In the order that the trade names them. */
export const inOrder = (rules: ToleranceRule[]): ToleranceRule[] =>
  [...rules].sort(
    (a, b) =>
      stationKinds.indexOf(a.stationKind) - stationKinds.indexOf(b.stationKind) ||
      stationRanks.indexOf(a.rank) - stationRanks.indexOf(b.rank),
  );

const rankWords: Record<StationRank, string> = { all: '', index: ', index unit', small: ', under 0.1 L/s', main: ', main' };

/** "Terminals, index unit". */
export const bandName = ({ stationKind, rank }: Pick<ToleranceRule, 'stationKind' | 'rank'>): string =>
  `${stationKindWords[stationKind]}${rankWords[rank ?? 'all']}`;

const signed = (percent: number): string => (percent === 0 ? '0' : `${percent > 0 ? '+' : '−'}${Math.abs(percent)}`);

/** The agreed bands around design flow, with where they come from. */
export function ToleranceTable({ tolerances }: { tolerances: ToleranceRule[] }) {
  const sources = [...new Set(tolerances.map(({ source }) => source))];
  return (
    <>
      <table className="w-full">
        <thead>
          <tr className="text-quiet border-b text-left text-sm">
            <th className="py-1.5 font-normal">Of design flow</th>
            <th className="py-1.5 text-right font-normal">below, %</th>
            <th className="py-1.5 text-right font-normal">above, %</th>
          </tr>
        </thead>
        <tbody className="divide-y">
          {inOrder(tolerances).map(({ stationKind, rank, lowerPercent, upperPercent, source }) => (
            <tr key={`${stationKind} ${rank}`}>
              <th scope="row" className="py-1.5 text-left font-normal">
                {bandName({ stationKind, rank })}
                {sources.length > 1 && <span className="text-quiet ml-1 align-super text-xs">{sources.indexOf(source) + 1}</span>}
              </th>
              <td className="figures text-right">{signed(lowerPercent)}</td>
              <td className="figures text-right">{signed(upperPercent)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {sources.map((source, i) => (
        <p key={source} className="text-quiet mt-2 text-sm">
          {sources.length > 1 && `${i + 1} `}
          {source}.
        </p>
      ))}
    </>
  );
}
