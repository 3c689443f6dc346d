import type { Metadata } from 'next';
import { NothingYet, PartHead } from '@/components/catalogue/part-head';
import { PumpList } from '@/components/catalogue/pump-list';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCatalogue } from '@/lib/server/catalogue/read-catalogue';

export const metadata: Metadata = { title: 'Pumps' };

export default async function PumpsPage() {
  const access = await requireAccess('draft.see', { kind: 'organization' });
  if (!access) return null;
  const mayManage = may(access.roles, 'catalogue.manage');
  const { pumps } = await readCatalogue(access.person.organizationId);
  return (
    <>
      <PartHead title="Your organisation’s pumps" newHref={mayManage ? '/catalogue/pumps/new' : null} newWords="Add a pump" />
      {pumps.length ? (
        <PumpList pumps={pumps} mayManage={mayManage} />
      ) : (
        <NothingYet title="No pump yet">
          Upload, paste or type the points of a pump’s curve: flow and head, and where you know them efficiency and the suction head
          required.
        </NothingYet>
      )}
    </>
  );
}
