'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo, useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextField } from '@/components/ui/field';
import { equipmentKinds, type EquipmentKind, type TagRules } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/fault';
import { renumberTags, tagChanges } from '@/lib/network/renumber-tags';
import { ruleFault, usualRule } from '@/lib/network/tags';
import { useCanvas, useEditor } from '../editor-context';

const rule = z.string().superRefine((text, context) => {
  const fault = ruleFault(text);
  if (fault) context.addIssue({ code: 'custom', message: fault });
});
const schema = z.object({ rules: z.partialRecord(z.enum(equipmentKinds), rule), scope: z.enum(['all', 'selection']) });
type Values = z.infer<typeof schema>;

const SHOWN = 200;

/** Rules for tags by kind, and what they would change; nothing is renumbered before it is said so. */
export function TagsDialog({ onClose }: { onClose: () => void }) {
  const { drawingStore, canvasStore } = useEditor();
  const [drawing] = useState(drawingStore.getState().drawing);
  const selected = useCanvas((state) => state.pieces);
  const kinds = useMemo(() => equipmentKinds.filter((kind) => drawing.equipment.some((piece) => piece.kind === kind)), [drawing]);
  const form = useForm<Values>({
    resolver: zodResolver(schema),
    mode: 'onChange',
    defaultValues: {
      rules: Object.fromEntries(kinds.map((kind) => [kind, drawing.tagRules?.[kind] ?? usualRule(kind)])),
      scope: selected.size > 0 ? 'selection' : 'all',
    },
  });
  const values = useWatch({ control: form.control }) as Values;
  const ids = values.scope === 'selection' ? selected : null;
  const changes = useMemo(() => tagChanges(drawing, unusual(drawing.tagRules, values.rules), ids), [drawing, values.rules, ids]);

  const apply = form.handleSubmit(({ rules }) => {
    drawingStore.getState().change((before) => renumberTags(before, unusual(before.tagRules, rules), ids));
    toast(changes.length === 0 ? 'The rules hold for new pieces.' : `${changes.length} tags changed. Undo takes them back.`);
    canvasStore.setState({ open: null });
  });
  return (
    <Dialog
      isOpen
      isWide
      onClose={onClose}
      title="Rules for tags"
      description="{kind} stands for the letters of the kind, {storey} for the number of the storey, {n}, {nn} or {nnn} for a running number of that many digits. New pieces follow the rules too."
    >
      <form onSubmit={apply} className="grid gap-5 md:grid-cols-2">
        <div className="grid content-start gap-3">
          {kinds.length === 0 && <p className="text-quiet text-sm">Nothing is drawn yet.</p>}
          {kinds.map((kind) => (
            <TextField
              key={kind}
              label={kindNames[kind]}
              className="figures"
              autoComplete="off"
              spellCheck={false}
              error={form.formState.errors.rules?.[kind]?.message}
              {...form.register(`rules.${kind}`)}
            />
          ))}
        </div>
        <div className="flex min-w-0 flex-col gap-3">
          <fieldset>
            <legend className="text-sm font-semibold">Renumber</legend>
            <div className="mt-1 flex gap-4 text-sm">
              <label className="flex min-h-8 items-center gap-2">
                <input type="radio" value="all" className="accent-petrol size-4" {...form.register('scope')} /> All pieces
              </label>
              <label className="flex min-h-8 items-center gap-2">
                <input
                  type="radio"
                  value="selection"
                  disabled={selected.size === 0}
                  className="accent-petrol size-4"
                  {...form.register('scope')}
                />
                What is selected ({selected.size})
              </label>
            </div>
          </fieldset>
          <p role="status" className="text-quiet text-sm">
            {changes.length === 0
              ? 'All tags are as the rules say.'
              : `${changes.length} ${changes.length === 1 ? 'tag' : 'tags'} would change:`}
          </p>
          {changes.length > 0 && (
            <div className="max-h-[46dvh] overflow-y-auto rounded border" tabIndex={0} role="region" aria-label="Tags that would change">
              <table className="w-full text-sm">
                <thead className="bg-well text-quiet sticky top-0 text-left">
                  <tr>
                    <th className="px-3 py-1.5 font-semibold">Now</th>
                    <th className="px-3 py-1.5 font-semibold">Then</th>
                  </tr>
                </thead>
                <tbody>
                  {changes.slice(0, SHOWN).map(({ id, from, to }) => (
                    <tr key={id} className="border-t">
                      <td className="px-3 py-1">{from || 'no tag'}</td>
                      <td className="px-3 py-1 font-semibold">{to}</td>
                    </tr>
                  ))}
                </tbody>
              </table>
              {changes.length > SHOWN && <p className="text-quiet border-t px-3 py-1.5 text-sm">and {changes.length - SHOWN} more</p>}
            </div>
          )}
          <div className="mt-auto flex justify-end gap-2">
            <Button onClick={onClose}>Cancel</Button>
            <Button look="primary" type="submit">
              {changes.length === 0 ? 'Keep the rules' : `Renumber ${changes.length}`}
            </Button>
          </div>
        </div>
      </form>
    </Dialog>
  );
}

/** Rules that differ from the usual ones; those of kinds that are not on the drawing now stay as they were. */
function unusual(before: TagRules = {}, rules: TagRules): TagRules {
  const all = Object.entries({ ...before, ...rules }) as [EquipmentKind, string][];
  return Object.fromEntries(all.filter(([kind, text]) => text !== usualRule(kind)));
}
