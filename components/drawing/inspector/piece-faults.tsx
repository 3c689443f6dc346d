'use client';

import { useResults } from '../editor-context';

/** The faults that stand at one place. */
export function PieceFaults({ id }: { id: string }) {
  const faults = useResults().faults.filter(({ place }) => place.id === id);
  if (faults.length === 0) return null;
  return (
    <ul className="border-l-high mb-2 border-l-4 pl-2 text-sm">
      {faults.map(({ message, severity }, i) => (
        <li key={i} className={severity === 'error' ? 'text-high' : 'text-brass'}>
          {severity === 'error' ? '▴' : '△'} {message}
        </li>
      ))}
    </ul>
  );
}
