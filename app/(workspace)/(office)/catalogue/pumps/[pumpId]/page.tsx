import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PumpForm } from '@/components/catalogue/pump-form';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCatalogue } from '@/lib/server/catalogue/read-catalogue';

export const metadata: Metadata = { title: 'Pump' };

export default async function PumpPage({ params }: { params: Promise<{ pumpId: string }> }) {
  const access = await requireAccess('catalogue.manage', { kind: 'organization' });
  if (!access) return <NotAllowed>Designers and administrators keep the catalogue.</NotAllowed>;
  const { pumpId } = await params;
  const { pumps } = await readCatalogue(access.person.organizationId);
  const pump = pumps.find(({ id }) => id === pumpId) ?? notFound();
  return <PumpForm pump={pump} />;
}
