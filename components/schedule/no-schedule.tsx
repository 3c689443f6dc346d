import Link from 'next/link';

interface NoScheduleProps {
  title: string;
  drawingHref: string | null;
  /** For one who may draw. */
  importHref?: string;
  children: string;
}

/** Before there is anything to list for this person. */
export function NoSchedule({ title, drawingHref, importHref, children }: NoScheduleProps) {
  return (
    <div className="mx-auto flex max-w-md flex-1 flex-col items-start gap-3 py-16">
      <h1>{title}</h1>
      <p className="text-quiet">{children}</p>
      {importHref && <Link href={importHref}>Bring in a schedule</Link>}
      {drawingHref && <Link href={drawingHref}>Open the drawing</Link>}
    </div>
  );
}
