import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { ScanAnswer } from '@/services/contracts/baskets';
import { dropScan, keepScan, newKey, nowMs, readWaiting, type WaitingScan } from './scan-store';

/** How a scan ended: the server's answer, or its refusal with `why`. */
export type ScanEnd =
  | { readonly kind: 'answer'; readonly scan: string; readonly answer: ScanAnswer }
  | { readonly kind: 'refusal'; readonly scan: string; readonly why: string; readonly problem: Problem };

export interface QueueState {
  readonly waiting: readonly WaitingScan[];
  /** Why the first of them is not through yet; undefined while it is on its way. */
  readonly stuck: Problem | undefined;
  /** The browser keeps nothing: a reload would lose what waits. */
  readonly unkept: boolean;
}

const retryMs = 1500;
// Below this a wait is the ordinary way of a request, and the act is the moment it arrives.
const worthSayingMs = 1000;

// No answer, a server that is down, too many at once, or nobody signed in: the scan stays and is sent again.
function comesBack({ status }: Problem): boolean {
  return status === 0 || status >= 500 || status === 429 || status === 401 || status === 408;
}

/**
 * Sends the scans of one person for one basket one after another, in order, each with its key, and keeps them in the
 * browser until they are acknowledged: a cut network, a reload or a closed browser neither loses nor doubles one.
 */
export class ScanSender {
  private waiting: WaitingScan[];
  private stuck: Problem | undefined;
  private unkept = false;
  private sending = false;
  private stopped = false;
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    private readonly personId: string,
    private readonly basketId: string,
    private readonly tell: { readonly changed: (state: QueueState) => void; readonly ended: (end: ScanEnd) => void },
  ) {
    this.waiting = readWaiting(personId, basketId);
    this.changed();
    void this.send();
  }

  /** Takes a scan: kept first, then sent. */
  add(scan: string): void {
    const one = { key: newKey(), scan, atMs: nowMs() };
    this.unkept = !keepScan(this.personId, this.basketId, one);
    this.waiting = [...this.waiting, one];
    this.changed();
    void this.send();
  }

  /** Sends what waits, until it is empty or the server does not answer. */
  async send(): Promise<void> {
    clearTimeout(this.timer);
    if (this.sending || this.stopped) return;
    this.sending = true;
    for (let first = this.waiting[0]; first !== undefined && !this.stopped; first = this.waiting[0]) {
      const end = await this.sendOne(first);
      if (end === null) break;
      const { key } = first;
      dropScan(this.personId, this.basketId, key);
      this.waiting = this.waiting.filter((one) => one.key !== key);
      this.stuck = undefined;
      this.changed();
      if (!this.stopped) this.tell.ended(end);
    }
    this.sending = false;
  }

  /** The page is left; what waits stays in the browser. */
  stop(): void {
    this.stopped = true;
    clearTimeout(this.timer);
  }

  private async sendOne({ key, scan, atMs }: WaitingScan): Promise<ScanEnd | null> {
    const waitedMs = Math.round(nowMs() - atMs);
    const headers = { 'idempotency-key': key, ...(waitedMs > worthSayingMs ? { 'scan-waited-ms': String(waitedMs) } : {}) };
    try {
      const answer = await sendJson<ScanAnswer>(`/api/baskets/${this.basketId}/parts`, { body: { scan }, headers });
      return { kind: 'answer', scan, answer };
    } catch (failure) {
      const problem = problemOf(failure);
      if (!comesBack(problem))
        return { kind: 'refusal', scan, why: (problem as Problem & { why?: string }).why ?? 'refused', problem };
      this.stuck = problem;
      this.changed();
      if (!this.stopped) this.timer = setTimeout(() => void this.send(), retryMs);
      return null;
    }
  }

  private changed(): void {
    if (!this.stopped) this.tell.changed({ waiting: this.waiting, stuck: this.stuck, unkept: this.unkept });
  }
}
