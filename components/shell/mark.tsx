import Link from 'next/link';

/** Two even lines: supply above, return below. */
export function Mark() {
  return (
    <Link href="/projects" className="text-ink flex items-center gap-2 no-underline" aria-label="Evenhead, all projects">
      <svg width="18" height="12" viewBox="0 0 18 12" aria-hidden>
        <path d="M0 2H18" stroke="var(--petrol)" strokeWidth="2" />
        <path d="M0 10H18" stroke="var(--brass)" strokeWidth="2" />
      </svg>
      <span className="text-lg font-bold tracking-tight">Evenhead</span>
    </Link>
  );
}
