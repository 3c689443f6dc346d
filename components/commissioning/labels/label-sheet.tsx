import Link from 'next/link';
import { PrintButton } from './print-button';

interface LabelSheetProps {
  loop: string;
  project: string;
  /** `qr`: an SVG that we made ourselves of the station's address. */
  labels: { id: string; tag: string; place: string; qr: string }[];
  backHref: string;
}

/** Labels in three columns, as they go through a printer on A4. */
export function LabelSheet({ loop, project, labels, backHref }: LabelSheetProps) {
  return (
    <main className="mx-auto flex w-full max-w-5xl flex-1 flex-col gap-4 p-4 lg:py-6 print:max-w-none print:p-0">
      <div className="flex flex-wrap items-end justify-between gap-3 print:hidden">
        <div>
          <h1>Labels</h1>
          <p className="text-quiet">One for each station. A tablet’s camera opens the station from it; signing in is asked for as usual.</p>
        </div>
        <div className="flex items-center gap-4">
          <Link href={backHref}>All stations</Link>
          <PrintButton />
        </div>
      </div>
      <ul className="grid grid-cols-1 gap-3 sm:grid-cols-2 lg:grid-cols-3 print:grid-cols-3 print:gap-2">
        {labels.map(({ id, tag, place, qr }) => (
          <li key={id} className="flex break-inside-avoid items-center gap-3 rounded border bg-white p-3 text-black">
            <span aria-hidden className="size-24 shrink-0 [&>svg]:size-full" dangerouslySetInnerHTML={{ __html: qr }} />
            <span className="min-w-0">
              <strong className="block truncate text-xl">{tag}</strong>
              <span className="block truncate text-sm">{place}</span>
              <span className="block truncate text-xs">
                {project}, {loop}
              </span>
            </span>
          </li>
        ))}
      </ul>
    </main>
  );
}
