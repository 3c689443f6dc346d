'use client';

import { useMemo } from 'react';
import { useReactFlow } from 'reactflow';
import { arranging } from './actions/arranging';
import { editing } from './actions/editing';
import { goingAbout } from './actions/going';
import { piping } from './actions/piping';
import type { Stage } from './actions/stage';
import { storeyActions } from './actions/storeys';
import { viewing } from './actions/viewing';
import { commandOf, tools, type ActionId, type Actions, type CommandId } from './commands';
import { useEditor } from './editor-context';

/** What each command does. For one who only reads, those that change something do nothing. */
export function useActions(): Actions {
  const editor = useEditor();
  const view = useReactFlow();
  return useMemo(() => actionsOn({ editor, view }), [editor, view]);
}

function actionsOn(stage: Stage): Actions {
  const { canvasStore, canEdit } = stage.editor;
  const all: Record<ActionId, () => void> = {
    ...editing(stage),
    ...arranging(stage),
    ...piping(stage),
    ...storeyActions(stage),
    ...goingAbout(stage),
    ...viewing(stage),
  };
  const choose = tools.map((tool) => [`tool-${tool}`, () => canvasStore.setState({ tool, pipeStart: null, isPicking: false })]);
  const actions = { ...all, ...Object.fromEntries(choose) } as Actions;
  if (canEdit) return actions;
  const readable = Object.keys(actions).map((id) => [
    id,
    commandOf(id as CommandId).isForReaders ? actions[id as CommandId] : () => undefined,
  ]);
  return Object.fromEntries(readable) as Actions;
}
