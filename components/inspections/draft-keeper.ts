import { problemOf, ProblemError, type Problem } from '@/components/ui/problem';
import type { InspectionContent, InspectionPatch } from '@/services/contracts/inspection-content';
import { canonicalJson } from '@/services/engine/record/canonical';
import type { DraftShelf } from './draft-shelf';

/** A draft as the server has it. */
export interface ServedDraft {
  readonly version: number;
  readonly content: InspectionContent;
  readonly changed: { readonly name: string; readonly at: string };
}

export interface DraftServer {
  /** Throws ProblemError with 412 when somebody else saved meanwhile. */
  readonly save: (content: InspectionContent, version: number) => Promise<ServedDraft>;
  readonly read: () => Promise<ServedDraft>;
}

export type SavedState =
  | { readonly kind: 'saved' }
  | { readonly kind: 'saving' }
  /** Kept in this browser; `retrying` says that it is sent again by itself. */
  | { readonly kind: 'unsaved'; readonly problem: Problem; readonly retrying: boolean };

/** What a person sees of the draft. `theirs` is set while two versions wait for a choice. */
export interface DraftView {
  readonly content: InspectionContent;
  readonly saved: SavedState;
  readonly theirs: ServedDraft | null;
  /** True when unsent entries of an earlier visit were taken up. */
  readonly restored: boolean;
}

const pauseMs = 600;
const firstRetryMs = 2_000;
const longestRetryMs = 30_000;

function same(a: InspectionContent, b: InspectionContent): boolean {
  try {
    return canonicalJson(JSON.parse(JSON.stringify(a))) === canonicalJson(JSON.parse(JSON.stringify(b)));
  } catch {
    return false;
  }
}

/** A refusal that the same content would meet again; a lost network, a busy server or an ended session is none. */
function isFinal({ status }: Problem): boolean {
  return status >= 400 && status < 500 && ![401, 408, 429].includes(status);
}

/**
 * Keeps one draft: entries count at once, are shelved in the browser, sent after a pause, and sent again until the server
 * has them. Two versions are never merged or overwritten without the person's choice.
 */
export class DraftKeeper {
  private view: DraftView;
  private version: number;
  private dirty = false;
  private delayMs = firstRetryMs;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private running: Promise<boolean> | null = null;
  private asleep = false;
  private looked = false;
  private readonly listeners = new Set<() => void>();

  constructor(
    served: ServedDraft,
    private readonly server: DraftServer,
    private readonly shelf: DraftShelf,
  ) {
    this.version = served.version;
    this.view = { content: served.content, saved: { kind: 'saved' }, theirs: null, restored: false };
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly current = (): DraftView => this.view;

  /** Takes up, once, what a lost network or a closed tab left in this browser. */
  restore(served: ServedDraft): void {
    if (this.looked) return;
    this.looked = true;
    const left = this.shelf.read();
    if (!left || this.dirty) return;
    if (same(left.content, served.content)) return this.shelf.clear();
    this.dirty = true;
    this.show({ content: left.content, restored: true });
    if (left.version === served.version) this.plan(0);
    else this.ask(served);
  }

  /** A fresh answer of the server: taken when nothing here waits, otherwise the next save will tell the two apart. */
  adopt(served: ServedDraft): void {
    if (this.dirty || this.running || this.view.theirs || served.version <= this.version) return;
    this.version = served.version;
    this.show({ content: served.content, saved: { kind: 'saved' } });
  }

  readonly change = (patch: InspectionPatch): void => {
    const sent = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
    this.dirty = true;
    this.show({ content: { ...this.view.content, ...sent } });
    this.shelf.put({ version: this.version, content: this.view.content });
    if (this.view.theirs) return;
    this.show({ saved: { kind: 'saving' } });
    this.plan(pauseMs);
  };

  readonly takeTheirs = (): void => {
    const { theirs } = this.view;
    if (!theirs) return;
    this.version = theirs.version;
    this.dirty = false;
    this.shelf.clear();
    this.show({ content: theirs.content, theirs: null, saved: { kind: 'saved' }, restored: false });
  };

  readonly keepMine = (): void => {
    const { theirs } = this.view;
    if (!theirs) return;
    this.version = theirs.version;
    this.show({ theirs: null });
    this.change({});
  };

  /** Sends now what waits; true when the server has everything. */
  readonly flush = (): Promise<boolean> => {
    clearTimeout(this.timer);
    this.running ??= this.send().finally(() => {
      this.running = null;
    });
    return this.running;
  };

  /** The page is left: what cannot be sent now stays on the shelf. */
  rest(): void {
    this.asleep = true;
    void this.flush();
  }

  wake(): void {
    this.asleep = false;
  }

  private plan(ms: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), ms);
  }

  private async send(): Promise<boolean> {
    if (!this.dirty) return true;
    while (this.dirty) {
      if (this.view.theirs) return false;
      const content = this.view.content;
      this.dirty = false;
      this.show({ saved: { kind: 'saving' } });
      try {
        this.version = (await this.server.save(content, this.version)).version;
        this.delayMs = firstRetryMs;
      } catch (failure) {
        this.dirty = true;
        if (!(await this.weigh(failure, content))) return false;
      }
    }
    this.shelf.clear();
    this.show({ saved: { kind: 'saved' }, restored: false });
    return true;
  }

  /** What a failed save means; true when the server turned out to have the content after all. */
  private async weigh(failure: unknown, content: InspectionContent): Promise<boolean> {
    const problem = problemOf(failure);
    if (failure instanceof ProblemError && problem.status === 412) {
      try {
        const served = await this.server.read();
        if (same(served.content, content)) {
          // The answer to an earlier save was lost on its way.
          this.version = served.version;
          this.dirty = this.view.content !== content;
          return true;
        }
        this.show({ saved: { kind: 'unsaved', problem, retrying: false } });
        this.ask(served);
        return false;
      } catch (second) {
        return this.wait(problemOf(second));
      }
    }
    if (!isFinal(problem)) return this.wait(problem);
    this.show({ saved: { kind: 'unsaved', problem, retrying: false } });
    return false;
  }

  private wait(problem: Problem): false {
    this.show({ saved: { kind: 'unsaved', problem, retrying: true } });
    if (!this.asleep) this.plan(this.delayMs);
    this.delayMs = Math.min(longestRetryMs, this.delayMs * 2);
    return false;
  }

  private ask(served: ServedDraft): void {
    if (same(served.content, this.view.content)) {
      this.version = served.version;
      this.dirty = false;
      this.shelf.clear();
      return this.show({ saved: { kind: 'saved' }, restored: false });
    }
    this.show({ theirs: served });
  }

  private show(next: Partial<DraftView>): void {
    this.view = { ...this.view, ...next };
    for (const listener of this.listeners) listener();
  }
}
