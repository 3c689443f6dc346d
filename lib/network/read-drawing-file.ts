import { MOST_DOCUMENT_BYTES, parseNetworkDocument } from './document';
import { documentToDrawing, type DrawnDocument } from './document-to-drawing';
import { drawingSchema } from './drawing';

export type ReadFile = { ok: true; read: DrawnDocument } | { ok: false; message: string; issues: string[] };

/** A drawing out of a file's text: a network document (`network/1`), which is laid out, or a drawing of Evenhead's own (`drawing/1`) as it was. */
export function readDrawingFile(text: string): ReadFile {
  if (text.length > MOST_DOCUMENT_BYTES) return refused(`The file is larger than ${MOST_DOCUMENT_BYTES >> 20} MiB.`);
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return refused('The file is not JSON: choose a network document or a drawing that was exported.');
  }
  if ((value as { format?: unknown } | null)?.format === 'drawing/1') {
    const parsed = drawingSchema.safeParse(value);
    if (parsed.success) return { ok: true, read: { drawing: parsed.data, notes: [] } };
    return refused(
      'The file is no whole drawing.',
      parsed.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`),
    );
  }
  const parsed = parseNetworkDocument(value);
  if (!parsed.ok)
    return refused(
      parsed.error.message,
      parsed.error.issues.map(({ path, message, id }) => `${path}${id ? ` (${id})` : ''} ${message}`),
    );
  const read = documentToDrawing(parsed.document);
  const drawn = drawingSchema.safeParse(read.drawing);
  if (!drawn.success)
    return refused(
      'The network is too large for a drawing.',
      drawn.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`),
    );
  return { ok: true, read };
}

const refused = (message: string, issues: string[] = []): ReadFile => ({ ok: false, message, issues });
