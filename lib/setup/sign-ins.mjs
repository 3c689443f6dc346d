import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './places.mjs';

/** Prints who the demo's people are; the demo's seed keeps the list. */
export function printSignIns() {
  const file = join(root, 'db/demo-sign-ins.json');
  if (!existsSync(file)) return;
  /** @type {{ email: string, password: string, who: string }[]} */
  const signIns = JSON.parse(readFileSync(file, 'utf8'));
  const width = Math.max(...signIns.map(({ email }) => email.length));
  for (const { email, password, who } of signIns) console.log(`    ${email.padEnd(width)}  ${password}  ${who}`);
}
