import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { DrawingEditor } from '@/components/drawing/drawing-editor';
import { DrawingViewer } from '@/components/drawing/drawing-viewer';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readDraft } from '@/lib/server/loops/read-draft';
import { readLoop } from '@/lib/server/loops/read-loop';
import { readRevision } from '@/lib/server/revisions/read-revision';

export const metadata: Metadata = { title: 'Drawing' };

/** Designers edit the draft; everyone else reads the newest revision. */
export default async function DrawingPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const { organizationId, id: personId } = access.person;
  const loop = await readLoop(access, loopId);
  const revision = loop.revision ? await readRevision(organizationId, loopId, loop.revision.number) : null;

  return (
    // What is drawn takes the room that the header leaves, and never makes the page longer.
    <main className="relative min-h-96 flex-1 *:absolute *:inset-0">
      <h1 className="sr-only">Drawing of {loop.name}</h1>
      {may(access.roles, 'drawing.edit') ? (
        <DrawingEditor
          // After an issue the page comes again with the new revision; the editor and its history stay.
          key={loopId}
          loop={loop}
          personId={personId}
          loaded={await readDraft(organizationId, loopId)}
          issued={revision && { number: revision.number, drawing: revision.drawing }}
        />
      ) : revision ? (
        <DrawingViewer
          key={revision.id}
          drawing={revision.drawing}
          band={loop.band}
          names={{ loop: loop.name, project: loop.project.name }}
          revision={revision}
        />
      ) : may(access.roles, 'draft.see') ? (
        <DrawingViewer
          drawing={(await readDraft(organizationId, loopId)).drawing}
          band={loop.band}
          names={{ loop: loop.name, project: loop.project.name }}
          revision={null}
        />
      ) : (
        <NotIssued name={loop.name} />
      )}
    </main>
  );
}

const NotIssued = ({ name }: { name: string }) => (
  <div className="m-auto max-w-md p-6 text-center">
    <h2>{name} has not been issued yet</h2>
    <p className="text-quiet mt-1">Its drawing appears here as soon as the designer issues the first revision.</p>
  </div>
);
