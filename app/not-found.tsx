import Link from 'next/link';
import { Mark } from '@/components/shell/mark';

export default function NotFound() {
  return (
    <main className="mx-auto flex min-h-dvh max-w-md flex-col justify-center gap-4 px-6">
      <Mark />
      <h1>There is nothing here</h1>
      <p className="text-quiet">The address is mistyped, what it named is gone, or it is not yours to see.</p>
      <Link href="/projects">All projects</Link>
    </main>
  );
}
