import { expect, type Page } from '@playwright/test';
import type { LinkKind, LinkOf, NetworkLink } from '@/lib/hydraulics/types';
import document from '../../tests/reference/data/networks/two-terminals.json' with { type: 'json' };
import { designer } from './draw';

function linkOf<K extends LinkKind>(id: string, kind: K): LinkOf<K> {
  return (document.links as NetworkLink[]).find((link) => link.id === id && link.kind === kind) as LinkOf<K>;
}

/**
 * Draws the reference network "two terminals, direct return" by hand. Joints a millimetre long stand where a drawing
 * wants a pipe and the network has none; its water is that of 7 °C.
 */
export async function drawTwoTerminals(page: Page): Promise<void> {
  const draw = designer(page);

  await draw.fill('Supply', 6);
  await draw.fill('Return', 8);

  const pump = await draw.place('Pump', 200, 160);
  await draw.paste(
    'pump curve',
    linkOf('PU', 'pump').curve.map(({ flowLs, headM }) => [flowLs, headM]),
  );
  const source = await draw.place('Source', 360, 160);
  const chiller = linkOf('CH', 'resistance');
  await draw.fill('Design flow', chiller.designFlowLs!);
  await draw.fill('Drop at design', chiller.designDropKpa!);
  const supply = await draw.place('Tee', 500, 160);
  const unit = async (x: number, y: number, coil: string, valve: string) => {
    const id = await draw.place('Terminal unit', x, y);
    const { designFlowLs, designDropKpa } = linkOf(coil, 'terminal');
    await draw.fill('Design flow', designFlowLs);
    await draw.fill('Coil drop at design', designDropKpa);
    if (await draw.panel.getByRole('button', { name: 'Take out the control valve' }).isVisible()) {
      await draw.panel.getByRole('button', { name: 'Take out the control valve' }).click();
    }
    await draw.field('Strainer, none if empty').fill('');
    await draw.field('Strainer, none if empty').press('Enter');
    await draw.choose('Valve', 'Own table');
    await draw.paste(
      'settings and kv',
      linkOf(valve, 'balancingValve').kvTable.map(({ setting, kv }) => [setting, kv]),
    );
    return id;
  };
  const first = await unit(500, 340, 'T1', 'V1');
  const second = await unit(680, 340, 'T2', 'V2');
  const back = await draw.place('Tee', 500, 520);
  const suction = await draw.place('Tee', 110, 520);
  const vessel = await draw.place('Expansion vessel', 60, 420);
  await draw.fill('Gauge pressure', document.reference.gaugePressureKpa);

  const asPipe = async (id: string | null) => {
    const { lengthM, boreMm, roughnessMm, minorK = 0 } = id ? linkOf(id, 'pipe') : { lengthM: 0.001, boreMm: 300, roughnessMm: 0.045 };
    await draw.choose('Series', 'Free bore');
    await draw.fill('Length', lengthM);
    await draw.fill('Bore', boreMm);
    await draw.fill('Roughness', roughnessMm);
    await draw.fill('Local losses, sum of K', minorK);
  };
  await draw.connect([suction, 'n'], [pump, 'in']);
  await asPipe(null);
  await draw.connect([pump, 'out'], [source, 'in']);
  await draw.connect([supply, 's'], [first, 'in']);
  await draw.connect([first, 'out'], [back, 'n']);
  await draw.connect([vessel, 'in'], [suction, 'w']);
  await draw.connect([source, 'out'], [supply, 'w']);
  await asPipe('s1');
  await draw.connect([supply, 'e'], [second, 'in']);
  await asPipe('s2');
  await draw.connect([second, 'out'], [back, 'e']);
  await asPipe('r2');
  await draw.connect([back, 'w'], [suction, 'e']);
  await asPipe('r1');
  await draw.selectNothing();
  await expect(page.getByText(/^● Solved in/)).toBeVisible();
}
