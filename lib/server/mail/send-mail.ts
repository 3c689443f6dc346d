import { createTransport } from 'nodemailer';

interface Mail {
  to: string;
  subject: string;
  text: string;
}

/** Sends one plain-text message through the server that SMTP_URL names. Fails where that server does not take it. */
export async function sendMail({ to, subject, text }: Mail): Promise<void> {
  const url = process.env.SMTP_URL;
  if (!url) throw new Error('SMTP_URL is not set; see README.md.');
  const transport = createTransport(url, { from: process.env.MAIL_FROM ?? 'Evenhead <no-reply@localhost>' });
  try {
    await transport.sendMail({ to, subject, text });
  } finally {
    transport.close();
  }
}

/** A page of this site as a link that works from outside. */
export function publicLink(path: string): string {
  const base = process.env.PUBLIC_URL;
  if (!base) throw new Error('PUBLIC_URL is not set; see README.md.');
  return new URL(path, base).toString();
}
