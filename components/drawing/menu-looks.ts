/** How a line of a menu looks, and the sheet it stands on. */
export const menuItem =
  'flex min-h-8 cursor-default items-center justify-between gap-8 rounded px-3 py-1.5 text-sm outline-none data-[disabled]:opacity-40 data-[highlighted]:bg-well data-[state=open]:bg-well pointer-coarse:min-h-11';
export const menuSheet =
  'bg-sheet text-ink z-50 max-h-[min(75dvh,var(--radix-dropdown-menu-content-available-height,75dvh))] max-w-[calc(100vw-1rem)] min-w-60 overflow-y-auto rounded border p-1 shadow-lg';
