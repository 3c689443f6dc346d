import { spawnSync } from 'node:child_process';

/** Debian's interpreter, where python3-iapws, python3-fluids and python3-scipy are packaged; a virtual environment would hide them. */
const PYTHON = '/usr/bin/python3';

/** Whether an open Python library can be asked; a comparison without it is skipped with this name in its note. */
export function hasPythonLibrary(name: string): boolean {
  return spawnSync(PYTHON, ['-c', `import ${name}`]).status === 0;
}

/** Runs a script that reads `rows` (JSON) and prints its answer as JSON. */
export function askPython<T>(script: string, rows: unknown): T {
  const run = spawnSync(PYTHON, ['-c', `import json, sys\nrows = json.load(sys.stdin)\n${script}`], {
    input: JSON.stringify(rows),
    encoding: 'utf8',
    maxBuffer: 64 * 1024 * 1024,
  });
  if (run.status !== 0) throw new Error(run.stderr || String(run.error));
  return JSON.parse(run.stdout) as T;
}
