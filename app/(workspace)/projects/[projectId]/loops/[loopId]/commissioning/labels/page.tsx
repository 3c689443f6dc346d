import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { toString as qrCode } from 'qrcode';
import { LabelSheet } from '@/components/commissioning/labels/label-sheet';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCommissioning } from '@/lib/server/commissioning/read-commissioning';
import { readLoop } from '@/lib/server/loops/read-loop';

export const metadata: Metadata = { title: 'Labels' };

/** A label for each station with its QR code, to be printed and put up: a tablet's camera opens the station from it. */
export default async function LabelsPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const [loop, { stations }] = await Promise.all([readLoop(access, loopId), readCommissioning(access, loopId)]);
  const base = `/projects/${projectId}/loops/${loopId}/commissioning`;
  const labels = await Promise.all(
    stations.map(async ({ id, tag, storey, room }) => {
      const address = `${process.env.PUBLIC_URL ?? ''}${base}/stations/${id}`;
      return { id, tag, place: [storey, room].filter(Boolean).join(', '), qr: await qrCode(address, { type: 'svg', margin: 0 }) };
    }),
  );
  return <LabelSheet loop={loop.name} project={loop.project.name} labels={labels} backHref={base} />;
}
