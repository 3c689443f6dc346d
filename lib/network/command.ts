import { readFileSync, readSync, statSync } from 'node:fs';
import { balance } from '@/lib/hydraulics/balance';
import { size } from '@/lib/hydraulics/size';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { MOST_DOCUMENT_BYTES, parseNetworkDocument, type Purpose } from './document';
import type { Issue } from './document-fault';

/**
 * `npm run --silent hydraulics -- solve|balance|size FILE.json`, `-` for standard input. One JSON document on standard output, nothing else there.
 * Exit status: 0 solved; 2 the input is unusable; 3 it is usable but has no converged solution.
 */
const SOLVED = 0;
const UNUSABLE = 2;
const NOT_CONVERGED = 3;

const commands: Record<Purpose, (document: NetworkDocument) => { converged: boolean }> = { solve, balance, size };

class InputError extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly issues: Issue[] = [],
  ) {
    super(message);
  }
}

function run(words: string[]): { converged: boolean } {
  const [verb, file, ...rest] = words;
  if (!Object.hasOwn(commands, verb ?? '') || file === undefined || rest.length)
    throw new InputError('usage', 'Usage: hydraulics solve|balance|size FILE.json, or - for standard input.');
  const purpose = verb as Purpose;
  const parsed = parseNetworkDocument(fromJson(read(file)), purpose);
  if (!parsed.ok) throw new InputError(parsed.error.code, parsed.error.message, parsed.error.issues);
  return commands[purpose](parsed.document);
}

function read(file: string): Buffer {
  const tooLarge = () => new InputError('document-too-large', `The document has more than ${MOST_DOCUMENT_BYTES / 1024 / 1024} MiB.`);
  let bytes: Buffer;
  try {
    if (file !== '-' && statSync(file).size > MOST_DOCUMENT_BYTES) throw tooLarge();
    bytes = file === '-' ? readStandardInput(tooLarge) : readFileSync(file);
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError('unreadable', `The document cannot be read: ${(error as Error).message}`);
  }
  if (bytes.length > MOST_DOCUMENT_BYTES) throw tooLarge();
  return bytes;
}

/** Reads standard input no further than just past the limit, so that an endless one ends. */
function readStandardInput(tooLarge: () => InputError): Buffer {
  const pieces: Buffer[] = [];
  let total = 0;
  for (;;) {
    const piece = Buffer.alloc(1 << 16);
    let count: number;
    try {
      count = readSync(0, piece);
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException;
      if (code === 'EAGAIN') continue;
      if (code === 'EOF') break;
      throw error;
    }
    if (!count) break;
    pieces.push(piece.subarray(0, count));
    total += count;
    if (total > MOST_DOCUMENT_BYTES) throw tooLarge();
  }
  return Buffer.concat(pieces);
}

function fromJson(bytes: Buffer): unknown {
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch (error) {
    throw new InputError('not-json', `The document is not JSON: ${(error as Error).message}`);
  }
}

/** Written whole before the process may end: a pipe takes a large result piece by piece. */
function print(result: unknown): void {
  process.stdout.write(`${JSON.stringify(result)}\n`);
}

function main(): void {
  try {
    const result = run(process.argv.slice(2));
    process.exitCode = result.converged ? SOLVED : NOT_CONVERGED;
    print(result);
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    process.exitCode = UNUSABLE;
    print({ error: { code: error.code, message: error.message, issues: error.issues } });
  }
}

main();
