import type { Metadata } from 'next';
import { InstrumentList } from '@/components/instruments/instrument-list';
import { NotAllowed } from '@/components/shell/not-allowed';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { listInstruments } from '@/lib/server/instruments/list-instruments';

export const metadata: Metadata = { title: 'Instruments' };

export default async function InstrumentsPage() {
  const access = await requireAccess('instruments.see', { kind: 'organization' });
  if (!access) return <NotAllowed>The list of instruments is for people on projects.</NotAllowed>;
  const instruments = await listInstruments(access.person.organizationId);
  return <InstrumentList instruments={instruments} mayManage={may(access.roles, 'instruments.manage')} now={new Date().toISOString()} />;
}
