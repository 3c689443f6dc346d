import { TriangleAlert } from 'lucide-react';
import { cautions, cautionSentence } from '@/lib/commissioning/cautions';

/** The dangers of the plant, before a person is sent to it. */
export function CautionsBox() {
  return (
    <details className="border-l-brass group bg-sheet rounded border border-l-4">
      <summary className="flex min-h-12 items-center gap-3 px-4 py-2 font-semibold">
        <TriangleAlert size={18} aria-hidden className="text-brass shrink-0" />
        <span>
          Before you go to the plant{' '}
          <span className="text-quiet font-normal">
            hot water and pressure, electrical isolation, chemicals, height; the site’s permit decides
          </span>
        </span>
        <span aria-hidden className="text-petrol ml-auto text-sm whitespace-nowrap group-open:hidden">
          Read
        </span>
      </summary>
      <div className="px-4 pb-4">
        <ul className="list-disc space-y-1 pl-5">
          {cautions.map((caution) => (
            <li key={caution}>{caution}</li>
          ))}
        </ul>
        <p className="mt-3 font-semibold">{cautionSentence}</p>
      </div>
    </details>
  );
}
