import type { Metadata } from 'next';
import { FittingTable } from '@/components/catalogue/fitting-table';
import { TeeTable } from '@/components/catalogue/tee-table';

export const metadata: Metadata = { title: 'Fittings' };

export default function FittingsPage() {
  return (
    <div className="flex flex-col gap-5">
      <FittingTable />
      <TeeTable />
    </div>
  );
}
