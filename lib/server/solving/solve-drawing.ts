import type { SolutionBody } from '@/lib/api/loops';
import type { NetworkDocument, Warning } from '@/lib/hydraulics/types';
import { parseNetworkDocument } from '@/lib/network/document';
import type { Drawing, Place } from '@/lib/network/drawing';
import type { Fault } from '@/lib/network/fault';
import { drawingToDocument, placeFinder } from '@/lib/network/drawing-to-document';
import { inDrawingWords, pieceNames } from '@/lib/network/piece-names';
import { resultFaults } from '@/lib/network/result-faults';
import { cachedSolution, documentKey, keepSolution } from './solution-cache';
import { solveDocument, type SolvedDocument } from './solve-document';
import { solveOffThread } from './solve-pool';

/** Above this a solve leaves the request thread, where it would keep others waiting. */
const mostLinksOnThread = 500;

export interface Asker {
  personId: string;
  signal?: AbortSignal;
}

/** Flows as the valves stand, the balance for design flow and the index circuit of a drawing, or the faults that forbid it. */
export async function solveDrawing(drawing: Drawing, name: string, asker: Asker): Promise<SolutionBody> {
  const { document, faults } = drawingToDocument(drawing, name);
  if (!document || document.links.length === 0) return { faults, solved: null };
  const parsed = parseNetworkDocument(document);
  if (!parsed.ok) return { faults: [...faults, ...documentFaults(drawing, parsed.error.issues)], solved: null };

  const { solve, balance, indexLinks, solveMs } = await solved(parsed.document, asker);
  return {
    faults: [
      ...faults,
      ...warningFaults(drawing, [...solve.warnings, ...(balance?.warnings ?? [])]),
      ...resultFaults(drawing, { solve, balance }),
    ],
    solved: {
      solve,
      balance,
      balanceMissing: balance ? null : 'No terminal unit is drawn, so there is no flow to balance for.',
      indexCircuit: placesOf(drawing, indexLinks),
      solveMs,
    },
  };
}

async function solved(document: NetworkDocument, { personId, signal }: Asker): Promise<SolvedDocument> {
  const key = documentKey(document);
  const known = cachedSolution(key);
  if (known) return known;
  const found = document.links.length > mostLinksOnThread ? await solveOffThread(document, personId, signal) : solveDocument(document);
  keepSolution(key, found);
  return found;
}

function placesOf(drawing: Drawing, linkIds: string[]): Place[] {
  const ids = new Set(linkIds.map((id) => id.split(':')[0]));
  return [...ids].map(placeFinder(drawing));
}

/** The strict check found what the drawing's own checks did not: shown at the piece it names. */
function documentFaults(drawing: Drawing, issues: { path: string; id?: string; message: string }[]): Fault[] {
  const placeOf = placeFinder(drawing);
  return issues.map(({ path, id, message }) => ({
    code: 'document',
    severity: 'error',
    message: `${path}: ${message}`,
    place: placeOf(id),
  }));
}

/** The engine's warnings, each once: solving and balancing may both find it. */
function warningFaults(drawing: Drawing, warnings: Warning[]): Fault[] {
  const once = new Map(warnings.map((warning) => [`${warning.code} ${warning.id}`, warning]));
  const names = pieceNames(drawing);
  const placeOf = placeFinder(drawing);
  return [...once.values()].map(({ code, id, message }) => ({
    code,
    severity: 'warning',
    message: inDrawingWords(message, names),
    place: placeOf(id),
  }));
}
