import { classNames } from './class-names';

const marks = {
  low: { sign: '▾', says: 'low', tone: 'text-low' },
  within: { sign: '●', says: 'within tolerance', tone: 'text-ink' },
  high: { sign: '▴', says: 'high', tone: 'text-high' },
} as const;

/** Per cent of design with its sign: colour never carries the meaning alone. */
export function Deviation({ percent, verdict, className }: { percent: number; verdict: keyof typeof marks; className?: string }) {
  const mark = marks[verdict];
  return (
    <span className={classNames('figures whitespace-nowrap', mark.tone, className)}>
      <span aria-hidden className="mr-1 text-[1.05em]">
        {mark.sign}
      </span>
      <span className="sr-only">{mark.says} </span>
      {percent.toFixed(1)}
    </span>
  );
}
