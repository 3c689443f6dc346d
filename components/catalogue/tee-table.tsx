import { convergingTee90, divergingWye45 } from '@/lib/hydraulics/tees';
import { Sheet } from '../ui/sheet';
import { Figures, Head, TableFrame } from '../ui/table';

const ratios = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1];

/** Loss coefficients where streams join or part, by how much of the flow the branch takes. */
export const TeeTable = () => (
  <Sheet title="Tees where streams join or part, equal bores">
    <p className="text-quiet mb-3 text-sm">
      By the branch’s part of the combined flow, on the velocity of the combined leg. Below 0 the faster stream drags the other along.
      Technical Paper 410 (2009 on), chapter 2.
    </p>
    <TableFrame label="Tees" className="-mx-4">
      <thead>
        <tr>
          <Head isFigure>Branch’s part</Head>
          <Head isFigure unit="run">
            Joining, tee 90°
          </Head>
          <Head isFigure unit="branch">
            Joining, tee 90°
          </Head>
          <Head isFigure unit="run">
            Parting, wye 45°
          </Head>
          <Head isFigure unit="branch">
            Parting, wye 45°
          </Head>
        </tr>
      </thead>
      <tbody>
        {ratios.map((ratio) => {
          const joining = convergingTee90(ratio);
          const parting = divergingWye45(ratio);
          return (
            <tr key={ratio}>
              <Figures>{ratio.toFixed(1)}</Figures>
              {[joining.run, joining.branch, parting.run, parting.branch].map((k, index) => (
                <Figures key={index}>{k.toFixed(3)}</Figures>
              ))}
            </tr>
          );
        })}
      </tbody>
    </TableFrame>
  </Sheet>
);
