'use client';

import { CircleUserRound } from 'lucide-react';
import Link from 'next/link';
import { signOut } from 'next-auth/react';
import { DropdownMenu } from 'radix-ui';
import { leaveAllBehind } from '@/lib/client/aboard';
import { dropShell } from '@/lib/client/shell-cache';

const item = 'block w-full rounded px-3 py-2 text-left text-ink no-underline outline-none data-[highlighted]:bg-well';

/** What was taken along goes with the person; entries that were not sent stay on the device until that person signs in again. */
async function leave(): Promise<void> {
  await Promise.allSettled([leaveAllBehind(), dropShell()]);
  await signOut({ callbackUrl: '/sign-in' });
}

/** Who is signed in, with the way to their own settings and out. */
export function AccountMenu({ name, organizationName }: { name: string; organizationName: string }) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger
        className="text-quiet hover:bg-well hover:text-ink inline-flex size-11 items-center justify-center rounded"
        aria-label={`Account of ${name}`}
      >
        <CircleUserRound size={22} />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="end" className="bg-sheet z-50 min-w-56 rounded border p-1 shadow-lg">
          <div className="px-3 py-2">
            <div className="font-semibold">{name}</div>
            <div className="text-quiet text-sm">{organizationName}</div>
          </div>
          <DropdownMenu.Separator className="my-1 border-t" />
          <DropdownMenu.Item asChild>
            <Link className={item} href="/account">
              Account
            </Link>
          </DropdownMenu.Item>
          <DropdownMenu.Item asChild>
            <button type="button" className={item} onClick={() => void leave()}>
              Sign out
            </button>
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
