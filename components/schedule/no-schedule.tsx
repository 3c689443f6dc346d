import Link from 'next/link';

/** Before there is anything to list for this person. */
export function NoSchedule({ title, drawingHref, children }: { title: string; drawingHref: string | null; children: string }) {
  return (
    <div className="mx-auto flex max-w-md flex-col items-start gap-3 py-16">
      <h1>{title}</h1>
      <p className="text-quiet">{children}</p>
      {drawingHref && <Link href={drawingHref}>Open the drawing</Link>}
    </div>
  );
}
