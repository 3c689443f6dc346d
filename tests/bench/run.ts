import { canvasSuite } from './canvas';
import { generateSuite } from './generate';
import { nothingLostSuite } from './nothing-lost';
import { solverSuite } from './solver';
import { visitsSuite } from './visits';

/** `npm run bench -- SUITE [--json]`: a suite measures and answers rows; with --json they are one JSON document on standard output. */
export interface Suite {
  suite: string;
  rows: Record<string, string | number>[];
  [figure: string]: unknown;
}

const suites: Record<string, () => Promise<Suite>> = { canvas: canvasSuite, generate: generateSuite, 'nothing-lost': nothingLostSuite, solver: solverSuite, visits: visitsSuite };

async function main(words: string[]): Promise<void> {
  const isJson = words.includes('--json');
  const name = words.find((word) => !word.startsWith('-'));
  if (!name || !Object.hasOwn(suites, name)) {
    process.stderr.write(`Usage: npm run bench -- SUITE [--json]. Suites: ${Object.keys(suites).join(', ')}.\n`);
    process.exitCode = 2;
    return;
  }
  const result = await suites[name]();
  if (isJson) {
    process.stdout.write(`${JSON.stringify(result)}\n`);
    return;
  }
  const { suite, rows, ...figures } = result;
  console.log(suite);
  console.table(rows);
  console.log(figures);
}

await main(process.argv.slice(2));
