import type { Metadata } from 'next';
import { CommissioningLoader } from './commissioning-loader';

export const metadata: Metadata = { title: 'Commissioning' };

export default async function CommissioningPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  return <CommissioningLoader {...await params} />;
}
