import { fittings, hooperK } from '@/lib/hydraulics/fittings';
import { Sheet } from '../ui/sheet';
import { Figures, Head, RowName, TableFrame } from '../ui/table';

/** Where the last columns stand: clean turbulent flow in sizes at either end of a building's. */
const EXAMPLE_REYNOLDS = 100_000;
const exampleBoresMm = [20, 50, 150];

/** The loss coefficients of fittings by both published methods, and what the first comes to. */
export const FittingTable = () => (
  <Sheet title="Fittings and open valves">
    <div className="text-quiet mb-3 grid gap-1 text-sm">
      <p>
        <strong className="text-ink">2-K:</strong> K = K₁/Re + K∞ (1 + 1/D), D the bore in inches. W. B. Hooper, Chemical Engineering, 24
        August 1981. The drawing sums a pipe’s fittings with it.
      </p>
      <p>
        <strong className="text-ink">3-K:</strong> K = K₁/Re + Kᵢ (1 + K<sub>d</sub>/D<sup>0.3</sup>), D the nominal size in inches. R.
        Darby, Chemical Engineering, July 1999.
      </p>
      <p>The loss is K ρ v²/2 on the velocity in the pipe.</p>
    </div>
    <TableFrame label="Fittings and open valves" className="-mx-4">
      <thead>
        <tr>
          <Head>Fitting</Head>
          <Head isFigure unit="2-K">
            K₁
          </Head>
          <Head isFigure unit="2-K">
            K∞
          </Head>
          <Head isFigure unit="3-K">
            K₁
          </Head>
          <Head isFigure unit="3-K">
            Kᵢ
          </Head>
          <Head isFigure unit="3-K">
            K<sub>d</sub>
          </Head>
          {exampleBoresMm.map((boreMm) => (
            <Head key={boreMm} isFigure unit={`${boreMm} mm`}>
              K at Re 10⁵
            </Head>
          ))}
        </tr>
      </thead>
      <tbody>
        {Object.entries(fittings).map(([id, { name, twoK, threeK }]) => (
          <tr key={id}>
            <RowName className="whitespace-normal">{name}</RowName>
            <Figures>{twoK.k1}</Figures>
            <Figures>{twoK.kInfinity.toFixed(2)}</Figures>
            <Figures>{threeK?.k1 ?? '–'}</Figures>
            <Figures>{threeK?.ki.toFixed(3) ?? '–'}</Figures>
            <Figures>{threeK?.kd.toFixed(1) ?? '–'}</Figures>
            {exampleBoresMm.map((boreMm) => (
              <Figures key={boreMm}>{hooperK(twoK, boreMm, EXAMPLE_REYNOLDS).toFixed(3)}</Figures>
            ))}
          </tr>
        ))}
      </tbody>
    </TableFrame>
  </Sheet>
);
