const KEY = 'evenhead.clock-offset';

/** Notes what the server's clock says beside this device's; its header has whole seconds, so that is as well as it is known. */
export function noteServerTime(dateHeader: string | null, deviceNowMs = Date.now()): void {
  const serverMs = dateHeader === null ? NaN : Date.parse(dateHeader);
  if (Number.isNaN(serverMs) || typeof localStorage === 'undefined') return;
  try {
    localStorage.setItem(KEY, String(Math.round((serverMs - deviceNowMs) / 1000) * 1000));
  } catch (error) {
    // A full disk or a private window: the offset stays unknown, the entry keeps the device's own time.
    if (!(error instanceof DOMException)) throw error;
  }
}

/** Server − device as last seen, ms to the second; null where this device never met the server. */
export function clockOffsetMs(): number | null {
  const text = localStorage.getItem(KEY);
  const offset = text === null ? NaN : Number(text);
  return Number.isFinite(offset) ? offset : null;
}
