import type { SavedDraft } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { send } from './http';

/** Saves over the version the drawing was made from; 409 `draft-changed` carries what the other person saved. */
export const saveDraft = (loopId: string, baseVersion: number, drawing: Drawing): Promise<SavedDraft> =>
  send('PUT', `/api/loops/${loopId}/draft`, { baseVersion, drawing });

export const issueRevision = (loopId: string, draftVersion: number, note: string): Promise<{ number: number }> =>
  send('POST', `/api/loops/${loopId}/revisions`, { draftVersion, note });
