import { balance } from '@/lib/hydraulics/balance';
import { solve } from '@/lib/hydraulics/solve';
import type { BalanceResult, NetworkDocument, SolveResult } from '@/lib/hydraulics/types';
import { circuitThrough } from '@/lib/network/index-circuit';

export interface SolvedDocument {
  solve: SolveResult;
  /** Null where no open terminal asks for a flow. */
  balance: BalanceResult | null;
  indexLinks: string[];
  solveMs: number;
}

/** Flows as the valves stand, the balance for design flow and the index circuit of a checked document. */
export function solveDocument(document: NetworkDocument): SolvedDocument {
  const startedAt = performance.now();
  const solved = solve(document);
  const balanced = document.links.some((link) => link.kind === 'terminal' && !link.closed) ? balance(document) : null;
  const solveMs = performance.now() - startedAt;
  const indexLinks = balanced?.indexTerminal ? circuitThrough(document, balanced.solution, balanced.indexTerminal) : [];
  return { solve: solved, balance: balanced, indexLinks, solveMs };
}
