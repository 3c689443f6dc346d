'use client';

import { ChevronRight } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import type { EquipmentKind } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/fault';
import { goesOnPipe } from '@/lib/network/split-pipe';
import type { OpenMenu } from './canvas-state';
import { commandsFor, placeable, type Actions, type Command, type CommandId, type MenuPlace } from './commands';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { MenuCommand } from './menu-command';
import { menuItem, menuSheet } from './menu-looks';
import { placePiece } from './placing';
import { KindIcon } from './symbols/symbol';

const kindsToPlace: Record<MenuPlace, EquipmentKind[]> = {
  piece: [],
  storey: [],
  sheet: placeable,
  pipe: placeable.filter(goesOnPipe),
};

/** The menu of what was pressed with the right button, by a long press or by the menu key. */
export function ContextMenu({ actions }: { actions: Actions }) {
  const { canvasStore } = useEditor();
  const menu = useCanvas((state) => state.menu);
  const close = () =>
    canvasStore.setState({
      menu: null,
      storeyId: canvasStore.getState().open === 'rename-storey' ? canvasStore.getState().storeyId : null,
    });
  if (!menu) return null;
  return (
    <DropdownMenu.Root open onOpenChange={(isOpen) => !isOpen && setTimeout(close)}>
      <DropdownMenu.Trigger asChild>
        <span aria-hidden tabIndex={-1} className="fixed size-px" style={{ left: menu.screen.x, top: menu.screen.y }} />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          aria-label="Menu of the canvas"
          align="start"
          sideOffset={2}
          collisionPadding={8}
          className={menuSheet}
          // The canvas element that had the focus gets it back from the action or keeps it; the anchor is no place for it.
          onCloseAutoFocus={(event) => event.preventDefault()}
        >
          <MenuLines menu={menu} actions={actions} />
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

function MenuLines({ menu, actions }: { menu: OpenMenu; actions: Actions }) {
  const editor = useEditor();
  const storeyId = useCanvas((state) => state.storeyId);
  const several = useCanvas((state) => state.pieces.size > 1);
  const storey = useDrawing((drawing) => drawing.storeys.find(({ id }) => id === storeyId));
  const offered = commandsFor(editor.canEdit);
  const of = (place: MenuPlace) => offered.filter(({ menus }) => menus?.includes(place));
  const kinds = editor.canEdit ? kindsToPlace[menu.of] : [];
  return (
    <>
      {kinds.length > 0 && (
        <SubMenu label={menu.of === 'pipe' ? 'Put into the pipe here' : 'Place here'}>
          {kinds.map((kind) => (
            <DropdownMenu.Item
              key={kind}
              className={menuItem}
              onSelect={() => placePiece(editor, kind, menu.at, menu.of === 'pipe' ? 30 : 1)}
            >
              <span className="flex items-center gap-3">
                <KindIcon kind={kind} /> {kindNames[kind]}
              </span>
            </DropdownMenu.Item>
          ))}
        </SubMenu>
      )}
      <Lines commands={of(menu.of)} actions={actions} />
      {menu.of === 'piece' && several && editor.canEdit && (
        <SubMenu label="Line up and space out">
          <Lines commands={offered.filter(({ id }) => /^(align|distribute)-/.test(id))} actions={actions} />
        </SubMenu>
      )}
      {menu.of === 'sheet' && storey && editor.canEdit && (
        <SubMenu label={`Storey ${storey.name}`}>
          <Lines commands={of('storey')} actions={actions} />
        </SubMenu>
      )}
    </>
  );
}

const Lines = ({ commands, actions }: { commands: (Command & { id: CommandId })[]; actions: Actions }) =>
  commands.map((command) => <MenuCommand key={command.id} command={command} actions={actions} />);

const SubMenu = ({ label, children }: { label: string; children: React.ReactNode }) => (
  <DropdownMenu.Sub>
    <DropdownMenu.SubTrigger className={menuItem}>
      {label} <ChevronRight size={14} aria-hidden />
    </DropdownMenu.SubTrigger>
    <DropdownMenu.Portal>
      <DropdownMenu.SubContent className={menuSheet} sideOffset={2} collisionPadding={8}>
        {children}
      </DropdownMenu.SubContent>
    </DropdownMenu.Portal>
  </DropdownMenu.Sub>
);
