import type { Metadata } from 'next';
import { CommissioningLoader } from '../../commissioning-loader';

export const metadata: Metadata = { title: 'Station' };

export default async function StationPage({ params }: { params: Promise<{ projectId: string; loopId: string; stationId: string }> }) {
  return <CommissioningLoader {...await params} />;
}
