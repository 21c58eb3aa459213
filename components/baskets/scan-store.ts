/** A scan the server has not acknowledged. It is kept in the browser until it is. */
export interface WaitingScan {
  /** Sent as the Idempotency-Key: however often it is sent, it counts once. */
  readonly key: string;
  readonly scan: string;
  /** Milliseconds since the epoch by this workstation's clock; only differences of it are used. */
  readonly atMs: number;
}

/** This person's scans for this basket, one entry each, so that two tabs do not overwrite each other; nobody else's are sent in their name. */
const storePrefix = (personId: string, basketId: string) => `ringtrue-scan:${personId}:${basketId}:`;

export function nowMs(): number {
  return performance.timeOrigin + performance.now();
}

/** 128 random bits; made without crypto.randomUUID, which a browser has on secure addresses only. */
export function newKey(): string {
  return [...crypto.getRandomValues(new Uint8Array(16))].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}

function parsed(text: string | null): WaitingScan[] {
  try {
    const value: unknown = JSON.parse(text ?? 'null');
    if (typeof value !== 'object' || value === null) return [];
    const { key, scan, atMs } = value as Record<string, unknown>;
    return typeof key === 'string' && typeof scan === 'string' && typeof atMs === 'number' ? [{ key, scan, atMs }] : [];
  } catch {
    return [];
  }
}

/** What still waits, in the order it was scanned; nothing where the browser keeps nothing. */
export function readWaiting(personId: string, basketId: string): WaitingScan[] {
  try {
    const start = storePrefix(personId, basketId);
    const names = Array.from({ length: localStorage.length }, (_, place) => localStorage.key(place) ?? '');
    return names
      .filter((name) => name.startsWith(start))
      .flatMap((name) => parsed(localStorage.getItem(name)))
      .sort((a, b) => a.atMs - b.atMs);
  } catch {
    return [];
  }
}

/** Keeps one scan until it is acknowledged; false when the browser keeps nothing, so that the page can say so. */
export function keepScan(personId: string, basketId: string, scan: WaitingScan): boolean {
  try {
    localStorage.setItem(`${storePrefix(personId, basketId)}${scan.key}`, JSON.stringify(scan));
    return true;
  } catch {
    return false;
  }
}

/** The server has it, or has refused it. */
export function dropScan(personId: string, basketId: string, key: string): void {
  try {
    localStorage.removeItem(`${storePrefix(personId, basketId)}${key}`);
  } catch {
    // What could not be kept need not be dropped.
  }
}
