/** The page that opens where no other page can be had; the service worker answers with it. */
export const SHELL_PATH = '/aboard';
export const SHELL_CACHE = 'evenhead.shell';
export const ASSET_CACHE = 'evenhead.assets';
