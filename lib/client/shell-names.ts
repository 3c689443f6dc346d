/** The page that opens where no other page can be had; the service worker answers with it. */
export const SHELL_PATH = '/aboard';
/** Runs beside the page; its name stays while its content changes, so the network's comes first. */
export const PLAN_WORKER_PATH = '/procedure-worker.js';
export const SHELL_CACHE = 'evenhead.shell';
export const ASSET_CACHE = 'evenhead.assets';
