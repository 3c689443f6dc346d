import type { ReactNode } from 'react';
import { SectionNav } from '@/components/catalogue/section-nav';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';

export default async function CatalogueLayout({ children }: { children: ReactNode }) {
  const access = await requireAccess('draft.see', { kind: 'organization' });
  if (!access) return <NotAllowed>The catalogue is for designers and administrators: they choose what goes into a drawing.</NotAllowed>;
  return (
    <>
      <h1>Catalogue</h1>
      <p className="text-quiet mb-3">A drawing takes a copy of what it chooses: a change here never reaches a loop.</p>
      <SectionNav />
      {children}
    </>
  );
}
