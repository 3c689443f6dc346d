import type { Metadata } from 'next';
import { AboardPage } from '@/components/aboard/aboard-page';
import { requirePerson } from '@/lib/server/auth/require-person';

export const metadata: Metadata = { title: 'Aboard' };

/** What was taken along on this device. The page is kept on the device too, and opens in place of any other where there is no signal. */
export default async function Aboard() {
  const { id, name, organizationName } = await requirePerson();
  return <AboardPage person={{ id, name, organizationName }} />;
}
