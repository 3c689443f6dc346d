'use client';

import { Search } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import { inputClass } from '../ui/field';

/** Searches as one types; what is searched for stands in the address, so that it can be shared and gone back to. */
export function ProjectSearch({ text }: { text: string }) {
  const router = useRouter();
  const [isSearching, startSearch] = useTransition();
  const search = (wanted: string) =>
    startSearch(() => router.replace(wanted.trim() ? `/projects?q=${encodeURIComponent(wanted.trim())}` : '/projects', { scroll: false }));
  return (
    <form role="search" action="/projects" className="relative min-w-0 flex-1 sm:max-w-sm" aria-busy={isSearching}>
      <Search size={16} aria-hidden className="text-quiet absolute top-3 left-2.5" />
      <input
        type="search"
        name="q"
        defaultValue={text}
        onChange={(event) => search(event.target.value)}
        aria-label="Search projects"
        placeholder="Project, client, building or loop"
        className={`${inputClass} bg-sheet h-10 pl-8`}
      />
    </form>
  );
}
