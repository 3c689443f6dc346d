import { existsSync } from 'node:fs';
import { installFromDebian } from './debian.mjs';

/** Debian's browser, which the end-to-end tests drive. */
const chromium = '/usr/bin/chromium';

/** @param {(line: string) => void} say */
export async function requireChromium(say) {
  if (!existsSync(chromium))
    await installFromDebian(['chromium'], 'There is no Chromium on this machine, and the end-to-end tests need it', say);
}
