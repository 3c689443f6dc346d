'use client';

import { X } from 'lucide-react';
import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { classNames } from './class-names';

interface DialogProps {
  isOpen: boolean;
  onClose: () => void;
  title: string;
  description?: ReactNode;
  isWide?: boolean;
  children: ReactNode;
}

/** A sheet over the page; Escape and a press outside close it, the focus stays inside and goes back afterwards. */
export function Dialog({ isOpen, onClose, title, description, isWide, children }: DialogProps) {
  return (
    <Radix.Root open={isOpen} onOpenChange={(open) => !open && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/40" />
        <Radix.Content
          aria-describedby={description ? undefined : ''}
          className={classNames(
            'bg-sheet text-ink fixed top-1/2 left-1/2 z-50 max-h-[90dvh] w-[calc(100vw-1.5rem)] -translate-x-1/2 -translate-y-1/2 overflow-auto rounded border p-5 shadow-lg',
            isWide ? 'max-w-4xl' : 'max-w-lg',
          )}
        >
          <div className="flex items-start justify-between gap-4">
            <Radix.Title asChild>
              <h2>{title}</h2>
            </Radix.Title>
            <Radix.Close className="text-quiet hover:text-ink -m-2 p-2" aria-label="Close">
              <X size={18} />
            </Radix.Close>
          </div>
          {description && <Radix.Description className="text-quiet mt-1 text-sm">{description}</Radix.Description>}
          <div className="mt-4">{children}</div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
