import type { Metadata } from 'next';
import { ResetForm } from '@/components/account/reset-form';

export const metadata: Metadata = { title: 'New password' };

export default function ResetPage() {
  return (
    <>
      <div>
        <h1>Set a new password</h1>
        <p className="text-quiet mt-1">We send you a link with which you can set one.</p>
      </div>
      <ResetForm />
    </>
  );
}
