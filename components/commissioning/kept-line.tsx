import { KeptStatus } from '../shell/kept-status';
import type { Commissioning } from './commissioning-context';

/** Always there: what is kept on this tablet alone, and the revision that is measured against. */
export function KeptLine({ commissioning: { body, base } }: { commissioning: Commissioning }) {
  return (
    <KeptStatus signInPath={base}>
      {body.revision && <span className="text-quiet ml-auto hidden sm:inline">revision {body.revision.number}</span>}
    </KeptStatus>
  );
}
