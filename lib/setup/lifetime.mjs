import { describe, Interrupted } from './failure.mjs';
import { stopUnfinished } from './processes.mjs';

/** @typedef {() => void | Promise<void>} Ending */
/** @typedef {{ atEnd: (ending: Ending) => void, untilStopped: () => Promise<number> }} Lifetime */

/**
 * Runs the steps of a command. What the steps opened is closed in the reverse order, whatever happens: done, failed, Ctrl-C,
 * SIGTERM. The process ends with the code that the steps answer, 1 after a failure.
 * @param {(lifetime: Lifetime) => Promise<number>} steps
 * @param {{ codeWhenStopped?: number, onFailure?: (line: string) => void }} [options]
 */
export async function inOneLifetime(steps, { codeWhenStopped = 0, onFailure = (line) => console.error(line) } = {}) {
  /** @type {Ending[]} */
  const endings = [];
  // A signal that comes twice (the terminal's and npm's) changes nothing.
  /** @type {Promise<number>} */
  const stopped = new Promise((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => resolve(codeWhenStopped));
  });
  const done = steps({ atEnd: (ending) => endings.push(ending), untilStopped: () => stopped });
  done.catch(() => {});
  let code = 1;
  try {
    code = await Promise.race([done, stopped]);
  } catch (error) {
    if (!(error instanceof Interrupted)) onFailure(describe(error));
  }
  await stopUnfinished();
  for (let ending = endings.pop(); ending; ending = endings.pop()) {
    try {
      await ending();
    } catch (error) {
      code = 1;
      onFailure(describe(error));
    }
  }
  process.exit(code);
}
