import type { Metadata } from 'next';
import Link from 'next/link';
import { PasswordLinkForm } from '@/components/account/password-link-form';
import { Notice } from '@/components/ui/notice';
import { findOpenLink } from '@/lib/server/account/password-links';

/** The address holds the token: it goes to no other site and into no index. */
export const metadata: Metadata = { title: 'Set your password', referrer: 'no-referrer', robots: { index: false } };

export default async function PasswordPage({ searchParams }: { searchParams: Promise<{ token?: string | string[] }> }) {
  const { token } = await searchParams;
  const link = typeof token === 'string' ? await findOpenLink(token) : null;
  if (!link || typeof token !== 'string') {
    return (
      <>
        <h1>This link works no more</h1>
        <Notice tone="brass">It has been used, has run out, or was replaced by a newer one.</Notice>
        <p>
          <Link href="/reset" className="underline">
            Ask for a new link
          </Link>
          , or ask whoever invited you for another invitation.
        </p>
      </>
    );
  }
  return (
    <>
      <div>
        <h1>{link.purpose === 'invitation' ? `Welcome, ${link.name}` : 'Set a new password'}</h1>
        <p className="text-quiet mt-1">For {link.email}</p>
      </div>
      <PasswordLinkForm token={token} email={link.email} />
    </>
  );
}
