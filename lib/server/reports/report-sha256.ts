import { createHash } from 'node:crypto';
import type { ReportContent } from '@/lib/api/reports';

/**
 * JSON with the keys of every object in order of their code units and no white space, so that equal values give equal
 * text whatever order they were put together in. What is undefined is left out, as in JSON.
 */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_, part: unknown) =>
    part !== null && typeof part === 'object' && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
}

export const sha256 = (bytes: string | Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

/** What a signature stands under: SHA-256 of the canonical JSON of the content, in UTF-8. */
export const reportSha256 = (content: ReportContent): string => sha256(canonicalJson(content));
