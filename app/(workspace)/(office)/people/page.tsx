import type { Metadata } from 'next';
import { InviteDialog } from '@/components/people/invite-dialog';
import { PeopleList } from '@/components/people/people-list';
import { NotAllowed } from '@/components/shell/not-allowed';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { listPeople } from '@/lib/server/people/list-people';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const access = await requireAccess('people.see', { kind: 'organization' });
  if (!access) return <NotAllowed>The list of people is for designers and administrators.</NotAllowed>;
  const mayManage = may(access.roles, 'people.manage');
  return (
    <>
      <div className="mb-4 flex flex-wrap items-end justify-between gap-3">
        <div>
          <h1>People</h1>
          <p className="text-quiet">{access.person.organizationName}</p>
        </div>
        {mayManage && <InviteDialog />}
      </div>
      <PeopleList people={await listPeople(access.person.organizationId)} mayManage={mayManage} />
    </>
  );
}
