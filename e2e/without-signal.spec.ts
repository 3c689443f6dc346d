import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium, expect, test, type BrowserContext, type Page } from '@playwright/test';
import config from '../playwright.config';
import { signIn } from './make/sign-in';

/** A browser with a profile on the disk, as a tablet has: closed and opened again it is the same device. */
async function openTablet(profile: string): Promise<{ context: BrowserContext; page: Page }> {
  const context = await chromium.launchPersistentContext(profile, {
    ...config.use?.launchOptions,
    baseURL: config.use?.baseURL,
    locale: 'en-GB',
    viewport: { width: 1024, height: 768 },
    hasTouch: true,
  });
  return { context, page: context.pages()[0] ?? (await context.newPage()) };
}

test('a loop that was taken along opens, is planned, measured and snagged without signal, also after the browser was closed, and all is sent afterwards', async () => {
  test.setTimeout(180_000);
  const snag = `Insulation missing at the strainer (${Date.now()})`;
  const profile = mkdtempSync(join(tmpdir(), 'evenhead-tablet-'));
  let { context, page } = await openTablet(profile);
  try {
    await signIn(page, 'tobin');
    const href = await page.getByRole('link', { name: /CHW-1/ }).first().getAttribute('href');
    const base = `${href!.replace(/\/(drawing|commissioning|report|schedule)$/, '')}/commissioning`;
    await page.goto(base);
    // The worker that opens pages without a network is there from the first visit on.
    await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
    await page.getByRole('button', { name: 'Take along' }).click();
    await expect(page.getByText('Aboard.')).toBeVisible({ timeout: 30_000 });

    await context.close();
    ({ context, page } = await openTablet(profile));
    await context.setOffline(true);
    await page.goto(base);
    await expect(page.getByText(/From this tablet, as of/)).toBeVisible();
    await expect(page.getByRole('heading', { name: /^Round \d+/ })).toBeVisible();

    // What to do next is worked out on the tablet.
    await page.getByRole('link', { name: 'Next' }).click();
    await expect(page.getByText(/From \d+ readings/)).toBeVisible({ timeout: 40_000 });

    // A check, a snag and a reading.
    await page.getByRole('link', { name: /^Readiness/ }).click();
    await page.getByRole('button', { name: 'Done' }).first().click();
    await expect(page.getByText(/on this tablet/).first()).toBeVisible();
    await page.getByRole('link', { name: /^Snags/ }).click();
    await page.getByLabel('What is wrong?').fill(snag);
    await page.getByRole('button', { name: 'Keep the snag' }).click();
    await page.getByRole('link', { name: 'Stations', exact: true }).click();
    await page.getByRole('link', { name: /^Go on at/ }).click();
    const station = page.url();
    await page.getByLabel(/^Setting/).fill('2.5');
    await page.getByLabel(/^Differential pressure/).fill('6.4 kPa');
    await page.getByLabel('Meter').selectOption({ index: 1 });
    await page.getByRole('button', { name: /^Keep, / }).click();
    const anyway = page.getByRole('button', { name: 'Keep it as read' });
    // The tablet asks about a flow that is far from the last one; it may always be kept.
    await anyway.click();
    await expect(page.getByText('3 entries are kept on this tablet only')).toBeVisible();

    // The battery goes flat; the pages of other loops are not aboard and say so.
    await context.close();
    ({ context, page } = await openTablet(profile));
    await context.setOffline(true);
    await page.goto('/projects');
    await expect(page.getByText('The page you asked for is not aboard')).toBeVisible();
    await page.getByRole('link', { name: 'CHW-1' }).click();
    await expect(page.getByText('3 entries are kept on this tablet only')).toBeVisible();

    await context.setOffline(false);
    await page.goto(base);
    await expect(page.getByText('All readings are sent')).toBeVisible({ timeout: 40_000 });
    await expect(page.getByText(/From this tablet/)).toBeHidden();
    await page.goto(`${base}/snags`);
    await expect(page.getByText(snag)).toHaveCount(1);
    await page.goto(station);
    await expect(page.getByText('2.5 turns, 6.4 kPa')).toHaveCount(1);

    // Who signs out leaves nothing of the loops behind.
    await page.goto('/projects');
    await page.getByRole('button', { name: /^Account of/ }).click();
    await page.getByRole('menuitem', { name: 'Sign out' }).click();
    await expect(page).toHaveURL(/sign-in/);
    expect(await page.evaluate(async () => Boolean(await caches.match('/aboard')))).toBe(false);
  } finally {
    await context.close();
    rmSync(profile, { recursive: true, force: true });
  }
});
