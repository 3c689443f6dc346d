'use client';

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { FileText } from 'lucide-react';
import { useState } from 'react';
import type { Instrument } from '@/lib/api/commissioning';
import { addCertificate, certificatesQuery } from '@/lib/client/instruments';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Moment } from '../ui/moment';

/** The calibration certificates of a meter, and the way to add the newest; earlier ones stay. */
export function CertificatesDialog({ instrument, mayAdd }: { instrument: Instrument; mayAdd: boolean }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="quiet" onClick={() => setOpen(true)} aria-label={`Certificates of ${instrument.serial}`}>
        Certificates
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title={`Certificates of ${instrument.serial}`}
        description="PDF, JPEG or PNG, at most 10 MB."
      >
        <Certificates instrument={instrument} mayAdd={mayAdd} />
      </Dialog>
    </>
  );
}

function Certificates({ instrument, mayAdd }: { instrument: Instrument; mayAdd: boolean }) {
  const queries = useQueryClient();
  const query = certificatesQuery(instrument.id);
  const { data, error } = useQuery(query);
  const add = useMutation({
    mutationFn: (file: File) => addCertificate(instrument.id, file),
    onSuccess: () => queries.invalidateQueries(query),
  });
  const trouble = add.error ?? error;
  return (
    <div className="flex flex-col gap-4">
      {data?.length === 0 && <p className="text-quiet">No certificate is kept for this meter yet.</p>}
      <ul className="divide-y">
        {data?.map((certificate) => (
          <li key={certificate.id} className="flex items-center gap-3 py-2">
            <FileText size={18} aria-hidden className="text-quiet shrink-0" />
            <a href={`/api/instruments/${instrument.id}/certificates/${certificate.id}`} className="min-w-0 flex-1 truncate font-semibold">
              {certificate.fileName}
            </a>
            <span className="text-quiet text-sm">
              {certificate.uploadedBy}, <Moment at={certificate.uploadedAt} />
            </span>
          </li>
        ))}
      </ul>
      {trouble && (
        <p role="alert" className="text-high">
          ▴ {trouble.message}
        </p>
      )}
      {mayAdd && (
        <label className="flex flex-col gap-1 text-sm font-semibold">
          Add a certificate
          <input
            type="file"
            accept="application/pdf,image/jpeg,image/png"
            disabled={add.isPending}
            className="file:bg-well file:text-ink font-normal file:mr-3 file:h-10 file:rounded file:border file:px-3"
            onChange={({ target }) => {
              const [file] = target.files ?? [];
              if (file) add.mutate(file);
              target.value = '';
            }}
          />
        </label>
      )}
    </div>
  );
}
