import type { Metadata } from 'next';
import { GenericValveTable } from '@/components/catalogue/generic-valve-table';
import { NothingYet, PartHead } from '@/components/catalogue/part-head';
import { ValveFamilyList } from '@/components/catalogue/valve-family-list';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCatalogue } from '@/lib/server/catalogue/read-catalogue';

export const metadata: Metadata = { title: 'Valves' };

export default async function ValvesPage() {
  const access = await requireAccess('draft.see', { kind: 'organization' });
  if (!access) return null;
  const mayManage = may(access.roles, 'catalogue.manage');
  const { valveFamilies } = await readCatalogue(access.person.organizationId);
  return (
    <>
      <PartHead title="Your organisation’s valves" newHref={mayManage ? '/catalogue/valves/new' : null} newWords="Add a valve family" />
      {valveFamilies.length ? (
        <ValveFamilyList families={valveFamilies} mayManage={mayManage} />
      ) : (
        <NothingYet title="No valve family yet">
          Upload or type the chart of the valves you buy: Kv by setting for each size. Until then drawings have the generic ones below.
        </NothingYet>
      )}
      <div className="mt-6">
        <GenericValveTable />
      </div>
    </>
  );
}
