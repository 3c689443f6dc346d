import type { Metadata } from 'next';
import { PumpForm } from '@/components/catalogue/pump-form';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';

export const metadata: Metadata = { title: 'New pump' };

export default async function NewPumpPage() {
  const access = await requireAccess('catalogue.manage', { kind: 'organization' });
  return access ? <PumpForm pump={null} /> : <NotAllowed>Designers and administrators keep the catalogue.</NotAllowed>;
}
