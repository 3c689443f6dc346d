import Link from 'next/link';

/** Before there is anything to hand over. */
export function NoReport({ drawingHref }: { drawingHref: string | null }) {
  return (
    <div className="mx-auto flex max-w-md flex-col items-start gap-3 py-16">
      <h1>No report yet</h1>
      <p className="text-quiet">
        The report is made of an issued revision and what is measured under it. None is issued: the designer issues one on the drawing, the
        technician measures it, and it appears here as it grows.
      </p>
      {drawingHref && <Link href={drawingHref}>Open the drawing</Link>}
    </div>
  );
}
