import { Moment } from '@/components/ui/moment';
import { Sheet } from '@/components/ui/sheet';
import type { ReportBody } from '@/lib/api/reports';
import { DownloadButton } from './download-button';

/** Accepted reports, newest first: the files that never change, each with the SHA-256 to check it by. */
export function AcceptedReports({ accepted, loopId }: { accepted: ReportBody['accepted']; loopId: string }) {
  if (accepted.length === 0) return null;
  return (
    <Sheet title="Accepted reports">
      <ul className="divide-y">
        {accepted.map(({ number, sha256, acceptedAt }) => (
          <li key={number} className="flex break-inside-avoid flex-col gap-2 py-3">
            <div>
              <span className="font-semibold">Report {number}</span>
              <span className="text-quiet block text-sm">
                accepted <Moment at={acceptedAt} />
              </span>
            </div>
            <DownloadButton loopId={loopId} number={number} />
            <p className="text-quiet text-xs">
              SHA-256 of the file <span className="figures block break-all">{sha256}</span>
            </p>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
