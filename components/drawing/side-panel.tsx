'use client';

import { ChevronDown, ChevronUp } from 'lucide-react';
import { Tabs } from 'radix-ui';
import { classNames } from '@/components/ui/class-names';
import type { PanelPage } from './canvas-state';
import { useCanvas, useEditor, useResults } from './editor-context';
import { FaultsList } from './faults-list';
import { Inspector } from './inspector/inspector';
import { SettingsTable } from './settings-table';

const tab =
  'min-h-10 border-b-2 border-transparent px-1 text-sm font-semibold text-quiet data-[state=active]:border-brass data-[state=active]:text-ink pointer-coarse:min-h-11';

/** Beside the canvas, on narrow screens a sheet from below: properties, settings, faults. */
export function SidePanel() {
  const { canvasStore } = useEditor();
  const page = useCanvas((state) => state.page);
  const isOpen = useCanvas((state) => state.isSheetOpen);
  const { faults } = useResults();
  return (
    <aside
      aria-label="Figures"
      className={classNames(
        'bg-sheet z-20 flex shrink-0 flex-col border-t md:w-[21rem] md:border-t-0 md:border-l',
        'max-md:absolute max-md:inset-x-0 max-md:bottom-0 max-md:shadow-[0_-4px_16px_rgb(0_0_0/0.12)]',
        isOpen ? 'max-md:max-h-[62dvh]' : 'max-md:max-h-12',
      )}
    >
      <Tabs.Root
        value={page}
        onValueChange={(value) => canvasStore.setState({ page: value as PanelPage, isSheetOpen: true })}
        className="flex min-h-0 flex-1 flex-col"
      >
        <div className="flex shrink-0 items-center border-b px-4">
          <Tabs.List aria-label="Figures" className="flex flex-1 gap-4">
            <Tabs.Trigger value="properties" className={tab}>
              Properties
            </Tabs.Trigger>
            <Tabs.Trigger value="settings" className={tab}>
              Settings
            </Tabs.Trigger>
            <Tabs.Trigger value="faults" className={tab}>
              Faults{faults.length > 0 && <span className="figures ml-1 text-xs">{faults.length}</span>}
            </Tabs.Trigger>
          </Tabs.List>
          <button
            type="button"
            aria-expanded={isOpen}
            aria-label={isOpen ? 'Close the sheet' : 'Open the sheet'}
            className="text-quiet -mr-2 inline-flex size-11 items-center justify-center md:hidden"
            onClick={() => canvasStore.setState({ isSheetOpen: !isOpen })}
          >
            {isOpen ? <ChevronDown size={20} /> : <ChevronUp size={20} />}
          </button>
        </div>
        {(['properties', 'settings', 'faults'] as const).map((value) => (
          <Tabs.Content
            key={value}
            value={value}
            className={classNames('min-h-0 flex-1 overflow-y-auto px-4 py-3', !isOpen && 'max-md:hidden')}
          >
            {value === 'properties' ? <Inspector /> : value === 'settings' ? <SettingsTable /> : <FaultsList />}
          </Tabs.Content>
        ))}
      </Tabs.Root>
    </aside>
  );
}
