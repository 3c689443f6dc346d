import Link from 'next/link';
import { Notice } from '../ui/notice';

/** A page that exists but is not for this person's role. */
export function NotAllowed({ children }: { children: string }) {
  return (
    <div className="flex max-w-xl flex-col gap-4">
      <h1>Not for your role</h1>
      <Notice tone="brass">{children}</Notice>
      <Link href="/projects">All projects</Link>
    </div>
  );
}
