import Link from 'next/link';

export default function NotFound() {
  return (
    <div className="flex max-w-md flex-col gap-3 py-10">
      <h1>There is nothing here</h1>
      <p className="text-quiet">The address is mistyped, what it named is gone, or it is not yours to see.</p>
      <Link href="/projects">All projects</Link>
    </div>
  );
}
