import { expect, it } from 'vitest';
import { darbyK, fittings, hooperK, type FittingId } from '@/lib/hydraulics/fittings';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import { convergingTee90, divergingWye45 } from '@/lib/hydraulics/tees';
import { askPython, hasPythonLibrary } from './python-libraries';

const NEEDS = 'needs python3-fluids';

/** The names under which python3-fluids tabulates our fittings: Hooper's, Darby's. */
const NAMES: Record<FittingId, [hooper: string, darby: string | null]> = {
  'elbow-90-threaded': ['Elbow, 90°, Standard (R/D = 1), Screwed', 'Elbow, 90°, threaded, standard, (r/D = 1)'],
  'elbow-90-welded': ['Elbow, 90°, Standard (R/D = 1), Flanged/welded', 'Elbow, 90°, flanged, welded, bends, (r/D = 1)'],
  'elbow-90-long-radius': ['Elbow, 90°, Long-radius (R/D = 1.5), All types', 'Elbow, 90°, threaded, long radius, (r/D = 1.5)'],
  'elbow-45': ['Elbow, 45°, Standard (R/D = 1), All types', 'Elbow, 45°, threaded standard, (r/D = 1)'],
  'tee-run-threaded': ['Tee, Run, Screwed', 'Tee, Run-through, threaded, (r/D = 1)'],
  'tee-run-welded': ['Tee, Through, Flanged or welded', 'Tee, Run-through, flanged, (r/D = 1)'],
  'tee-branch-threaded': ['Elbow, Used as, Standard, Screwed', 'Tee, Through-branch, (as elbow), threaded, (r/D = 1)'],
  'tee-branch-welded': ['Elbow, Elbow, Standard, Flanged/welded', 'Tee, Through-branch, (as elbow), flanged, (r/D = 1)'],
  'gate-valve': ['Valve, Gate, Full line size, Beta = 1', 'Valve, Gate valve, standard, β = 1'],
  'ball-valve': ['Valve, Ball, Reduced trim, Beta = 0.9', 'Valve, Ball valve, standard, β = 1'],
  'globe-valve': ['Valve, Globe, Standard', 'Valve, Globe valve, standard, β = 1'],
  'butterfly-valve': ['Valve, Butterfly,', null],
  'swing-check-valve': ['Valve, Check, Swing', 'Valve, Swing check'],
  'diaphragm-valve': ['Valve, Diaphragm, Dam type', 'Valve, Diaphragm, dam type'],
};

it('every fitting has the 2-K and 3-K coefficients that python3-fluids tabulates, at every size and Reynolds number', ({ skip }) => {
  skip(!hasPythonLibrary('fluids'), NEEDS);
  const script = `
from fluids.fittings import Hooper2K, Darby3K
print(json.dumps([[Hooper2K(d, re, name=h), Darby3K(NPS=d, Re=re, name=k) if k else None] for h, k, d, re in rows]))`;
  const cases = (Object.keys(NAMES) as FittingId[]).flatMap((id) =>
    [0.5, 1, 2, 4, 8].flatMap((inch) => [500, 5e3, 5e4, 5e5].map((reynolds) => ({ id, inch, reynolds }))),
  );
  const theirs = askPython<[number, number | null][]>(
    script,
    cases.map(({ id, inch, reynolds }) => [...NAMES[id], inch, reynolds]),
  );
  cases.forEach(({ id, inch, reynolds }, i) => {
    const { twoK, threeK } = fittings[id];
    expect(hooperK(twoK, inch * 25.4, reynolds)).toBeCloseTo(theirs[i][0], 10);
    expect(threeK && darbyK(threeK, inch, reynolds)).toEqual(theirs[i][1] === null ? null : expect.closeTo(theirs[i][1], 10));
  });
});

it('tees and wyes agree with python3-fluids at every ratio of flows', ({ skip }) => {
  skip(!hasPythonLibrary('fluids'), NEEDS);
  const script = `
import fluids.fittings as f
named = lambda start: getattr(f, next(name for name in dir(f) if name.startswith(start)))
joined_run, joined_branch = named('K_run_converging'), named('K_branch_converging')
divided_run, divided_branch = named('K_run_diverging'), named('K_branch_diverging')
print(json.dumps([[joined_run(.1, .1, 1 - r, r), joined_branch(.1, .1, 1 - r, r),
                   divided_run(.1, .1, 1 - r, r, angle=45), divided_branch(.1, .1, 1 - r, r, angle=45)] for r in rows]))`;
  const ratios = Array.from({ length: 49 }, (_, i) => 0.011 + i * 0.02);
  const theirs = askPython<number[][]>(script, ratios);
  ratios.forEach((ratio, i) => {
    const [joined, divided] = [convergingTee90(ratio), divergingWye45(ratio)];
    [joined.run, joined.branch, divided.run, divided.branch].forEach((k, j) => expect(k).toBeCloseTo(theirs[i][j], 10));
  });
});

it('steel bores agree with the ASME B36.10M table of python3-fluids', ({ skip }) => {
  skip(!hasPythonLibrary('fluids'), NEEDS);
  const script = `
from fluids.piping import nearest_pipe
print(json.dumps([[[x * 1e3 for x in nearest_pipe(NPS=nps, schedule=s)[1:]] for nps in (.5, .75, 1, 1.25, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 14, 16)] for s in rows]))`;
  const theirs = askPython<number[][][]>(script, ['40', '80']);
  (['steel-asme-sch40', 'steel-asme-sch80'] as const).forEach((id, s) => {
    expect(pipeSeries[id].sizes).toHaveLength(theirs[s].length);
    pipeSeries[id].sizes.forEach(({ boreMm, outsideMm, wallMm }, i) => {
      [boreMm, outsideMm, wallMm].forEach((ours, j) => expect(ours).toBeCloseTo(theirs[s][i][j], 6));
    });
  });
});
