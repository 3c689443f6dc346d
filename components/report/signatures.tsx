import { Moment } from '@/components/ui/moment';
import { Sheet } from '@/components/ui/sheet';
import type { LoopState } from '@/lib/api/loops';
import type { Meaning, Signature } from '@/lib/api/reports';
import { ShortSha256 } from './sha256-text';
import { meaningWords, nextWords } from './signing-words';

const marks: Record<Meaning, string> = {
  submitted: 'bg-petrol',
  reviewed: 'bg-petrol',
  returned: 'bg-sheet border-2 border-high',
  accepted: 'bg-brass',
};

/** Who signed what and when, oldest first, and who is next. */
export function Signatures({ signatures, state, contentSha256 }: { signatures: Signature[]; state: LoopState; contentSha256: string }) {
  return (
    <Sheet title="Signatures">
      <ol className="relative ml-1.5 border-l pl-5">
        {signatures.map((signature, i) => (
          <li key={signature.id} className="relative break-inside-avoid pb-4">
            <span aria-hidden className={`absolute top-1.5 -left-[26px] size-2.5 rounded-full ${marks[signature.meaning]}`} />
            {signature.submission > 1 && signatures[i - 1]?.submission !== signature.submission && (
              <span className="text-quiet block text-xs">Submission {signature.submission}</span>
            )}
            <span className={signature.meaning === 'returned' ? 'text-high font-semibold' : 'font-semibold'}>
              {meaningWords[signature.meaning]}
            </span>{' '}
            by {signature.personName}
            <span className="text-quiet block text-sm">
              as {signature.personRole}, <Moment at={signature.signedAt} />
            </span>
            {signature.note && <q className="mt-1 block text-sm whitespace-pre-wrap">{signature.note}</q>}
            <span className="text-quiet block text-xs">
              SHA-256 <ShortSha256 sha256={signature.contentSha256} />
              {signature.contentSha256 !== contentSha256 && ', of an earlier content'}
            </span>
          </li>
        ))}
        <li className="text-quiet relative text-sm">
          <span aria-hidden className="bg-sheet absolute top-1.5 -left-[26px] size-2.5 rounded-full border-2" />
          {nextWords[state]}
        </li>
      </ol>
    </Sheet>
  );
}
