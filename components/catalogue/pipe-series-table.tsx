import type { PipeSeries } from '@/lib/hydraulics/pipe-series';
import { Figure, UnitName } from '../ui/figure';
import { Sheet } from '../ui/sheet';
import { Figures, Head, RowName, TableFrame } from '../ui/table';

/** Litres in a metre of pipe: a bore in mm gives π/4 D² in mm², a thousandth of that in L/m. */
const contentLM = (boreMm: number) => ((Math.PI / 4) * boreMm ** 2) / 1000;

/** One series of pipe: every size with its dimensions, its roughness, and where both come from. */
export const PipeSeriesTable = ({ series }: { series: PipeSeries }) => (
  <Sheet title={series.name}>
    <dl className="mb-3 grid gap-x-6 gap-y-1 text-sm sm:grid-cols-[max-content_1fr]">
      <dt className="text-quiet">Dimensions</dt>
      <dd>{series.source}; bore = outside diameter less two walls</dd>
      <dt className="text-quiet">Roughness</dt>
      <dd>
        <span className="figures">{series.roughnessMm}</span> mm, {series.roughnessSource}
      </dd>
    </dl>
    <TableFrame label={`Sizes of ${series.name}`} className="-mx-4">
      <thead>
        <tr>
          <Head>Size</Head>
          <Head isFigure unit={<UnitName quantity="bore" />}>
            Outside
          </Head>
          <Head isFigure unit={<UnitName quantity="bore" />}>
            Wall
          </Head>
          <Head isFigure unit={<UnitName quantity="bore" />}>
            Bore
          </Head>
          <Head isFigure unit="L/m">
            Content
          </Head>
        </tr>
      </thead>
      <tbody>
        {series.sizes.map(({ nominal, outsideMm, wallMm, boreMm }) => (
          <tr key={nominal}>
            <RowName>{nominal}</RowName>
            <Figures>
              <Figure quantity="bore" si={outsideMm} />
            </Figures>
            <Figures>{wallMm.toFixed(2)}</Figures>
            <Figures>
              <Figure quantity="bore" si={boreMm} />
            </Figures>
            <Figures>{contentLM(boreMm).toFixed(3)}</Figures>
          </tr>
        ))}
      </tbody>
    </TableFrame>
  </Sheet>
);
