import type { ValveSize } from '@/lib/api/catalogue';
import { Figure, UnitName } from '../ui/figure';
import { Figures, Head, RowName, TableFrame, Words } from '../ui/table';

/** The sizes of a family in a line each: how far they open, what they pass then, and over what flow is read. */
export const SizeTable = ({ sizes, className }: { sizes: readonly ValveSize[]; className?: string }) => (
  <TableFrame label="Sizes" className={className}>
    <thead>
      <tr>
        <Head>Size</Head>
        <Head isFigure unit="turns">
          Settings
        </Head>
        <Head isFigure unit="turns">
          Step
        </Head>
        <Head isFigure unit={<UnitName quantity="valveCoefficient" />}>
          Fully open
        </Head>
        <Head>Flow is read over</Head>
      </tr>
    </thead>
    <tbody>
      {sizes.map(({ nominal, stepTurns, points }) => (
        <tr key={nominal}>
          <RowName>{nominal}</RowName>
          <Figures>
            {points[0]!.setting} – {points.at(-1)!.setting}
          </Figures>
          <Figures>{stepTurns ?? '–'}</Figures>
          <Figures>
            <Figure quantity="valveCoefficient" si={points.at(-1)!.kv} />
          </Figures>
          <Words>
            <MeasuredOver points={points} />
          </Words>
        </tr>
      ))}
    </tbody>
  </TableFrame>
);

function MeasuredOver({ points }: Pick<ValveSize, 'points'>) {
  const [first] = points;
  if (first?.measuringKv === undefined) return <>the valve</>;
  if (points.some(({ measuringKv }) => measuringKv !== first.measuringKv)) return <>its orifice, by setting</>;
  return (
    <>
      a fixed orifice, <Figure quantity="valveCoefficient" si={first.measuringKv} hasUnit />
    </>
  );
}
