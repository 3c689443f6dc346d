import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { Fluid, NetworkDocument } from '@/lib/hydraulics/types';
import { Fault, type Issue, isRecord } from './document-fault';
import { checkLink } from './document-links';
import { checkOptions } from './document-options';
import { inflowFaults } from './document-inflows';
import { withLargestBores } from './document-sizing';

export const MOST_LINKS = 50_000;
export const MOST_DOCUMENT_BYTES = 32 * 1024 * 1024;

export type DocumentErrorCode =
  'not-a-document' | 'unsupported-format' | 'document-too-large' | 'empty-network' | 'invalid-document' | 'fluid-out-of-range';

export interface DocumentError {
  code: DocumentErrorCode;
  message: string;
  issues: Issue[];
}

export type ParsedDocument = { ok: true; document: NetworkDocument } | { ok: false; error: DocumentError };

/** What the document is for: sizing asks for limits and lets a pipe that is to be sized come without a bore. */
export type Purpose = 'solve' | 'balance' | 'size';

/**
 * Checks a value, read from JSON, as a network document ("network/1") that the engine can use as it stands. Every fault is listed, each
 * with the path of the offending value and, inside a node or link, its id. Fields that are not known are kept and ignored.
 */
export function parseNetworkDocument(value: unknown, purpose: Purpose = 'solve'): ParsedDocument {
  if (!isRecord(value))
    return failure('not-a-document', 'A network document is a JSON object.', [{ path: '', message: 'must be an object' }]);
  if (value.format !== 'network/1') {
    const issue = { path: 'format', message: 'must be "network/1"' };
    return failure('unsupported-format', 'The document is of a format that is not supported.', [issue]);
  }
  const { nodes, links } = value;
  if (Array.isArray(links) && links.length > MOST_LINKS) {
    const issue = { path: 'links', message: `must have at most ${MOST_LINKS} links, has ${links.length}` };
    return failure('document-too-large', `The network has more than ${MOST_LINKS} links.`, [issue]);
  }
  if (Array.isArray(nodes) && Array.isArray(links) && (nodes.length === 0 || links.length === 0)) {
    const empty = nodes.length === 0 ? 'nodes' : 'links';
    return failure('empty-network', 'The network is empty.', [{ path: empty, message: 'must not be empty' }]);
  }

  // From here on a cast of what the checks below have not faulted.
  const document = value as unknown as NetworkDocument;
  const fault = new Fault();
  const ids = checkNodes(nodes, fault);
  checkLinks(links, ids, purpose, fault);
  const isSoundNetwork = fault.issues.length === 0;
  checkName(value.name, fault);
  const outOfRange = checkFluid(value.fluid, fault) ? fluidFault(document.fluid, fault) : null;
  checkReference(value.reference, ids, fault);
  checkOptions(value.options, purpose, fault);
  if (isSoundNetwork) fault.issues.push(...inflowFaults(document));
  const { length } = fault.issues;
  if (outOfRange && length === 1) return failure('fluid-out-of-range', outOfRange, fault.issues);
  if (length) return failure('invalid-document', `The document has ${length === 1 ? 'a fault' : `${length} faults`}.`, fault.issues);
  return { ok: true, document: purpose === 'size' ? withLargestBores(document) : document };
}

function failure(code: DocumentErrorCode, message: string, issues: Issue[]): ParsedDocument {
  return { ok: false, error: { code, message, issues } };
}

function checkName(name: unknown, fault: Fault): void {
  if (name !== undefined && typeof name !== 'string') fault.add('name', 'must be text');
}

const media: Fluid['medium'][] = ['water', 'propylene-glycol', 'ethylene-glycol', 'custom'];

/** Answers whether the fluid is complete enough for its property ranges to be looked at. */
function checkFluid(fluid: unknown, fault: Fault): boolean {
  if (!isRecord(fluid)) {
    fault.add('fluid', 'must be an object');
    return false;
  }
  const at = fault.of(fluid, 'fluid');
  if (!at.oneOf('medium', media, true)) return false;
  const before = fault.issues.length;
  if (fluid.medium === 'custom') for (const name of ['densityKgM3', 'viscosityMPaS', 'specificHeatKJKgK']) at.positive(name);
  else at.number('temperatureC', true);
  if (fluid.medium === 'propylene-glycol' || fluid.medium === 'ethylene-glycol') at.number('massFraction', true);
  return fault.issues.length === before;
}

/** The fault of a complete fluid outside its property data, in words that name the range. */
function fluidFault(fluid: Fluid, fault: Fault): string | null {
  const found = fluidProperties(fluid);
  if (found.ok) return null;
  fault.add(found.error.path, found.error.message);
  return found.error.message;
}

function checkNodes(nodes: unknown, fault: Fault): Set<string> {
  const ids = new Set<string>();
  if (!Array.isArray(nodes)) {
    fault.add('nodes', 'must be a list');
    return ids;
  }
  Array.from(nodes).forEach((node: unknown, i) => {
    const path = `nodes[${i}]`;
    if (!isRecord(node)) return fault.add(path, 'must be an object');
    const at = fault.of(node, path);
    at.id(ids, 'node');
    at.number('elevationM');
    at.number('inflowLs');
  });
  return ids;
}

function checkReference(reference: unknown, nodeIds: Set<string>, fault: Fault): void {
  if (reference === undefined) return;
  if (!isRecord(reference)) return fault.add('reference', 'must be an object');
  const at = fault.of(reference, 'reference');
  at.node('node', nodeIds);
  at.number('gaugePressureKpa', true);
}

function checkLinks(links: unknown, nodeIds: Set<string>, purpose: Purpose, fault: Fault): void {
  if (!Array.isArray(links)) return fault.add('links', 'must be a list');
  const ids = new Set<string>();
  Array.from(links).forEach((link: unknown, i) => {
    const path = `links[${i}]`;
    if (!isRecord(link)) return fault.add(path, 'must be an object');
    const at = fault.of(link, path);
    at.id(ids, 'link');
    checkLink(at, nodeIds, purpose === 'size');
  });
}
