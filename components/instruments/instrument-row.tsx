'use client';

import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { toast } from 'sonner';
import type { Instrument } from '@/lib/api/commissioning';
import { changeInstrument } from '@/lib/client/instruments';
import { Button } from '../ui/button';
import { CertificatesDialog } from './certificates-dialog';
import { dayWords, kindWords, unitOfKind } from './instrument-words';

interface InstrumentRowProps {
  instrument: Instrument;
  isOverdue: boolean;
  /** Null where the person only reads. */
  onChange: (() => void) | null;
}

export function InstrumentRow({ instrument, isOverdue, onChange }: InstrumentRowProps) {
  const router = useRouter();
  const { id, ...input } = instrument;
  const { isRetired, calibrationDueOn, calibratedOn, serial, name, kind } = input;
  const retire = useMutation({
    mutationFn: () => changeInstrument(id, { ...input, isRetired: !isRetired }),
    onSuccess: () => {
      toast(isRetired ? `${serial} is in use again` : `${serial} is retired; what was read with it stays`);
      router.refresh();
    },
    onError: (error) => toast.error(error.message),
  });
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-1 px-4 py-3">
      <div className="grid min-w-0 flex-1 basis-80 gap-x-4 gap-y-0.5 sm:grid-cols-[minmax(0,2.2fr)_minmax(0,1.6fr)_minmax(0,1.7fr)] sm:items-center">
        <p className="min-w-0">
          <strong className="block truncate">{name}</strong>
          <span className="text-quiet text-sm">
            {serial} · {kindWords[kind]}
          </span>
        </p>
        <p className="text-sm">
          <span className="figures">{rangeWords(instrument)}</span> <span className="text-quiet">{unitOfKind[kind]}</span>
          <span className="text-quiet block">
            ±<span className="figures">{accuracyWords(instrument)}</span>
          </span>
        </p>
        <p className="text-sm">
          {calibrationDueOn === null ? (
            <span className="text-brass font-semibold">No due date recorded</span>
          ) : isOverdue ? (
            <strong className="text-high">▴ Overdue since {dayWords(calibrationDueOn)}</strong>
          ) : (
            <span>● Due {dayWords(calibrationDueOn)}</span>
          )}
          {calibratedOn && <span className="text-quiet block">calibrated {dayWords(calibratedOn)}</span>}
        </p>
      </div>
      <div className="flex gap-1 max-sm:-ml-4">
        <CertificatesDialog instrument={instrument} mayAdd={onChange !== null} />
        {onChange && (
          <>
            <Button look="quiet" onClick={onChange} aria-label={`Change ${serial}`}>
              Change
            </Button>
            <Button
              look="quiet"
              onClick={() => retire.mutate()}
              isPending={retire.isPending}
              aria-label={isRetired ? `Take ${serial} back into use` : `Retire ${serial}`}
            >
              {isRetired ? 'Take back' : 'Retire'}
            </Button>
          </>
        )}
      </div>
    </li>
  );
}

const rangeWords = ({ rangeLow, rangeHigh }: Instrument): string =>
  rangeLow === null && rangeHigh === null ? 'no range recorded,' : `${rangeLow ?? 0} to ${rangeHigh ?? '…'}`;

const accuracyWords = ({ accuracyPercent, accuracyAbsolute, kind }: Instrument): string =>
  [accuracyPercent > 0 && `${accuracyPercent} % of reading`, accuracyAbsolute > 0 && `${accuracyAbsolute} ${unitOfKind[kind]}`]
    .filter(Boolean)
    .join(' + ') || '0';
