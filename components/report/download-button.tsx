'use client';

import { useMutation } from '@tanstack/react-query';
import { Download } from 'lucide-react';
import { downloadWorkbook } from '@/lib/client/reports';
import { Button } from '../ui/button';

/** Makes or fetches the workbook and hands it over; says when it could not. */
export function DownloadButton({ loopId, number }: { loopId: string; number?: number }) {
  const download = useMutation({ mutationFn: () => downloadWorkbook(loopId, number) });
  return (
    <div className="flex flex-col gap-1 print:hidden">
      <Button
        size={number ? 'small' : 'medium'}
        isPending={download.isPending}
        pendingText="Making the workbook…"
        onClick={() => download.mutate()}
      >
        <Download size={16} aria-hidden /> {number ? `Download report ${number}` : 'Download workbook'}
      </Button>
      {download.error && (
        <p role="alert" className="text-high max-w-xs text-sm">
          ▴ {download.error.message}
        </p>
      )}
    </div>
  );
}
