'use client';

import { useState } from 'react';
import type { Reading, Station } from '@/lib/api/commissioning';
import { dropAtDesignKpa } from '@/lib/commissioning/reading-flow';
import { formatQuantity } from '@/lib/units/format-quantity';
import { Button } from '../ui/button';
import { Deviation } from '../ui/deviation';
import { TextArea } from '../ui/field';
import { Figure } from '../ui/figure';
import type { Commissioning } from './commissioning-context';
import { EntryField } from './entry-field';
import { LiveResult } from './live-result';
import { MeterPicker } from './meter-picker';
import { MethodSwitch } from './method-switch';
import type { Entry } from './use-entry';
import { WorkingDialog } from './working-dialog';

interface EntryFormProps {
  commissioning: Commissioning;
  station: Station;
  entry: Entry;
  correcting: Reading | undefined;
  onKeep: () => void;
}

/** Where a reading is typed and, at each key, says what it means. */
export function EntryForm({ commissioning, station, entry, correcting, onKeep }: EntryFormProps) {
  const [isWorkingOpen, setWorkingOpen] = useState(false);
  const [hasNote, setNote] = useState(false);
  const { body } = commissioning;
  const last = commissioning.lastStanding.get(station.id);
  const isNoteShown = hasNote || entry.typed.note !== '';
  return (
    <>
      {correcting && (
        <div className="border-l-brass flex flex-wrap items-center gap-3 border-l-4 pl-3">
          <p className="flex-1">
            You put right the entry <Figure quantity="flow" si={correcting.flowLs} hasUnit className="font-bold" />. It stays in the record.
          </p>
          <Button size="touch" className="!text-base" onClick={entry.clear}>
            Leave it as it is
          </Button>
        </div>
      )}
      {entry.isCorrecting && <NoteField label="Why was the earlier entry wrong?" entry={entry} />}
      <MethodSwitch method={entry.typed.method} possible={entry.possible} onChoose={entry.chooseMethod} />
      <div className="flex gap-2 sm:gap-3">
        {entry.fields.map((field) => (
          <EntryField key={field} entry={entry} field={field} onEnter={onKeep} />
        ))}
      </div>
      {entry.typed.method === 'valve-drop' && <Target station={station} entry={entry} densityKgM3={body.densityKgM3!} />}
      <LiveResult entry={entry} />
      <div className="-my-1.5 flex flex-wrap items-center gap-x-6">
        <p>
          <span className="text-quiet">Last round </span>
          {last ? (
            <>
              <Figure quantity="flow" si={last.flowLs} hasUnit className="font-bold" />{' '}
              <Deviation percent={last.percentOfDesign} verdict={last.verdict} /> %
            </>
          ) : (
            <span className="text-quiet">not measured</span>
          )}
        </p>
        <span className="ml-auto flex">
          {!isNoteShown && !entry.isCorrecting && (
            <Button size="touch" look="quiet" className="!px-3 !text-base" onClick={() => setNote(true)}>
              Note
            </Button>
          )}
          <Button size="touch" look="quiet" className="!px-3 !text-base" onClick={() => setWorkingOpen(true)}>
            Show working
          </Button>
        </span>
      </div>
      <MeterPicker entry={entry} />
      {isNoteShown && !entry.isCorrecting && <NoteField label="Note" entry={entry} />}
      <WorkingDialog
        entry={entry}
        station={station}
        fluid={{ densityKgM3: body.densityKgM3!, specificHeatKJKgK: body.specificHeatKJKgK! }}
        isOpen={isWorkingOpen}
        onClose={() => setWorkingOpen(false)}
      />
    </>
  );
}

const NoteField = ({ label, entry }: { label: string; entry: Entry }) => (
  <TextArea label={label} rows={2} maxLength={1000} value={entry.typed.note} onChange={(event) => entry.type('note', event.target.value)} />
);

/** What the meter would show at the typed setting if the flow were right; before a setting is typed, the scheduled one at a press. */
function Target({ station, entry, densityKgM3 }: { station: Station; entry: Entry; densityKgM3: number }) {
  const turns = entry.siOf('setting');
  if (turns === null) {
    if (station.settingTurns === null) return null;
    const text = formatQuantity('setting', station.settingTurns, 'turns');
    return (
      <Button size="touch" look="quiet" className="-my-2 self-start !px-2 !text-base" onClick={() => entry.type('setting', text)}>
        It stands as scheduled, at {text} turns
      </Button>
    );
  }
  const dropKpa = dropAtDesignKpa({ kvTable: station.kvTable, settingTurns: turns, densityKgM3 }, station.designFlowLs);
  return dropKpa === null ? null : (
    <p className="text-quiet -my-1">
      At this setting, design flow would show <Figure quantity="pressure" si={dropKpa} hasUnit className="text-ink" />.
    </p>
  );
}
