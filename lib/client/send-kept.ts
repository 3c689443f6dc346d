import type { KeptEntry } from './kept-entry';
import { send, sendFile } from './http';

/** Sends one kept entry to where its kind is stored. `person` makes the server refuse it if somebody else is signed in by now. */
export function sendKept({ loopId, personId, content }: KeptEntry): Promise<unknown> {
  const person = { headers: { 'X-Entered-By': personId } };
  switch (content.kind) {
    case 'reading':
      return send('POST', `/api/rounds/${content.roundId}/readings`, content.body, person);
    case 'setting':
      return send('POST', `/api/rounds/${content.roundId}/settings`, content.body, person);
    case 'check':
      return send('POST', `/api/loops/${loopId}/checks`, content.body, person);
    case 'snag':
      return send('POST', `/api/loops/${loopId}/snags`, content.body, person);
    case 'resolution':
      return send('POST', `/api/loops/${loopId}/snags/${content.body.snagId}/resolution`, content.body, person);
    case 'photo': {
      const { id, ...about } = content.body;
      return sendFile('PUT', `/api/loops/${loopId}/photos/${id}?${new URLSearchParams(about)}`, content.picture, person);
    }
  }
}
