'use client';

import { useMutation } from '@tanstack/react-query';
import { Ellipsis } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { DropdownMenu } from 'radix-ui';
import { toast } from 'sonner';
import type { ChangePerson, PersonRow } from '@/lib/api/people';
import { projectRoles } from '@/lib/api/permissions';
import { send } from '@/lib/client/http';
import { roleWords } from './role-words';

const item = 'w-full cursor-pointer rounded px-3 py-2 text-left outline-none data-[highlighted]:bg-well';

/** What an administrator can change about a person, behind one button of their row. */
export function PersonActions({ person }: { person: PersonRow }) {
  const router = useRouter();
  const done = (message: string) => {
    toast(message);
    router.refresh();
  };
  const change = useMutation({
    mutationFn: (values: ChangePerson) => send('PATCH', `/api/people/${person.id}`, values),
    onSuccess: () => done(`${person.name} changed`),
    onError: (error) => toast.error(error.message),
  });
  const resend = useMutation({
    mutationFn: () => send('POST', `/api/people/${person.id}/invitation`),
    onSuccess: () => done(`Invitation sent again to ${person.email}`),
    onError: (error) => toast.error(error.message),
  });

  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger
        disabled={change.isPending || resend.isPending}
        aria-label={`Change ${person.name}`}
        className="text-quiet hover:bg-well hover:text-ink inline-flex size-10 items-center justify-center rounded disabled:opacity-50"
      >
        <Ellipsis size={18} aria-hidden />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="end" className="bg-sheet text-ink z-50 min-w-60 rounded border p-1 shadow-lg">
          {person.isActive && !person.hasPassword && (
            <DropdownMenu.Item className={item} onSelect={() => resend.mutate()}>
              Send the invitation again
            </DropdownMenu.Item>
          )}
          <DropdownMenu.Label className="text-quiet px-3 pt-2 pb-1 text-sm">Usual role</DropdownMenu.Label>
          <DropdownMenu.RadioGroup
            value={person.defaultRole}
            onValueChange={(role) => change.mutate({ defaultRole: projectRoles.find((known) => known === role) })}
          >
            {projectRoles.map((role) => (
              <DropdownMenu.RadioItem key={role} value={role} className={`${item} relative pl-8`}>
                <DropdownMenu.ItemIndicator className="absolute left-3">●</DropdownMenu.ItemIndicator>
                {roleWords[role]}
              </DropdownMenu.RadioItem>
            ))}
          </DropdownMenu.RadioGroup>
          <DropdownMenu.Separator className="my-1 border-t" />
          <DropdownMenu.Item className={item} onSelect={() => change.mutate({ isAdministrator: !person.isAdministrator })}>
            {person.isAdministrator ? 'Take the administrator’s rights' : 'Make an administrator'}
          </DropdownMenu.Item>
          <DropdownMenu.Item className={item} onSelect={() => change.mutate({ isActive: !person.isActive })}>
            {person.isActive ? 'Shut out: no more signing in' : 'Let back in'}
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
