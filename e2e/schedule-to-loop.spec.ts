import { expect, test } from '@playwright/test';
import { signIn } from './make/sign-in';

/** Twelve terminals on three storeys; one coil drop is no figure, one row is of another loop and has a tag that is taken. */
const rows = ['Unit no.;Floor;Room;Cooling load (kW);Water flow (L/s);Pressure drop (kPa)'];
for (let floor = 1; floor <= 3; floor++) {
  for (let unit = 1; unit <= 4; unit++) {
    const load = 2 + unit / 2;
    const flow = unit === 4 ? '' : (load / 25.17).toFixed(3).replace('.', ',');
    rows.push(`FC-${floor}.0${unit};Level ${floor};${floor}.0${unit} Office;${String(load).replace('.', ',')};${flow};${10 + unit}`);
  }
}
rows[6] = rows[6]!.replace(/;12$/, ';by others');
rows[9] = rows[9]!.replace('FC-3.01', 'FC-1.01');

test('a loop is generated from a schedule of twelve, one cell put right and one row left out', async ({ page }) => {
  test.setTimeout(300_000);
  await signIn(page, 'mara');
  const make = async (path: string, data: object): Promise<string> => {
    const response = await page.request.post(path, { data });
    expect(response.status()).toBe(200);
    return (await response.json()).id;
  };
  const projectId = await make('/api/projects', { name: `Granary Row ${Date.now()}`, client: '', building: '', members: [] });
  const loopId = await make(`/api/projects/${projectId}/loops`, { name: 'CHW-3', service: 'chilled' });
  const loopPath = `/projects/${projectId}/loops/${loopId}`;
  await page.goto(`${loopPath}/schedule/import`);

  const bring = (name: string, mimeType: string, content: string) =>
    page.getByLabel('Schedule file').setInputFiles({ name, mimeType, buffer: Buffer.from(content) });

  // A file that is none: said so, and the page goes on.
  await bring('schedule.xlsx', 'application/octet-stream', 'not a workbook');
  await expect(page.getByText('its content is none')).toBeVisible();

  await bring('schedule.csv', 'text/csv', rows.join('\n'));
  await expect(page.getByText('schedule.csv', { exact: true })).toBeVisible();
  await expect(page.getByLabel('Coil drop', { exact: true })).toHaveValue('5');
  await expect(page.getByLabel('Unit of design flow')).toHaveValue('L/s');
  const generate = page.getByRole('button', { name: 'Generate the loop' });
  await expect(generate).toBeDisabled();

  await page.getByRole('button', { name: /^Faulty/ }).click();
  await expect(page.getByText('“by others” is not a number.')).toBeVisible();
  await expect(page.getByText('FC-1.01 is already the tag of row 2.')).toBeVisible();
  await page.getByLabel('Coil drop, row 7').fill('12,5');
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: 'Leave out row 10' }).click();
  await expect(page.getByRole('button', { name: /^Faulty 0/ })).toBeVisible();

  // A flow that the schedule does not give is worked out from its load, and says how.
  await page.getByRole('button', { name: /^All/ }).click();
  await page.getByTitle('Worked out from the load: show working').first().click();
  await expect(page.getByRole('dialog')).toContainText('Q = P / (ρ · c · ΔT)');
  await page.keyboard.press('Escape');

  // Nothing was written so far.
  const draft = async () => (await page.request.get(`/api/loops/${loopId}/draft`)).json();
  expect((await draft()).drawing.equipment).toEqual([]);

  await generate.click();
  const result = page.getByRole('dialog', { name: 'The loop is drawn' });
  await expect(result).toBeVisible({ timeout: 60_000 });
  await expect(result.getByText('Terminals').locator('..')).toContainText('11');
  await result.getByRole('link', { name: 'Open the drawing' }).click();

  await expect(page).toHaveURL(/\/drawing$/);
  await expect(page.getByText(/^● Solved in/)).toBeVisible({ timeout: 60_000 });
  const { drawing } = await draft();
  const units = drawing.equipment.filter(({ kind }: { kind: string }) => kind === 'terminalUnit');
  expect(units).toHaveLength(11);
  expect(units.find(({ tag }: { tag: string }) => tag === 'FC-2.02')).toMatchObject({ coilDropKpa: 12.5 });

  // The same schedule again: its columns are remembered, and what is drawn is not replaced unasked.
  await page.goto(`${loopPath}/schedule/import`);
  await bring('schedule.csv', 'text/csv', [...rows.slice(0, 6)].join('\n'));
  await page.getByLabel('Riser where empty').fill('A');
  await page.getByRole('button', { name: 'Bring another' }).click();
  await bring('schedule.csv', 'text/csv', [...rows.slice(0, 6)].join('\n'));
  await expect(page.getByText('As you chose for these heads before')).toBeVisible();
  await expect(page.getByLabel('Riser where empty')).toHaveValue('A');
  await generate.click();
  const ask = page.getByRole('dialog', { name: 'Replace what is drawn?' });
  await ask.getByRole('button', { name: 'Keep the drawing' }).click();
  expect((await draft()).drawing).toEqual(drawing);
});
