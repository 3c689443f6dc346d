import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { commissioningViews } from '@/components/commissioning/views';
import { CommissioningLoader } from '../commissioning-loader';

export const metadata: Metadata = { title: 'Commissioning' };

/** A part of the commissioning opened by its address; within the page they are gone between without the server. */
export default async function CommissioningViewPage({ params }: { params: Promise<{ projectId: string; loopId: string; view: string }> }) {
  const { view, ...ids } = await params;
  if (view === 'stations' || !commissioningViews.some((it) => it === view)) notFound();
  return <CommissioningLoader {...ids} />;
}
