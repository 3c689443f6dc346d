'use client';

import { classNames } from '@/components/ui/class-names';
import { useEditor, useResults } from './editor-context';
import { useShowPlace } from './show-place';

/** What is wrong with the drawing; each entry selects its place and brings it into view. */
export function FaultsList() {
  const { faults } = useResults();
  const { canvasStore } = useEditor();
  const show = useShowPlace();
  if (faults.length === 0) return <p className="text-quiet py-4 text-sm">● No faults: the drawing can be solved as it stands.</p>;
  const errors = faults.filter(({ severity }) => severity === 'error').length;
  return (
    <>
      <p className="text-quiet pb-2 text-sm">
        {errors ? `${errors} to be put right before the loop can be solved.` : 'The loop can be solved; look at these.'}
      </p>
      <ul className="border-t">
        {faults.map(({ code, severity, message, place }, i) => (
          <li key={`${code}${place.id}${i}`} className="border-b">
            <button
              type="button"
              className="hover:bg-well flex w-full gap-2 px-1 py-2 text-left text-sm"
              onClick={() => {
                show(place);
                canvasStore.setState({ isSheetOpen: false });
              }}
            >
              <span aria-hidden className={severity === 'error' ? 'text-high' : 'text-brass'}>
                {severity === 'error' ? '▴' : '△'}
              </span>
              <span>
                <span className={classNames('font-semibold', severity === 'error' ? 'text-high' : 'text-brass')}>
                  {severity === 'error' ? 'Fault' : 'Warning'}:{' '}
                </span>
                {message}
              </span>
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
