import type { Page } from '@playwright/test';
import signIns from '../../db/demo-sign-ins.json' with { type: 'json' };

export type DemoPerson = 'owen' | 'mara' | 'tobin' | 'ingrid';

/** Signs a person of the demo in, through the form. */
export async function signIn(page: Page, who: DemoPerson): Promise<void> {
  const { email, password } = signIns.find((it) => it.email.startsWith(`${who}@`))!;
  // A press before the page has come alive only loads it again.
  await page.goto('/sign-in', { waitUntil: 'networkidle' });
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL(/\/projects/);
}
