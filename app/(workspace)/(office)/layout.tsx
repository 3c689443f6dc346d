import type { ReactNode } from 'react';
import { AccountMenu } from '@/components/shell/account-menu';
import { Mark } from '@/components/shell/mark';
import { NavLink } from '@/components/shell/nav-link';
import { may } from '@/lib/api/permissions';
import { rolesInOrganization } from '@/lib/server/auth/person';
import { requirePerson } from '@/lib/server/auth/require-person';

export default async function OfficeLayout({ children }: { children: ReactNode }) {
  const person = await requirePerson();
  return (
    <>
      <header className="bg-sheet sticky top-0 z-30 flex min-h-14 items-stretch gap-x-6 border-b px-4 print:hidden">
        <div className="flex items-center">
          <Mark />
        </div>
        <nav aria-label="Pages" className="flex min-w-0 flex-1 items-stretch gap-5 overflow-x-auto">
          <NavLink href="/projects">Projects</NavLink>
          <NavLink href="/instruments">Instruments</NavLink>
          {may(rolesInOrganization(person), 'draft.see') && <NavLink href="/catalogue">Catalogue</NavLink>}
          {may(rolesInOrganization(person), 'people.see') && <NavLink href="/people">People</NavLink>}
          <NavLink href="/activity">Activity</NavLink>
        </nav>
        <div className="flex items-center">
          <AccountMenu name={person.name} organizationName={person.organizationName} />
        </div>
      </header>
      <main className="mx-auto w-full max-w-6xl px-4 py-6">{children}</main>
    </>
  );
}
