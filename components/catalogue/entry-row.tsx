'use client';

import { ChevronRight } from 'lucide-react';
import Link from 'next/link';
import { useState, type ReactNode } from 'react';
import { buttonClass } from '../ui/button';
import { classNames } from '../ui/class-names';
import { Moment } from '../ui/moment';
import { RemoveEntry } from './remove-entry';

interface EntryRowProps {
  entry: { name: string; source: string; version: number; changedBy: string; changedAt: string };
  /** What it is in figures, in a line. */
  summary: ReactNode;
  /** Where it is changed; null for a person who only reads. */
  changeHref: string | null;
  onRemove: () => Promise<unknown>;
  children: ReactNode;
}

/** An entry of the organisation's own catalogue; opened it shows its figures. */
export function EntryRow({ entry, summary, changeHref, onRemove, children }: EntryRowProps) {
  const [isOpen, setOpen] = useState(false);
  const { name, source, version, changedBy, changedAt } = entry;
  return (
    <li>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1 px-4 py-3">
        <button
          type="button"
          aria-expanded={isOpen}
          onClick={() => setOpen(!isOpen)}
          className="flex min-w-0 flex-1 basis-72 items-start gap-2 text-left"
        >
          <ChevronRight size={16} aria-hidden className={classNames('text-quiet mt-1 shrink-0', isOpen && 'rotate-90')} />
          <span className="min-w-0">
            <strong className="block break-words">{name}</strong>
            <span className="text-quiet text-sm">{summary}</span>
          </span>
        </button>
        <p className="text-quiet basis-60 text-sm max-sm:pl-6">
          Version <span className="figures">{version}</span>, {changedBy}
          <br />
          <Moment at={changedAt} />
        </p>
        {changeHref && (
          <div className="flex gap-1 max-sm:pl-3">
            <Link href={changeHref} aria-label={`Change ${name}`} className={`${buttonClass('quiet', 'small')} no-underline`}>
              Change
            </Link>
            <RemoveEntry name={name} onRemove={onRemove} />
          </div>
        )}
      </div>
      {isOpen && (
        <div className="border-t px-4 py-4">
          <p className="text-quiet mb-3 text-sm">
            <span className="text-ink font-semibold">Source:</span> {source}
          </p>
          {children}
        </div>
      )}
    </li>
  );
}
