import type { Metadata } from 'next';
import { AccountForm } from '@/components/account/account-form';
import { ChangePasswordForm } from '@/components/account/change-password-form';
import { Sheet } from '@/components/ui/sheet';
import { requirePerson } from '@/lib/server/auth/require-person';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const { name, email, organizationName, theme, units } = await requirePerson();
  return (
    <>
      <div className="mb-5">
        <h1>Account</h1>
        <p className="text-quiet">
          {email} · {organizationName}
        </p>
      </div>
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_21rem]">
        <Sheet title="Name, theme and units">
          <AccountForm name={name} theme={theme} units={units} />
        </Sheet>
        <Sheet title="Password">
          <ChangePasswordForm email={email} />
        </Sheet>
      </div>
    </>
  );
}
