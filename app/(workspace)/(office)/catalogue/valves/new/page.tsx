import type { Metadata } from 'next';
import { ValveFamilyForm } from '@/components/catalogue/valve-family-form';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';

export const metadata: Metadata = { title: 'New valve family' };

export default async function NewValveFamilyPage() {
  const access = await requireAccess('catalogue.manage', { kind: 'organization' });
  return access ? <ValveFamilyForm family={null} /> : <NotAllowed>Designers and administrators keep the catalogue.</NotAllowed>;
}
