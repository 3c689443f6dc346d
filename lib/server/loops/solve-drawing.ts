import type { SolutionBody } from '@/lib/api/loops';
import { balance } from '@/lib/hydraulics/balance';
import { solve } from '@/lib/hydraulics/solve';
import { parseNetworkDocument } from '@/lib/network/document';
import type { Drawing, Place } from '@/lib/network/drawing';
import type { Fault } from '@/lib/network/drawing-faults';
import { drawingToDocument, placeOfLink } from '@/lib/network/drawing-to-document';
import { circuitThrough } from '@/lib/network/index-circuit';

/** Flows as the valves stand, the balance for design flow and the index circuit of a drawing, or the faults that forbid it. */
export function solveDrawing(drawing: Drawing, name: string): SolutionBody {
  const { document, faults } = drawingToDocument(drawing, name);
  if (!document || document.links.length === 0) return { faults, solved: null };

  const parsed = parseNetworkDocument(document);
  if (!parsed.ok) return { faults: [...faults, ...documentFaults(drawing, parsed.error.issues)], solved: null };

  const startedAt = performance.now();
  const solved = solve(parsed.document);
  const balanced = hasTerminals(parsed.document) ? balance(parsed.document) : null;
  const solveMs = performance.now() - startedAt;
  const indexLinks =
    balanced?.indexTerminal && balanced.solution ? circuitThrough(parsed.document, balanced.solution, balanced.indexTerminal) : [];
  return {
    faults: [...faults, ...warningsOf(drawing, [...solved.warnings, ...(balanced?.warnings ?? [])])],
    solved: {
      solve: solved,
      balance: balanced,
      balanceMissing: balanced ? null : 'No terminal unit is drawn, so there is no flow to balance for.',
      indexCircuit: placesOf(drawing, indexLinks),
      solveMs,
    },
  };
}

const hasTerminals = (document: { links: { kind: string; closed?: boolean }[] }) =>
  document.links.some((link) => link.kind === 'terminal' && !link.closed);

function placesOf(drawing: Drawing, linkIds: string[]): Place[] {
  const places = linkIds.map((id) => placeOfLink(drawing, id));
  return places.filter((place, i) => places.findIndex((other) => other.id === place.id) === i);
}

/** The strict check found what the drawing's own checks did not: shown at the piece it names. */
function documentFaults(drawing: Drawing, issues: { path: string; id?: string; message: string }[]): Fault[] {
  return issues.map((issue) => ({
    code: 'document',
    severity: 'error',
    message: `${issue.path}: ${issue.message}`,
    place: placeOfId(drawing, issue.id),
  }));
}

function warningsOf(drawing: Drawing, warnings: { code: string; id?: string | null; message: string }[]): Fault[] {
  const seen = new Set<string>();
  return warnings.flatMap(({ code, id, message }) => {
    const key = `${code} ${id}`;
    if (seen.has(key)) return [];
    seen.add(key);
    return [{ code, severity: 'warning' as const, message, place: placeOfId(drawing, id) }];
  });
}

/** A node's id is its piece's, with the port behind a dot; a link's has its part behind a colon. */
const placeOfId = (drawing: Drawing, id: string | null | undefined): Place =>
  id ? placeOfLink(drawing, id.split('.')[0]!) : { kind: 'equipment', id: drawing.equipment[0]?.id ?? '' };
