import { expect, test, type Browser, type Page } from '@playwright/test';
import ExcelJS from 'exceljs';
import expected from '../tests/reference/data/networks/two-terminals.expected.json' with { type: 'json' };
import { designer } from './make/draw';
import { drawTwoTerminals } from './make/draw-two-terminals';
import { signIn, type DemoPerson } from './make/sign-in';
import { cell, columnOf, rowsOf } from './make/workbook';

/**
 * The whole job as its three people do it, on a loop whose flows, settings and pump duty were found independently
 * (tests/reference/data/networks/two-terminals.expected.json: scipy, all heads and flows at once, no loops).
 */

test.use({ permissions: ['clipboard-read', 'clipboard-write'] });

const { valves, pump } = expected.balance;
const within = (actual: unknown, wanted: number) =>
  expect(Math.abs(Number(actual) / wanted - 1), `${String(actual)} against ${wanted}`).toBeLessThan(1e-3);

async function asPerson(browser: Browser, who: DemoPerson, viewport: { width: number; height: number }): Promise<Page> {
  const context = await browser.newContext({ viewport, hasTouch: who === 'tobin', locale: 'en-GB' });
  const page = await context.newPage();
  await signIn(page, who);
  return page;
}

test('a loop is drawn, issued, measured, put right, signed and handed over as a workbook', async ({ page, browser }) => {
  test.setTimeout(300_000);

  // 1. The designer makes a project and a loop, and draws it.
  await signIn(page, 'mara');
  await page.getByRole('button', { name: 'New project' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Name').fill(`Foundry Lane ${Date.now()}`);
  for (const [number, person] of [
    [1, 'Tobin Ashgrove'],
    [2, 'Ingrid Vale'],
  ] as const) {
    await dialog.getByRole('button', { name: 'Add a member' }).click();
    await dialog.getByLabel(`Member ${number}`, { exact: true }).selectOption(person);
  }
  await dialog.getByRole('button', { name: 'Make the project' }).click();
  await page.getByRole('button', { name: 'New loop' }).click();
  await dialog.getByLabel('Name').fill('=CHW-9');
  await dialog.getByRole('button', { name: 'Make the loop and draw it' }).click();
  await expect(page).toHaveURL(/\/drawing$/);
  const loopPath = new URL(page.url()).pathname.replace(/\/drawing$/, '');
  await drawTwoTerminals(page);
  await expect(page.getByText(/^Saved /)).toBeVisible();

  // 2. The server has solved it: settings and pump duty stand there, a fault selects its place.
  const draw = designer(page);
  await draw.panel.getByRole('tab', { name: 'Settings' }).click();
  await expect(draw.panel.getByRole('row', { name: /FC-1\.01/ })).toContainText(valves.V1.setting.toFixed(2));
  await expect(draw.panel.getByRole('row', { name: /P-1/ })).toContainText(pump.requiredHeadM.toFixed(2));
  await expect(page.getByText('index', { exact: true })).toBeVisible();

  // 3. Revision 1.
  await page.getByRole('button', { name: 'Issue revision' }).click();
  await dialog.getByLabel(/^Note/).fill('For commissioning');
  await dialog.getByRole('button', { name: 'Issue revision 1' }).click();
  await expect(page.getByText('Same as revision 1').first()).toBeVisible();

  // 4. The technician, on a tablet: a round, a drop across each valve, a wrong entry put right, the pump's flow.
  const tablet = await asPerson(browser, 'tobin', { width: 1024, height: 768 });
  await tablet.goto(`${loopPath}/commissioning`);
  await tablet.getByRole('button', { name: 'Start the first round' }).click();
  await tablet.getByRole('dialog').getByLabel('What is it for?').fill('As set');
  await tablet.getByRole('dialog').getByLabel(/checks are open/).fill('The flushing record comes tomorrow');
  await tablet.getByRole('dialog').getByRole('button', { name: 'Start the round' }).click();
  await expect(tablet.getByRole('heading', { name: 'Round 1, As set' })).toBeVisible();

  /** Keeping a reading may still be leading on by itself: that must not stop the way to another page. */
  const go = (page: string) => expect(() => tablet.goto(`${loopPath}/${page}`)).toPass();

  const readDrop = async (tag: string, turns: number, dropKpa: string) => {
    await go('commissioning');
    await tablet.locator('a[href*="/stations/"]', { hasText: tag }).last().click();
    await expect(tablet.getByRole('heading', { name: tag })).toBeVisible();
    await chooseMeter('DP-02');
    await tablet.getByLabel('Setting, turns').fill(String(turns));
    await tablet.getByLabel('Differential pressure, kPa').fill(dropKpa);
  };
  const chooseMeter = async (serial: string) => {
    const meter = tablet.getByLabel('Meter');
    await meter.selectOption((await meter.locator('option', { hasText: serial }).getAttribute('value'))!);
  };
  const keep = async () => {
    const sent = tablet.waitForResponse((response) => response.url().includes('/readings') && response.request().method() === 'POST');
    await tablet.getByRole('button', { name: /^Keep/ }).click();
    const asked = tablet.getByRole('dialog', { name: 'Before you keep it' });
    const isAsked = await Promise.race([
      sent.then(() => false),
      asked.waitFor().then(
        () => true,
        () => false,
      ),
    ]);
    if (isAsked) await asked.getByRole('button', { name: /keep/i }).last().click();
    expect((await sent).status()).toBe(200);
  };

  await readDrop('FC-1.01', valves.V1.setting, '51,97');
  await expect(tablet.getByText('high', { exact: false }).first()).toBeVisible();
  await keep();
  await readDrop('FC-1.02', valves.V2.setting, String(valves.V2.dropKpa));
  await keep();

  await go('commissioning');
  await tablet.locator('a[href*="/stations/"]', { hasText: 'FC-1.01' }).last().click();
  await tablet.getByRole('button', { name: 'Correct this entry' }).click();
  await tablet.getByLabel('Setting, turns').fill(String(valves.V1.setting));
  await tablet.getByLabel('Differential pressure, kPa').fill(String(valves.V1.dropKpa));
  await tablet.getByLabel('Why was the earlier entry wrong?').fill('-digits swapped');
  await keep();

  await go('commissioning');
  await tablet.locator('a[href*="/stations/"]', { hasText: 'P-1' }).last().click();
  await chooseMeter('UF-01');
  await tablet.getByLabel('Flow, L/s').fill('1.04');
  await keep();
  await go('report');
  await tablet.getByRole('button', { name: 'Submit report' }).click();
  await tablet.getByRole('dialog').getByRole('button', { name: 'Submit report' }).click();
  await expect(tablet.getByText('The designer reviews it next.').first()).toBeVisible();

  // 5. The designer reviews, the owner accepts and downloads.
  await page.goto(`${loopPath}/report`);
  await page.getByRole('button', { name: 'Sign as reviewed' }).click();
  await dialog.getByRole('button', { name: 'Sign as reviewed' }).click();
  await expect(page.getByText('The owner accepts it next.').first()).toBeVisible();

  const owner = await asPerson(browser, 'ingrid', { width: 390, height: 844 });
  await owner.goto(`${loopPath}/report`);
  await owner.getByRole('button', { name: 'Accept report' }).click();
  await owner.getByRole('dialog').getByRole('button', { name: 'Accept report' }).click();
  const waiting = owner.waitForEvent('download');
  await owner.getByRole('button', { name: 'Download report 1' }).click();
  const download = await waiting;

  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.readFile(await download.path());
  const [first, second] = rowsOf(workbook, 'Terminals');
  within(cell(workbook, 'Terminals', first, 'Design flow'), valves.V1.flowLs);
  within(cell(workbook, 'Terminals', first, 'Measured flow'), valves.V1.flowLs);
  within(cell(workbook, 'Terminals', second, 'Measured flow'), valves.V2.flowLs);
  within(cell(workbook, 'Terminals', first, 'Setting by design'), valves.V1.setting);
  within(cell(workbook, 'Valves', rowsOf(workbook, 'Valves')[0], 'Drop at design'), valves.V1.dropKpa);
  within(cell(workbook, 'Valves', rowsOf(workbook, 'Valves')[0], 'Kv at setting'), valves.V1.kv);
  within(cell(workbook, 'Pump', rowsOf(workbook, 'Pump')[0], 'Head needed'), pump.requiredHeadM);
  within(cell(workbook, 'Pump', rowsOf(workbook, 'Pump')[0], 'Design flow'), pump.flowLs);

  const percent = first.getCell(columnOf(workbook, 'Terminals', 'Of design'));
  expect(percent.formula).toBeTruthy();
  within(percent.result, 1);

  // Both entries of FC-1.01 are in the record, and no text became a formula.
  expect(rowsOf(workbook, 'Readings')).toHaveLength(4);
  const texts = workbook.worksheets.flatMap((sheet) => {
    const found: ExcelJS.Cell[] = [];
    sheet.eachRow((row) => row.eachCell((it) => found.push(it)));
    return found;
  });
  expect(texts.some((it) => it.value === '=CHW-9' || String(it.value).includes('=CHW-9'))).toBe(true);
  expect(texts.filter((it) => it.formula?.includes('CHW-9') || it.formula?.includes('digits'))).toEqual([]);
});
