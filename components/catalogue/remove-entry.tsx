'use client';

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { toast } from 'sonner';
import { catalogueQuery } from '@/lib/client/catalogue';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Notice } from '../ui/notice';

/** Takes an entry out of the catalogue, after a question. */
export function RemoveEntry({ name, onRemove }: { name: string; onRemove: () => Promise<unknown> }) {
  const router = useRouter();
  const queries = useQueryClient();
  const [isOpen, setOpen] = useState(false);
  const remove = useMutation({
    mutationFn: onRemove,
    onSuccess: async () => {
      setOpen(false);
      toast(`${name} is no longer in the catalogue`);
      await queries.invalidateQueries(catalogueQuery);
      router.refresh();
    },
  });
  return (
    <>
      <Button look="quiet" size="small" onClick={() => setOpen(true)} aria-label={`Remove ${name}`}>
        Remove
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title={`Remove ${name}?`}
        description="Drawings and issued revisions keep the figures they took. Nobody can choose it any more; what it was stays in the record of activity."
      >
        {remove.error && (
          <div className="mb-4">
            <Notice tone="high" title={remove.error.message} />
          </div>
        )}
        <div className="flex justify-end gap-2">
          <Button look="quiet" onClick={() => setOpen(false)}>
            Keep it
          </Button>
          <Button look="danger" onClick={() => remove.mutate()} isPending={remove.isPending} pendingText="Removing…">
            Remove
          </Button>
        </div>
      </Dialog>
    </>
  );
}
