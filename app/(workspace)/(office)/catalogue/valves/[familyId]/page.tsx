import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { ValveFamilyForm } from '@/components/catalogue/valve-family-form';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCatalogue } from '@/lib/server/catalogue/read-catalogue';

export const metadata: Metadata = { title: 'Valve family' };

export default async function ValveFamilyPage({ params }: { params: Promise<{ familyId: string }> }) {
  const access = await requireAccess('catalogue.manage', { kind: 'organization' });
  if (!access) return <NotAllowed>Designers and administrators keep the catalogue.</NotAllowed>;
  const { familyId } = await params;
  const { valveFamilies } = await readCatalogue(access.person.organizationId);
  const family = valveFamilies.find(({ id }) => id === familyId) ?? notFound();
  return <ValveFamilyForm family={family} />;
}
