import type { Working } from '@/lib/network/working';

/** "Show working": how each figure came about, with its inputs and its source. */
export function WorkingList({ workings, title = 'Show working' }: { workings: Working[]; title?: string }) {
  if (workings.length === 0) return null;
  return (
    <details className="mt-3 text-sm">
      <summary className="text-petrol min-h-6 w-fit font-semibold">{title}</summary>
      {workings.map((working) => (
        <article key={working.title} className="bg-paper mt-2 rounded border p-3">
          <h4 className="font-semibold">{working.title}</h4>
          <p className="mt-1">{working.formula}</p>
          <p className="figures mt-1 text-xs break-words">
            = {working.numbers}
            <br />= <strong>{working.result}</strong>
          </p>
          <dl className="mt-2 text-xs">
            {working.inputs.map(({ name, value }) => (
              <div key={name} className="flex justify-between gap-3 border-t py-0.5">
                <dt>{name}</dt>
                <dd className="figures whitespace-nowrap">{value}</dd>
              </div>
            ))}
          </dl>
          <p className="text-quiet mt-2 text-xs">{working.source}</p>
        </article>
      ))}
    </details>
  );
}
